import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { createTestDatabase } from '../../support/database';
import { takePictures } from '../../support/pictures';
import { FILLER, fillerWorkbook, lotNumber, readingsOf } from '../factories/filler-workbook';
import { FramePage } from '../pages/frame.page';
import { HoldPage } from '../pages/hold.page';
import { IntakePage } from '../pages/intake.page';
import { LinkPage } from '../pages/link.page';
import { PeoplePage } from '../pages/people.page';
import { PlanPage } from '../pages/plan.page';
import { SetUpPage } from '../pages/set-up.page';
import { SummaryPage } from '../pages/summary.page';

const PLANT = 'Várzea Clara';
const LINE = 'Filler 3';
const PASSWORD = 'jabuti under the mango tree';
const at = (person: string): string => `${person}@varzea-clara.example`;
const PEOPLE = {
  engineer: { name: 'Marília Teixoto', email: at('marilia'), role: 'quality engineer', lines: [LINE] },
  manager: { name: 'Otávio Lindanor', email: at('otavio'), role: 'quality manager', lines: [] },
  lead: { name: 'Rute Camarinha', email: at('rute'), role: 'line lead', lines: [LINE] },
  director: { name: 'Heitor Vasquim', email: at('heitor'), role: 'plant director', lines: [] },
};
/** Sunday, 8 March 2026, at the plant, which is three hours behind universal time: 13:45, and 22:15, when that has Monday already. */
const SUNDAY_NOON = '2026-03-08T16:45:00Z';
const SUNDAY_NIGHT = '2026-03-09T01:15:00Z';
/** 06:02 at the plant. */
const MONDAY_MORNING = '2026-03-09T09:02:00Z';

/** The night from Wednesday to Thursday, and Sunday from 18:00 on. */
const [EARLIER_LIGHT, LIGHT] = [17, 40];

let trial: Trial;
let administrator: Page;
const plain = (text: string): string => text.replaceAll('\u202f', ' ');
const windows = {} as Record<keyof typeof PEOPLE, Page>;
beforeAll(async () => {
  trial = await Trial.start(createTestDatabase, { at: SUNDAY_NOON });
  administrator = await trial.open();
}, 180_000);
afterAll(() => trial?.close());

describe('from nothing', () => {
  test('the printed link lets somebody begin, and makes the first plant', async () => {
    const printed = await trial.printFirstLink();
    const link = /http\S+\/invitation\/[\w-]+/.exec(printed)?.[0] ?? `no link in ${printed}`;
    await administrator.goto(link);
    await new FramePage(administrator).heading('Begin with Ebbline').waitFor();
    await takePictures(administrator, '01-begin');
    const begin = new LinkPage(administrator);
    await begin.introduce('Ignácio Bandarra', at('ignacio'));
    await begin.choose(PASSWORD);
    await administrator.getByRole('button', { name: 'Make the plant' }).waitFor();
    await takePictures(administrator, '02-first-plant');
    const setUp = new SetUpPage(administrator);
    await setUp.type({ Name: PLANT, 'Time zone': 'America/Sao_Paulo', Currency: 'BRL' });
    await setUp.press('Make the plant');
    await new FramePage(administrator).heading(`Set-up of ${PLANT}`).waitFor();
    await setUp.missing.waitFor();
    expect(await setUp.missing.getByRole('listitem').count()).toBe(8);
    await takePictures(administrator, '03-set-up');
  });

  test('its set-up is made on its pages', async () => {
    const setUp = new SetUpPage(administrator);
    await setUp.part('Lines and shifts');
    await setUp.add('Add a line', { Name: LINE }, 'Add the line');
    await setUp.add('State the shifts', { 'From which day on': '2026-03-01' }, 'State these shifts');
    await takePictures(administrator, '04-lines');
    await setUp.part('Products');
    await setUp.add(
      'Add a product',
      { Code: FILLER.product, Name: 'Pitanga nectar, 500 g', 'Value of one unit': '0.45' },
      'Add the product',
    );
    await takePictures(administrator, '05-products');
    await setUp.part('Characteristics');
    await setUp.add(
      'Add a characteristic',
      { Name: 'Fill mass', Unit: 'g', Resolution: '0.1' },
      'Add the characteristic',
    );
    await setUp.part('Gauges');
    await setUp.add('Add a gauge', { 'Asset number': 'LC-58', Kind: 'load cell' }, 'Add the gauge');
    await setUp.part('Channels');
    await setUp.add(
      'Add a channel',
      { Name: FILLER.channel, Position: 'discharge', 'Serves since': '2026-03-01' },
      'Add the channel',
    );
    await takePictures(administrator, '06-channels');
    await setUp.part('Specifications');
    await setUp.add(
      `Propose a specification of ${FILLER.product}`,
      {
        'Nominal value': String(FILLER.nominal),
        'Lower specification limit': '485',
        'Upper specification limit': '515',
        'In force from': '2026-03-01',
        Reason: 'Fill sheet 7 of the bottling hall.',
      },
      'Propose this specification',
    );
    await takePictures(administrator, '07-specification');
  });

  test('people come by mail', async () => {
    const people = new PeoplePage(administrator);
    await people.open();
    await new FramePage(administrator).heading('People').waitFor();
    for (const person of Object.values(PEOPLE)) await people.invite(person);
    await takePictures(administrator, '08-people');
    for (const key of Object.keys(PEOPLE) as (keyof typeof PEOPLE)[]) {
      const { email, name } = PEOPLE[key];
      const mail = await trial.mailTo(email, /invitation/);
      const page = (windows[key] = await trial.open());
      await page.goto(/http\S+\/invitation\/[\w-]+/.exec(mail.text)?.[0] ?? `no link in ${mail.text}`);
      await new FramePage(page).heading('Welcome to Ebbline').waitFor();
      if (key === 'engineer') await takePictures(page, '09-invitation');
      await new LinkPage(page).choose(PASSWORD);
      await new FramePage(page).heading('Desk').waitFor();
      expect(await new FramePage(page).person.innerText()).toBe(name);
      await takePictures(page, `10-desk-${key}`);
    }
  });

  test('a second person approves the specification, and nothing is missing any more', async () => {
    const { manager } = windows;
    await manager.reload();
    await manager.getByRole('link', { name: /^Read the specification: A specification of PITANGA-500/ }).click();
    const setUp = new SetUpPage(manager);
    await setUp.approve(`${FILLER.channel} on ${FILLER.product}`, 1, PASSWORD);
    await setUp.row(`Specifications of ${FILLER.product}`, '1, since 1 Mar 2026').waitFor();
    await takePictures(manager, '11-approved-specification');
    await administrator.reload();
    await new SetUpPage(administrator).open();
    await administrator.getByText(`Nothing is missing: ${PLANT} is ready for its first workbook.`).waitFor();
    await takePictures(administrator, '12-ready');
  });

  test('the first workbook tells of its lots by the clock of the plant, and is taken in', async () => {
    const { engineer } = windows;
    const [frame, intake] = [new FramePage(engineer), new IntakePage(engineer)];
    await engineer.reload();
    await frame.to('Intake');
    await frame.heading(`Intake, ${LINE}`).waitFor();
    await takePictures(engineer, '13-intake');
    await intake.upload({
      name: 'filler-3.xlsx',
      bytes: await fillerWorkbook({ from: 1, to: 38, light: EARLIER_LIGHT }),
    });
    await frame.heading('filler-3.xlsx: needs attention').waitFor();
    await takePictures(engineer, '14-recognised');
    expect(await intake.lots.getByRole('row').count()).toBe(1 + 38);
    expect(
      await intake.lots
        .getByRole('row')
        .filter({ hasText: lotNumber(EARLIER_LIGHT) })
        .innerText(),
    ).toMatch(/4 Mar 22:00\s+5 Mar 01:00/);
    await intake.confirm.click();
    await frame.heading('filler-3.xlsx: scored').waitFor();
    await takePictures(engineer, '15-first-intake');
    expect(await intake.accounting.innerText()).toContain('380 rows read = 380 used');
    expect(await frame.main.innerText()).toContain('38 lots are not scored in Fill mass: no plan is in force');
  });

  test('the engineer proposes how the channel is judged, the manager approves it', async () => {
    const { engineer, manager } = windows;
    await engineer.getByRole('link', { name: `Propose a plan for ${FILLER.channel}` }).click();
    const plan = new PlanPage(engineer);
    await plan.propose('First plan, from a week of lots.');
    await takePictures(engineer, '16-proposed');
    expect(await plan.proposed.innerText()).toContain(`Lot ${lotNumber(EARLIER_LIGHT)} was left out`);
    expect(await engineer.getByRole('button', { name: /^Approve/ }).count()).toBe(0);
    await new FramePage(manager).to('Desk');
    await manager.getByRole('link', { name: /^Read plan 1: Plan 1 for Fill mass/ }).click();
    await takePictures(manager, '17-to-approve');
    await new PlanPage(manager).approve(PASSWORD);
    await takePictures(manager, '18-approved');
  });

  test('the light lot of Sunday evening is held, and the line is mailed', async () => {
    await trial.moveTo(SUNDAY_NIGHT);
    const { engineer } = windows;
    const [frame, intake] = [new FramePage(engineer), new IntakePage(engineer)];
    await engineer.reload();
    await frame.to('Intake');
    await takePictures(engineer, '19-intakes');
    await intake.upload({ name: 'sunday.xlsx', bytes: await fillerWorkbook({ from: 39, to: 40, light: LIGHT }) });
    await frame.heading('sunday.xlsx: needs attention').waitFor();
    await intake.confirm.click();
    await frame.heading('sunday.xlsx: scored').waitFor();
    await takePictures(engineer, '20-second-intake');
    expect(await intake.cameOfIt()).toMatch(/^2 lots scored on 8 Mar 22:1\d; 1 is held:/);
    await intake.openHold(lotNumber(LIGHT));
    const hold = new HoldPage(engineer);
    await hold.decision.waitFor();
    await takePictures(engineer, '21-hold');
    const mean = (readingsOf(LIGHT, true).reduce((sum, value) => sum + value) / 10).toFixed(2);
    expect(await hold.reason.innerText()).toMatch(/^Lot VC-040 lies [\d.]+\u202fσ below its baseline in fill mass/);
    expect(await hold.evidence.innerText()).toContain(mean);
    expect(await frame.main.innerText()).toContain('made 8 Mar 18:00 to 21:00');
    const { text } = await trial.mailTo(PEOPLE.lead.email, /^Lot VC-040 held/);
    for (const fact of [
      `Lot mean as measured: ${mean} g`,
      'Gauge: LC-58',
      '8 Mar 2026, 18:00',
      new URL(engineer.url()).pathname,
    ])
      expect(plain(text)).toContain(fact);
    for (const { email } of [PEOPLE.engineer, PEOPLE.manager]) await trial.mailTo(email, /^Lot VC-040 held/);
    expect(trial.recipientsOf(/^Lot VC-040 held/)).toEqual(['marilia', 'otavio', 'rute'].map(at));
  });

  test('on Monday at six the director is told of the week, and again when the manager asks for it', async () => {
    await trial.moveTo(MONDAY_MORNING);
    const told = plain((await trial.mailTo(PEOPLE.director.email, /^Várzea Clara, 2 to 8 Mar 2026: /)).text);
    for (const fact of ['VC-040', '12 000 bottles, 5 400 BRL', 'Scored: 40', 'LC-58', '/holds/'])
      expect(told).toContain(fact);
    const { manager } = windows;
    await manager.goto('/');
    await takePictures(manager, '22-monday');
    const [frame, summary] = [new FramePage(manager), new SummaryPage(manager)];
    await frame.to('Summary');
    await summary.weeks.first().click();
    await frame.heading('Várzea Clara, week of 2 to 8 Mar 2026').waitFor();
    await takePictures(manager, '23-week');
    expect(plain(await frame.sheet('Lots by line').innerText())).toContain('12 000');
    await summary.makeAnewAndSend();
    await manager.getByText(/^Version 2, made Mon 9 Mar 2026, 06:0\d/).waitFor();
    expect(plain(await summary.headline.innerText())).toContain('1 lot');
    expect(plain((await trial.mailTo(PEOPLE.director.email, /version 2/)).text)).toContain('5 400 BRL');
    expect(trial.recipientsOf(/2 to 8 Mar 2026: /)).toEqual(Array(2).fill(PEOPLE.director.email));
  });

  test('nothing fails on the way but tokens that grew too old overnight', () => {
    expect(trial.troubles.filter((trouble) => !/^GET \S+ 401$/.test(trouble))).toEqual([]);
  });
});
