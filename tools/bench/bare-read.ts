import ExcelJS from 'exceljs';

/** The yardstick: exceljs's streaming read of every cell, and nothing else. Returns seconds. */
export async function bareRead(path: string): Promise<number> {
  const begun = performance.now();
  const reader = new ExcelJS.stream.xlsx.WorkbookReader(path, {
    worksheets: 'emit',
    sharedStrings: 'cache',
    styles: 'cache',
    hyperlinks: 'ignore',
    entries: 'emit',
  });
  let cells = 0;
  for await (const sheet of reader) for await (const row of sheet) row.eachCell(() => cells++);
  if (cells === 0) throw new Error('the yardstick read nothing');
  return (performance.now() - begun) / 1000;
}
