import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { FramePage } from '../pages/frame.page';
import { RecordPage } from '../pages/record.page';
import { SignInPage } from '../pages/sign-in.page';

let trial: Trial;
let page: Page;
let frame: FramePage;
beforeAll(async () => {
  trial = await Trial.start();
  page = await trial.open();
  frame = new FramePage(page);
}, 180_000);
afterAll(() => trial?.close());

describe('signing in', () => {
  test('a wrong password and an unknown person get the same answer', async () => {
    const signIn = new SignInPage(page);
    await page.goto('/lots?line=1');
    const answers: string[] = [];
    for (const person of ['engineer', 'nobody']) {
      await signIn.signIn(person, 'a wrong password');
      await signIn.problem.waitFor();
      answers.push(await signIn.problem.innerText());
      await page.reload();
    }
    expect(answers[0]).toMatch(/^[A-Z].*password.*\.$/);
    expect(answers[1]).toBe(answers[0]);
    expect(trial.troubles.splice(0)).toEqual(Array(2).fill('POST /api/auth/sign-in 401'));
  });

  test('the right one leads to the page that was asked for', async () => {
    await new SignInPage(page).signIn('engineer');
    await frame.heading(/^Lots/).waitFor();
    expect(new URL(page.url()).pathname).toBe('/lots');
    expect(await frame.person.innerText()).toBe('Maren Holloway');
  });

  test('a reload keeps the session', async () => {
    await page.reload();
    await frame.heading(/^Lots/).waitFor();
  });

  test('an address that is none says so inside the frame, and leads back to the desk', async () => {
    await page.goto('/no/such/page');
    await frame.heading('Nothing here').waitFor();
    await page.getByRole('link', { name: 'Go to the desk' }).click();
    await frame.heading('Desk').waitFor();
  });

  test('so does a lot, a hold or an intake that is not there', async () => {
    for (const [path, what] of Object.entries({
      '/lots/999999': 'lot',
      '/holds/999999': 'hold',
      '/intakes/999999': 'intake',
    })) {
      await page.goto(path);
      await page.getByRole('alert').waitFor();
      expect(await page.getByRole('alert').innerText()).toContain(`The ${what} could not be loaded.`);
    }
    expect([...new Set(trial.troubles.splice(0))]).toEqual([
      'GET /api/lots/# 404',
      'GET /api/holds/# 404',
      'GET /api/intakes/# 404',
    ]);
  });
});

describe('by keyboard', () => {
  test('arrow keys walk along the tape, Enter opens the lot', async () => {
    await page.goto('/');
    const lots = frame.tapeLots;
    await lots.last().waitFor();
    expect(await lots.count()).toBe(56);
    await lots.last().focus();
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('ArrowLeft');
    expect(await focused()).toMatch(/^Lot 24498, /);
    await page.keyboard.press('Home');
    expect(await focused()).toMatch(/^Lot 24445, /);
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('Enter');
    await frame.heading('Lot 24446').waitFor();
  });

  test('the record pans by arrows, zooms by + and −, and goes back by 0', async () => {
    await frame.to('Channels');
    await page.getByRole('link', { name: 'Coat weight', exact: true }).click();
    const record = new RecordPage(page);
    await record.panes.waitFor();
    const home = await record.span();
    await record.press('+');
    const near = await record.span();
    await record.press('ArrowLeft');
    const earlier = await record.span();
    expect(new Set([home, near, earlier]).size).toBe(3);
    await page.waitForURL(/[?&]from=\d+/);
    await record.press('ArrowRight');
    await record.press('-');
    await record.press('0');
    expect(await record.span()).toBe(home);
    await page.waitForURL((url) => !url.search.includes('from='));
    expect(await record.figures.getByRole('row').count()).toBeGreaterThan(20);
  });

  const focused = (): Promise<string> => page.evaluate('document.activeElement.getAttribute("aria-label")');
});

test('nothing went wrong in the browser but what was provoked', () => {
  expect(trial.troubles).toEqual([]);
});
