import { columnLetters, columnOf } from '../container/cell-names';
import type { Shade } from './fill-styles';
import { getAttribute, setAttribute } from './xml-edit';

/** Shades by row and column number. */
export type Shades = Map<number, Map<number, Shade>>;
export type StyleFor = (base: number, shade: Shade) => number;

/** Gives cells of a sheet's XML another style; cells that are not there yet are put in. Other text stays untouched. */
export function shadeCells(xml: string, shades: Shades, styleFor: StyleFor): string {
  const pieces: string[] = [];
  const rows = /<(\w+:)?row(?=[\s/>])([^>]*)>/g;
  let done = 0;
  let number = 0;
  for (let match = rows.exec(xml); match; match = rows.exec(xml)) {
    const [tag, prefix = '', inside] = match;
    number = Number(getAttribute(inside, 'r') ?? number + 1);
    const cells = shades.get(number);
    if (!cells || inside.endsWith('/')) continue;
    const start = match.index + tag.length;
    const end = xml.indexOf(`</${prefix}row>`, start);
    pieces.push(xml.slice(done, start), shadeRow(xml.slice(start, end), prefix, number, cells, styleFor));
    done = end;
    rows.lastIndex = end;
  }
  return [...pieces, xml.slice(done)].join('');
}

function shadeRow(body: string, prefix: string, row: number, cells: Map<number, Shade>, styleFor: StyleFor): string {
  const waiting = [...cells.keys()].sort((a, b) => a - b);
  const pieces: string[] = [];
  const insertUpTo = (limit: number): void => {
    while (waiting.length > 0 && waiting[0] < limit) {
      const at = waiting.shift()!;
      pieces.push(`<${prefix}c r="${columnLetters(at)}${row}" s="${styleFor(0, cells.get(at)!)}"/>`);
    }
  };
  const tags = /<(?:\w+:)?c(?=[\s/>])([^>]*)>/g;
  let done = 0;
  let column = 0;
  for (let match = tags.exec(body); match && waiting.length > 0; match = tags.exec(body)) {
    const [tag, inside] = match;
    const name = getAttribute(inside, 'r');
    column = name ? columnOf(name) : column + 1;
    if (column < waiting[0]) continue;
    pieces.push(body.slice(done, match.index));
    done = match.index;
    insertUpTo(column);
    if (waiting[0] !== column) continue;
    waiting.shift();
    const style = styleFor(Number(getAttribute(inside, 's') ?? 0), cells.get(column)!);
    pieces.push(`<${prefix}c${setAttribute(inside, 's', style)}>`);
    done = match.index + tag.length;
  }
  pieces.push(body.slice(done));
  insertUpTo(Infinity);
  return pieces.join('');
}
