import type { ColumnAnswer, LayoutAnswers, ValueAnswer, WorkbookAnswers } from './intake-answers';

/**
 * Answers with more answers: field by field, sheets, columns and channels by their names, lists joined; where both say something else, `more` stands.
 * @example mergeAnswers(intake.answers, choice.answers)
 */
export function mergeAnswers(answers: WorkbookAnswers, more: WorkbookAnswers): WorkbookAnswers {
  const merged = { ...answers, ...more };
  if (answers.lots && more.lots) merged.lots = { ...answers.lots, ...more.lots };
  const sheets = mergeRecords(answers.sheets, more.sheets, mergeLayouts);
  return sheets ? { ...merged, sheets } : merged;
}

function mergeLayouts(layout: LayoutAnswers, more: LayoutAnswers): LayoutAnswers {
  const columns = mergeRecords(layout.columns, more.columns, mergeColumns);
  const missing = joined(layout.missing, more.missing);
  return { ...layout, ...more, ...(columns && { columns }), ...(missing && { missing }) };
}

function mergeColumns(column: ColumnAnswer, more: ColumnAnswer): ColumnAnswer {
  const channels = mergeRecords(column.channels, more.channels, mergeValues);
  return { ...column, ...more, ...mergeValues(column, more), ...(channels && { channels }) };
}

function mergeValues(values: ValueAnswer, more: ValueAnswer): ValueAnswer {
  const missing = joined(values.missing, more.missing);
  const readings = joined(values.readings, more.readings);
  return { ...values, ...more, ...(missing && { missing }), ...(readings && { readings }) };
}

const joined = (one: string[] | undefined, more: string[] | undefined): string[] | undefined =>
  one && more ? [...new Set([...one, ...more])] : (more ?? one);

function mergeRecords<T>(
  one: Record<string, T> | undefined,
  more: Record<string, T> | undefined,
  merge: (one: T, more: T) => T,
): Record<string, T> | undefined {
  if (!one || !more) return more ?? one;
  const merged = new Map(Object.entries(one));
  for (const [name, value] of Object.entries(more)) {
    const known = merged.get(name);
    merged.set(name, known === undefined ? value : merge(known, value));
  }
  return Object.fromEntries(merged);
}
