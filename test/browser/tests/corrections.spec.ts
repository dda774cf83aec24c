import ExcelJS from 'exceljs';
import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { FramePage } from '../pages/frame.page';
import { IntakePage } from '../pages/intake.page';
import { SignInPage } from '../pages/sign-in.page';

let trial: Trial;
let page: Page;
let frame: FramePage;
let intake: IntakePage;
beforeAll(async () => {
  trial = await Trial.start();
  page = await trial.open();
  frame = new FramePage(page);
  intake = new IntakePage(page);
  await page.goto('/');
  await new SignInPage(page).signIn('engineer');
}, 180_000);
afterAll(() => trial?.close());

const ROWS = 6;

/** A laboratory's own workbook: a column under a name that the line does not know, a reading every ten minutes. */
async function labWorkbook(lot: string, startsAt: Date, values: number[]): Promise<Buffer> {
  const book = new ExcelJS.Workbook();
  const sheet = book.addWorksheet('Lab');
  sheet.addRow(['Laboratory of the coating hall']);
  sheet.addRow([]);
  sheet.addRow(['Time', 'Lot', 'Product', 'Mass per area']);
  for (const [index, value] of values.entries()) {
    const at = new Date(startsAt.getTime() + index * 600_000);
    sheet.addRow([at.toISOString(), lot, 'CS-16', value]);
  }
  return Buffer.from(await book.xlsx.writeBuffer());
}
const values = Array.from({ length: ROWS }, (_, index) => 60.1 + index / 10);
/** After all that the plant has taken in. */
const at = (hours: number) => new Date(Date.UTC(2026, 2, 2, 7 + hours));

describe('a workbook with a column that is not known', () => {
  test('is corrected on its own grid and read again', async () => {
    await frame.to('Intake');
    await intake.upload({ name: 'lab.xlsx', bytes: await labWorkbook('24601', at(0), values) });
    await frame.heading('lab.xlsx: needs attention').waitFor();
    expect(await intake.confirm.count()).toBe(0);
    await intake.column('D', 'Lab').selectOption({ label: 'Coat weight' });
    await intake.readAgain.click();
    await intake.confirm.waitFor();
    expect(await intake.accounting.innerText()).toMatch(/^6 rows read = 6 new \+ 0 already there \+ 0 not used/);
    expect(await intake.firstReadings.innerText()).toContain('24601');
    await intake.confirm.click();
    await frame.heading('lab.xlsx: scored').waitFor();
  });

  test('is known by its header from then on', async () => {
    await frame.to('Intake');
    await page.getByRole('table', { name: /^Layouts known of/ }).waitFor();
    await intake.upload({ name: 'lab 2.xlsx', bytes: await labWorkbook('24602', at(2), values) });
    await frame.heading('lab 2.xlsx: needs attention').waitFor();
    await intake.confirm.waitFor();
    expect(await frame.sheet('How it is read: correct it here').innerText()).toContain(
      'read as it was confirmed before',
    );
  });

  test('that corrects a reading lists the change before it is confirmed, and supersedes it', async () => {
    await frame.to('Intake');
    const corrected = values.map((value, index) => (index === 2 ? value + 0.4 : value));
    await intake.upload({ name: 'lab corrected.xlsx', bytes: await labWorkbook('24601', at(0), corrected) });
    await frame.heading('lab corrected.xlsx: needs attention').waitFor();
    const change = page.getByRole('table', { name: 'Readings with another value than the stored one' });
    await change.waitFor();
    expect(await change.innerText()).toMatch(/Lab!D6[\s\S]*24601[\s\S]*60\.3[\s\S]*60\.7/);
    await page.getByLabel('This workbook corrects them', { exact: false }).check();
    await intake.confirm.click();
    await frame.heading('lab corrected.xlsx: scored').waitFor();
    expect(await intake.accounting.innerText()).toContain(
      '6 rows read = 0 used + 1 superseding + 5 already there + 0 not used',
    );
  });

  test('is withdrawn with a reason', async () => {
    await page.getByRole('button', { name: 'Withdraw this intake' }).click();
    await page.getByLabel('Why').fill('The laboratory measured it once more.');
    await page.getByRole('button', { name: 'Withdraw lab corrected.xlsx' }).click();
    await frame.heading('lab corrected.xlsx: withdrawn').waitFor();
    expect(await frame.main.innerText()).toContain('The laboratory measured it once more.');
  });

  test('leaves no trouble in the console', () => {
    expect(trial.troubles).toEqual([]);
  });
});
