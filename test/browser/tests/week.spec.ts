import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { FramePage } from '../pages/frame.page';
import { SignInPage } from '../pages/sign-in.page';
import { SummaryPage } from '../pages/summary.page';

const SHEETS = [
  'Lots by line',
  /^Held and undecided at the week’s end/,
  'What removing the slow movement changed',
  'Slow movement within its allowance',
  'Not scored, and why',
  'Intakes that need attention',
];

let trial: Trial;
beforeAll(async () => {
  trial = await Trial.start();
}, 240_000);
afterAll(() => trial?.close());

describe('the week that has passed', () => {
  let manager: Page;

  test('is summed up by itself; its page says first what must be known', async () => {
    manager = await trial.open();
    await manager.goto('/');
    await new SignInPage(manager).signIn('manager');
    const [frame, summary] = [new FramePage(manager), new SummaryPage(manager)];
    await frame.to('Summary');
    await frame.heading('Weekly summaries').waitFor();
    await summary.weeks.first().click();
    await frame.heading(/^Marrowby Works, week of /).waitFor();
    expect(await summary.headline.innerText()).toMatch(/\.$/);
    for (const title of SHEETS) expect(await frame.sheet(title).count()).toBe(1);
    expect(await frame.sheet('Lots by line').innerText()).toContain('Coater 2');
  });

  test('is made anew as a version of its own, the first one is kept', async () => {
    const summary = new SummaryPage(manager);
    expect(await summary.version.innerText()).toMatch(/^Version 1, made /);
    await summary.makeAnew();
    await manager.getByText(/^Version 2, made /).waitFor();
    await manager.getByRole('link', { name: 'Version 1' }).click();
    await manager.getByText(/^Version 1, made /).waitFor();
  });

  test('comes as a workbook', async () => {
    expect(await new SummaryPage(manager).downloadWorkbook()).toMatch(/\.xlsx$/);
  });

  test('is read on a phone without scrolling sideways, and by those alone who may', async () => {
    const phone = await trial.open({ width: 390, hasTouch: true });
    await phone.goto(new URL(manager.url()).pathname);
    await new SignInPage(phone).signIn('director');
    await new SummaryPage(phone).headline.waitFor();
    expect(await new FramePage(phone).isWiderThanWindow()).toBe(false);
    expect(await phone.getByRole('button', { name: 'Make it anew', exact: true }).count()).toBe(0);
    const lead = await trial.open();
    await lead.goto('/');
    await new SignInPage(lead).signIn('lead');
    await new FramePage(lead).heading('Desk').waitFor();
    expect(await lead.getByRole('link', { name: 'Summary' }).count()).toBe(0);
  });

  test('nothing fails on the way', () => {
    expect(trial.troubles).toEqual([]);
  });
});
