/** Excel's last column, XFD. */
export const MAX_COLUMN = 16_384;

/** Letters of a column by its number from 1 (1 is A, 27 is AA). */
export function columnLetters(column: number): string {
  let letters = '';
  for (let rest = column; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  }
  return letters;
}

/** Number of the column of a cell's name ("AB12" is 28); 0 when it is no cell's name. */
export function columnOf(name: string): number {
  let column = 0;
  for (let index = 0; index < name.length; index += 1) {
    const code = name.charCodeAt(index);
    if (code >= 65 && code <= 90) column = column * 26 + code - 64;
    else return code >= 48 && code <= 57 && column <= MAX_COLUMN ? column : 0;
  }
  return 0;
}
