import { readFileSync } from 'node:fs';
import { Workbook } from 'exceljs';
import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { createSeededPlant } from '../../support/browser-plant';
import { SetUpPage } from '../pages/set-up.page';
import { SignInPage } from '../pages/sign-in.page';

describe('the set-up as a workbook', () => {
  let trial: Trial;
  let page: Page;
  let setUp: SetUpPage;
  let whole: Buffer;
  beforeAll(async () => {
    trial = await Trial.start(createSeededPlant);
    page = await trial.open();
    setUp = new SetUpPage(page);
    await page.goto('/');
    await new SignInPage(page).signIn('admin');
    await setUp.open();
    await setUp.part('Workbook');
  }, 180_000);
  afterAll(() => trial?.close());

  async function edited(edit: (book: Workbook) => void): Promise<Buffer> {
    const book = new Workbook();
    await book.xlsx.load(whole as unknown as ArrayBuffer);
    edit(book);
    return Buffer.from(await book.xlsx.writeBuffer());
  }
  const drop = (name: string, buffer: Buffer) =>
    page
      .getByLabel(/Drop the set-up’s workbook here/)
      .setInputFiles({ name, buffer, mimeType: 'application/octet-stream' });

  test('is downloaded, and says what is there already when it comes back', async () => {
    const coming = page.waitForEvent('download');
    await setUp.press('Download the workbook');
    const download = await coming;
    expect(download.suggestedFilename()).toMatch(/^Set-up of .*\.xlsx$/);
    whole = readFileSync(await download.path());
    await drop('same.xlsx', whole);
    await page.getByText('same.xlsx says what is there already: nothing changes.').waitFor();
  });

  test('shows problems by their cells, and offers nothing to apply', async () => {
    const bytes = await edited((book) => {
      book.getWorksheet('Characteristics')!.getCell('C2').value = 'a hundredth';
      book.getWorksheet('Channels')!.getCell('E2').value = 'BG-999';
    });
    await drop('broken.xlsx', bytes);
    await setUp.row('Problems', 'Characteristics, C2').waitFor();
    expect(await setUp.row('Problems', 'Channels, E2').innerText()).toContain('"BG-999" is not on the sheet Gauges.');
    expect(await page.getByRole('button', { name: 'Apply the workbook' }).count()).toBe(0);
  });

  test('says what would change, and is applied as a whole', async () => {
    const bytes = await edited((book) => {
      const lines = book.getWorksheet('Lines')!;
      lines.getCell(lines.actualRowCount + 1, 1).value = 'Slitter 9';
      book.addWorksheet('Notes').addRow(['for Ines']);
    });
    await drop('more.xlsx', bytes);
    await page.getByText('more.xlsx would add or change 1 row.').waitFor();
    await page.getByText('Line "Slitter 9" is added.').waitFor();
    await setUp.row('Passed over or doubtful', 'Notes').waitFor();
    await setUp.press('Apply the workbook');
    await page.getByText('more.xlsx was applied: 1 row added or changed.').waitFor();
    await setUp.part('Lines and shifts');
    await setUp.row('Lines', 'Slitter 9').waitFor();
  });
});
