import type { FieldError } from '@app/contracts';
import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';
import { asProblem } from '../api/problem';

/** "/reason" → "reason", "/parts/0/quantity" → "parts.0.quantity". */
export function fieldPathOf(pointer: string): string {
  return pointer
    .replace(/^#?\//, '')
    .split('/')
    .map((part) => part.replace(/~1/g, '/').replace(/~0/g, '~'))
    .join('.');
}

/** Parts a problem's field errors into those whose field the form has, and the rest. */
export function placeErrors(errors: FieldError[], names: readonly string[]) {
  const placed: { name: string; detail: string }[] = [];
  const rest: FieldError[] = [];
  for (const error of errors) {
    const name = fieldPathOf(error.pointer);
    if (names.includes(name)) placed.push({ name, detail: error.detail });
    else rest.push(error);
  }
  return { placed, rest };
}

/**
 * Sets each field's error from a failed request and focuses the first. What belongs to no field becomes the form's own error:
 * read it as `form.formState.errors.root?.message`.
 */
export function showProblem<T extends FieldValues>(
  form: UseFormReturn<T>,
  names: readonly FieldPath<T>[],
  error: unknown,
): void {
  const problem = asProblem(error);
  const { placed, rest } = placeErrors(problem.errors, names);
  placed.forEach(({ name, detail }, index) => {
    form.setError(name as FieldPath<T>, { type: 'server', message: detail }, { shouldFocus: index === 0 });
  });
  if (placed.length > 0 && rest.length === 0) return;
  const sentences = rest.length > 0 ? rest.map((item) => item.detail) : [problem.detail];
  if (problem.status >= 500 && problem.correlationId !== null) sentences.push(`(Reference ${problem.correlationId})`);
  form.setError('root', { type: 'server', message: sentences.join(' ') });
}
