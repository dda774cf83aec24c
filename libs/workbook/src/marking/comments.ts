import { columnOf } from '../container/cell-names';
import { escapeXml, insertBeforeEnd, prefixOf } from './xml-edit';

const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const EMPTY_COMMENTS = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n<comments xmlns="${MAIN}"><authors></authors><commentList></commentList></comments>`;
const EMPTY_DRAWING =
  '<xml xmlns:v="urn:schemas-microsoft-com:vml" xmlns:o="urn:schemas-microsoft-com:office:office" xmlns:x="urn:schemas-microsoft-com:office:excel"></xml>';

/** Comments by cell name. */
export type Notes = ReadonlyMap<string, string>;

/**
 * Adds comments to a sheet's comments part, or makes one. A cell that has a comment keeps it, with the new text below.
 *
 * @returns the part, and the cells that had no comment and so need a box to show theirs in
 */
export function addComments(existing: string | null, notes: Notes): { xml: string; fresh: string[] } {
  let xml = existing ?? EMPTY_COMMENTS;
  const p = prefixOf(xml, 'comments');
  const author = xml.match(new RegExp(`<${p}author[\\s/>]`, 'g'))?.length ?? 0;
  const run = (text: string): string => `<${p}r><${p}t xml:space="preserve">${escapeXml(text)}</${p}t></${p}r>`;
  const taken = new Set([...xml.matchAll(/<(?:\w+:)?comment\s[^>]*?ref="([^"]+)"/g)].map(([, ref]) => ref));
  const fresh = [...notes.keys()].filter((cell) => !taken.has(cell));
  if (fresh.length < notes.size) {
    xml = xml.replace(
      new RegExp(`(<${p}comment\\s[^>]*?ref="([^"]+)"[\\s\\S]*?)(</${p}text>)`, 'g'),
      (whole, start: string, ref: string, end: string) =>
        notes.has(ref) ? `${start}${run(`\n${notes.get(ref)}`)}${end}` : whole,
    );
  }
  const added = fresh.map(
    (cell) =>
      `<${p}comment ref="${cell}" authorId="${author}"><${p}text>${run(notes.get(cell)!)}</${p}text></${p}comment>`,
  );
  xml = insertBeforeEnd(xml, 'authors', `<${p}author>Ebbline</${p}author>`);
  return { xml: insertBeforeEnd(xml, 'commentList', added.join('')), fresh };
}

/** Adds the boxes in which Excel shows comments, hidden until the cell is pointed at, to a drawing part, or makes one. */
export function addBoxes(existing: string | null, cells: readonly string[], firstId: number): string {
  const type = `ebblineNote${firstId}`;
  const head = `<v:shapetype id="${type}" coordsize="21600,21600" o:spt="202" path="m,l,21600r21600,l21600,xe"><v:stroke joinstyle="miter"/><v:path gradientshapeok="t" o:connecttype="rect"/></v:shapetype>`;
  const boxes = cells.map((cell, index) => {
    const [column, row] = [columnOf(cell) - 1, Number(/\d+$/.exec(cell)?.[0]) - 1];
    const anchor = [column + 1, 15, row, 2, column + 5, 15, row + 5, 4].join(', ');
    return `<v:shape id="ebblineNote${firstId}_${index}" type="#${type}" style="position:absolute;width:260pt;height:75pt;z-index:${index + 1};visibility:hidden" fillcolor="#fbf7e8" o:insetmode="auto"><v:fill color2="#fbf7e8"/><v:textbox style="mso-direction-alt:auto"><div style="text-align:left"></div></v:textbox><x:ClientData ObjectType="Note"><x:MoveWithCells/><x:SizeWithCells/><x:Anchor>${anchor}</x:Anchor><x:AutoFill>False</x:AutoFill><x:Row>${row}</x:Row><x:Column>${column}</x:Column></x:ClientData></v:shape>`;
  });
  return insertBeforeEnd(existing ?? EMPTY_DRAWING, 'xml', head + boxes.join(''));
}
