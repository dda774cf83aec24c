import { columnOf } from '../container/cell-names';
import type { Problem } from '../types';
import { addBoxes, addComments } from './comments';
import type { FillStyles, Shade } from './fill-styles';
import type { PackageEditor } from './package-editor';
import { shadeCells, type Shades } from './shade-cells';
import { escapeXml, prefixOf } from './xml-edit';

const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const COMMENTS_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.comments+xml';
const DRAWING_TYPE = 'application/vnd.openxmlformats-officedocument.vmlDrawing';
/** What may follow a sheet's comment boxes (ECMA-376 part 1, 18.3.1.99). */
const AFTER_BOXES = /<(?:\w+:)?(legacyDrawingHF|picture|oleObjects|controls|webPublishItems|tableParts|extLst)[\s/>]/;

/** Puts comments and fills on the cells of one sheet; `problems` are those that have a row. */
export async function markSheet(
  editor: PackageEditor,
  part: string,
  problems: readonly Problem[],
  styles: FillStyles | null,
): Promise<void> {
  const notes = new Map<string, string>();
  const shades: Shades = new Map();
  for (const problem of problems) {
    const letters = problem.column ?? 'A';
    const cell = `${letters}${problem.row}`;
    notes.set(cell, notes.has(cell) ? `${notes.get(cell)}\n${problem.detail}` : problem.detail);
    const row = shades.get(problem.row!) ?? new Map<number, Shade>();
    const column = columnOf(cell);
    if (problem.severity !== 'notice' || !row.has(column))
      row.set(column, problem.severity === 'notice' ? 'notice' : 'not-used');
    shades.set(problem.row!, row);
  }
  const plain = await editor.read(part);
  const xml = styles ? shadeCells(plain, shades, (base, shade) => styles.styleFor(base, shade)) : plain;
  const relations = await editor.relations(part);
  const comments = relations.find((relation) => relation.type === 'comments')?.target;
  const drawingId = /<(?:\w+:)?legacyDrawing\s[^>]*?:id="([^"]+)"/.exec(xml)?.[1];
  const drawing = relations.find((relation) => relation.id === drawingId)?.target;

  const added = addComments(comments ? await editor.read(comments) : null, notes);
  const commentsPart = comments ?? editor.freeName('xl/comments', '.xml');
  editor.write(commentsPart, added.xml);
  const drawingPart = drawing ?? editor.freeName('xl/drawings/vmlDrawing', '.vml');
  const firstId = Number(/\d+/.exec(drawingPart)?.[0] ?? 0);
  editor.write(drawingPart, addBoxes(drawing ? await editor.read(drawing) : null, added.fresh, firstId));
  if (!comments) {
    await editor.declare(commentsPart, COMMENTS_TYPE);
    await editor.relate(part, 'comments', commentsPart);
  }
  if (drawing) return editor.write(part, xml);
  await editor.declare(drawingPart, DRAWING_TYPE);
  const id = await editor.relate(part, 'vmlDrawing', drawingPart);
  editor.write(part, insertBoxes(xml, id));
}

function insertBoxes(xml: string, id: string): string {
  const prefix = prefixOf(xml, 'worksheet');
  const end = xml.lastIndexOf(`</${prefix}worksheet>`);
  const dataEnd = Math.max(0, xml.lastIndexOf(`</${prefix}sheetData>`));
  const next = AFTER_BOXES.exec(xml.slice(dataEnd));
  const at = next ? dataEnd + next.index : end;
  return `${xml.slice(0, at)}<${prefix}legacyDrawing xmlns:r="${OFFICE}" r:id="${escapeXml(id)}"/>${xml.slice(at)}`;
}
