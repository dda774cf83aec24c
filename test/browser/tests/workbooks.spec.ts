import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { NEXT_SHIFT, shiftWorkbook } from '../../support/browser-plant';
import { bomb, hostileFixture, tooManyCells, writeTooLarge } from '../factories/hostile-file';
import { FramePage } from '../pages/frame.page';
import { HoldPage } from '../pages/hold.page';
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
  await new SignInPage(page).signIn('manager');
}, 180_000);
afterAll(() => trial?.close());

describe('workbooks', () => {
  let wide: Buffer;

  test('a column a channel is recognised and scored like a row a reading', async () => {
    wide = await shiftWorkbook('wide', [NEXT_SHIFT]);
    await frame.to('Intake');
    await intake.upload({ name: 'wide.xlsx', bytes: wide });
    await frame.heading('wide.xlsx: needs attention').waitFor();
    await frame.sheet('How it is read: correct it here').waitFor();
    // The line's workbooks had another header on a sheet of this name so far.
    await intake.choose('As recognised now');
    await intake.confirm.click();
    await frame.heading('wide.xlsx: scored').waitFor();
    const held = await intake.outcome.getByRole('listitem').allInnerTexts();
    expect(held.map((sentence) => /^Lot \d+/.exec(sentence)?.[0])).toEqual(['Lot 24502', 'Lot 24504']);
    expect(await intake.accounting.innerText()).toContain('480 rows read = 480 used');
  });

  test('whoever confirmed it decides none of its holds, a quality manager neither', async () => {
    await intake.openHold('24502');
    const hold = new HoldPage(page);
    await hold.decision.waitFor();
    expect(await hold.decision.innerText()).toContain('You confirmed the intake that this hold came from');
    expect(await hold.password.count()).toBe(0);
  });

  test('the same file again says so, and changes nothing', async () => {
    await frame.to('Intake');
    await intake.upload({ name: 'again.xlsx', bytes: wide });
    await frame.heading('again.xlsx: needs attention').waitFor();
    expect(await frame.main.innerText()).toMatch(/The same file came in before: intake \d+, by Adaeze Thornbury/);
    await intake.confirm.click();
    await frame.heading('again.xlsx: scored').waitFor();
    expect(await intake.accounting.innerText()).toContain('480 rows read = 0 used + 480 already there + 0 not used');
    expect(await frame.main.innerText()).toContain('0 readings stored, 560 were there already and changed nothing.');
    expect(await trial.mails(0)).toHaveLength(4);
  });
});

describe('a file that is none of ours is refused in a sentence', () => {
  test.each([
    ['corrupt.xlsx', /damaged|corrupt|cannot be read/i],
    ['empty.xlsx', /empty/],
    ['password-protected.xlsx', /password/],
    ['old-format.xls', /\.xlsx/],
    ['picture.xlsx', /is a picture.*Upload the workbook/],
    ['text.xlsx', /Excel/],
  ])('%s', async (name, sentence) => {
    await refuses(name, hostileFixture(name), sentence);
  });

  test('one that unpacks to far more than it says', async () => {
    await refuses('bomb.xlsx', bomb(), /unpack|MB/);
  });

  test('one with more than 8,000,000 cells', async () => {
    await refuses('cells.xlsx', tooManyCells(), /8,000,000/);
  });

  test('one over 30 MB is not even sent', async () => {
    await frame.to('Intake');
    const path = join(trial.folder, 'large.xlsx');
    await writeTooLarge(path);
    await intake.upload(path);
    await intake.problem.waitFor();
    expect(await intake.problem.innerText()).toMatch(/large\.xlsx is larger than 30 MB\. Split it by shift/);
  });

  test('the list of recent workbooks says of each how it ended', async () => {
    await page.reload();
    await intake.recent.waitFor();
    const rows = await intake.recent.getByRole('row').allInnerTexts();
    expect(rows.filter((row) => row.includes('refused'))).toHaveLength(8);
    expect(rows.find((row) => row.includes('wide.xlsx'))).toContain('scored');
  });
});

test('nothing went wrong in the browser meanwhile', () => {
  expect(trial.troubles).toEqual([]);
});

async function refuses(name: string, bytes: Buffer, sentence: RegExp): Promise<void> {
  await frame.to('Intake');
  await intake.upload({ name, bytes });
  await frame.heading(`${name}: refused`).waitFor();
  expect(await intake.problem.innerText()).toMatch(sentence);
  expect(await intake.confirm.count()).toBe(0);
}
