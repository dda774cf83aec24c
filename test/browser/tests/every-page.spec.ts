import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { NEXT_SHIFT, shiftWorkbook } from '../../support/browser-plant';
import { AuditPage } from '../pages/audit.page';
import { FramePage } from '../pages/frame.page';
import { HoldPage } from '../pages/hold.page';
import { IntakePage } from '../pages/intake.page';
import { SignInPage } from '../pages/sign-in.page';

const PHONE = 390;
const DESK = 1440;
/** The demo's first line and channel, and the lot and hold of the shift. */
let paths: Record<string, string>;
let trial: Trial;
let desk: Page;
let phone: Page;

beforeAll(async () => {
  trial = await Trial.start();
  [desk, phone] = [await trial.open({ width: DESK }), await trial.open({ width: PHONE, hasTouch: true })];
  await desk.goto('/');
  await new SignInPage(desk).signIn('engineer');
  paths = await takeTheShiftIn(desk);
}, 240_000);
afterAll(() => trial?.close());

/** Takes the shift in and answers where its pages are. */
async function takeTheShiftIn(page: Page): Promise<Record<string, string>> {
  const [frame, intake] = [new FramePage(page), new IntakePage(page)];
  const here = (): string => new URL(page.url()).pathname;
  await frame.to('Intake');
  await frame.heading(/^Intake/).waitFor();
  const drop = here();
  await intake.upload({ name: 'early.xlsx', bytes: await shiftWorkbook('long', [NEXT_SHIFT]) });
  await intake.confirm.click();
  await frame.heading('early.xlsx: scored').waitFor();
  const workbook = here();
  await intake.openHold('24502');
  await new HoldPage(page).decision.waitFor();
  const hold = here();
  await page.getByRole('link', { name: 'All about the lot' }).click();
  await frame.heading('Lot 24502').waitFor();
  const lot = here();
  await frame.to('Channels');
  await page.getByRole('link', { name: 'Coat weight', exact: true }).click();
  await frame.heading(/^Coat weight/).waitFor();
  const record = here();
  await new AuditPage(page).open();
  const audit = here();
  return {
    desk: '/',
    'drop zone': drop,
    intake: workbook,
    lots: '/lots',
    lot,
    channels: drop.replace('intakes', 'channels'),
    record,
    hold,
    plan: `${record}/plans`,
    audit,
    'no page': '/nowhere',
  };
}

/** Once everything that the page asks for has come. */
async function show(page: Page, path: string): Promise<void> {
  await page.goto(path, { waitUntil: 'networkidle' });
  await page.locator('h1').waitFor();
}

test('on a phone a hold can be read and decided', async () => {
  await phone.goto(paths.hold);
  await new SignInPage(phone).signIn('manager');
  const hold = new HoldPage(phone);
  await hold.reason.waitFor();
  expect(await hold.reason.innerText()).toMatch(/^Lot 24502 lies .* below its baseline in coat weight/);
  expect(await hold.evidence.innerText()).toMatch(/Coat weight[^]*MW-0217/);
  await hold.decide('Release', 'Weighed again on three samples.');
  await hold.signature.waitFor();
  expect(await hold.signature.innerText()).toMatch(/Adaeze Thornbury, .*: released/);
});

describe('no page scrolls sideways', () => {
  test.each([
    ['1440 wide', () => desk],
    ['390 wide', () => phone],
  ])('%s', async (_, window) => {
    const page = window();
    const frame = new FramePage(page);
    const wide: string[] = [];
    for (const [name, path] of Object.entries(paths)) {
      await show(page, path);
      if (await frame.isWiderThanWindow()) wide.push(name);
    }
    expect(wide).toEqual([]);
  });
});

test('the audit tells who took the shift in, what changed, and leaves as a workbook', async () => {
  const audit = new AuditPage(desk);
  await show(desk, paths.audit);
  await audit.find('early.xlsx');
  const confirmed = audit.entry(/confirmed the intake of early\.xlsx/);
  await confirmed.waitFor();
  expect(await audit.changesOf(confirmed)).toMatch(/^state\s+needs attention[^]*queued/);
  expect((await audit.export()).suggestedFilename()).toBe('audit.xlsx');
  await confirmed.getByRole('link', { name: 'early.xlsx' }).click();
  await new FramePage(desk).heading('early.xlsx: scored').waitFor();
});

const ground = (page: Page): Promise<string> =>
  page.evaluate('getComputedStyle(document.documentElement).backgroundColor');
const [PAPER, NIGHT] = ['rgb(237, 242, 238)', 'rgb(16, 23, 26)'];

test('the night theme stays chosen, and the day theme comes back', async () => {
  await show(desk, paths.hold);
  expect(await ground(desk)).toBe(PAPER);
  await new FramePage(desk).chooseTheme('Night theme');
  await show(desk, paths.record);
  expect(await ground(desk)).toBe(NIGHT);
  await new FramePage(desk).chooseTheme('Day theme');
  expect(await ground(desk)).toBe(PAPER);
});

test('where nobody chose, the system does', async () => {
  const page = await trial.open({ colorScheme: 'dark' });
  await page.goto('/');
  await new SignInPage(page).email.waitFor();
  expect(await ground(page)).toBe(NIGHT);
});

test('another line without a reading says so on each of its pages', async () => {
  const frame = new FramePage(desk);
  await show(desk, '/');
  await frame.otherLine('Slurry 3');
  await desk.getByText('No lots yet.').waitFor();
  await frame.to('Intake');
  await desk.getByText('No workbook of Slurry 3 came in yet.').waitFor();
  await frame.to('Lots');
  await frame.heading(/^Lots/).waitFor();
});

test('nothing went wrong in a browser', () => {
  expect(trial.troubles).toEqual([]);
});
