import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { createSeededPlant } from '../../support/browser-plant';
import { FramePage } from '../pages/frame.page';
import { SetUpPage } from '../pages/set-up.page';
import { SignInPage } from '../pages/sign-in.page';

let trial: Trial;
let page: Page;
let setUp: SetUpPage;
beforeAll(async () => {
  trial = await Trial.start(createSeededPlant);
  page = await trial.open();
  setUp = new SetUpPage(page);
  await page.goto('/');
  await new SignInPage(page).signIn('admin');
  await setUp.open();
}, 180_000);
afterAll(() => trial?.close());

const picture = async (window: Page, name: string) => {
  if (process.env.PICTURES) await window.screenshot({ path: `${process.env.PICTURES}/${name}.png`, fullPage: true });
};
const focused = (window: Page) => window.evaluate('document.activeElement.textContent');

describe('what changes at a plant that is set up', () => {
  test('a spare gauge serves a channel since an instant, and the one before it until then', async () => {
    await setUp.part('Gauges');
    await setUp.add('Add a gauge', { 'Asset number': 'SP-900', Kind: 'spare gauge' }, 'Add the gauge');
    await setUp.part('Channels');
    const opens = page.getByRole('button', { name: /^Change the gauge of .* on Coater 2$/ }).first();
    const label = (await opens.getAttribute('aria-label'))!;
    await opens.click();
    await page.getByRole('combobox', { name: 'Gauge', exact: true }).selectOption({ label: 'SP-900, spare gauge' });
    await setUp.type({ 'Serves since': '2026-03-01', Time: '06:00' });
    const sends = label.replace(' on Coater 2', '');
    await setUp.press(sends);
    await page.getByRole('button', { name: sends, exact: true }).waitFor({ state: 'detached' });
    await setUp.row('Channels', 'SP-900').waitFor();
    expect(await setUp.row('Channels', 'SP-900').innerText()).toMatch(/SP-900, since 1 Mar 2026[^]*until 1 Mar 2026/);
  });

  test('a channel is retired: its line lists it with the day, and its record opens', async () => {
    const button = page.getByRole('button', { name: /^Retire / }).first();
    const label = (await button.getAttribute('aria-label'))!;
    await button.click();
    await page.getByRole('button', { name: label }).last().click();
    await page.getByRole('button', { name: label.replace('Retire', 'Bring back') }).waitFor();
    const line = label.split(' on ').pop() as string;
    const frame = new FramePage(page);
    await frame.to('Channels');
    await frame.heading(/^Channels of /).waitFor();
    if (!(await frame.heading(`Channels of ${line}`).isVisible())) await frame.otherLine(line);
    await frame.heading(`Channels of ${line}`).waitFor();
    const row = page.getByRole('row', { name: /retired since/ });
    await row.getByRole('link').first().click();
    await page.getByText(/^Retired since/).waitFor();
  });

  test('a product is retired and brought back', async () => {
    await setUp.open();
    await setUp.part('Products');
    const button = page.getByRole('button', { name: /^Retire / }).first();
    const label = (await button.getAttribute('aria-label'))!;
    const code = label.replace('Retire ', '');
    await button.click();
    await page.getByRole('button', { name: label, exact: true }).last().click();
    const back = page.getByRole('button', { name: `Bring back ${code}`, exact: true });
    await back.click();
    await back.last().click();
    await page.getByRole('button', { name: label, exact: true }).waitFor();
  });

  test('a proposed specification is withdrawn, and what is in force stays', async () => {
    await setUp.part('Specifications');
    const opens = page.getByRole('button', { name: /^Propose a new version of / }).first();
    const what = (await opens.getAttribute('aria-label'))!.replace('Propose a new version of ', '');
    await opens.click();
    await setUp.type({ 'In force from': '2026-04-01', Reason: 'A tighter drawing.' });
    await setUp.press('Propose this specification');
    await setUp.press(`Withdraw the proposal of ${what}`);
    await setUp.press('Withdraw the proposal');
    await page.getByRole('button', { name: `Propose a new version of ${what}` }).waitFor();
    expect(await page.getByText('A tighter drawing.').count()).toBe(0);
  });

  test('an earlier version of a specification can be read', async () => {
    const opens = page.getByRole('button', { name: /^Propose a new version of / }).first();
    const what = (await opens.getAttribute('aria-label'))!.replace('Propose a new version of ', '');
    await opens.click();
    await setUp.type({ 'In force from': '2026-03-01', Reason: 'A tighter drawing.' });
    await setUp.press('Propose this specification');
    await page.getByRole('button', { name: `Withdraw the proposal of ${what}` }).waitFor();
    const manager = await trial.open();
    await manager.goto('/');
    await new SignInPage(manager).signIn('manager');
    const theirs = new SetUpPage(manager);
    await theirs.open();
    await theirs.part('Specifications');
    await theirs.approve(what, 2);
    await manager.getByText(`One earlier version of ${what.split(' on ')[0]}`).click();
    await manager.getByText(/^Version 1, from .* until \w{3} 1 Mar 2026/).waitFor();
    await manager.context().close();
  });

  test('the form of a person takes the focus and gives it back; an invitation is withdrawn with the roles', async () => {
    await page.getByRole('banner').getByRole('link', { name: 'People' }).click();
    await setUp.invite('wenna@marrowby.example', 'Wenna Pascoe', 'quality engineer');
    await setUp.press('Change Wenna Pascoe');
    expect(await page.evaluate('document.activeElement.type')).toBe('checkbox');
    await page.getByRole('region', { name: 'Wenna Pascoe' }).getByRole('button', { name: 'Close' }).click();
    expect(await focused(page)).toBe('Change');
    await setUp.press('Change Wenna Pascoe');
    await page
      .getByRole('region', { name: 'Wenna Pascoe' })
      .getByRole('checkbox', { name: 'quality engineer' })
      .uncheck();
    await setUp.press('Keep these roles');
    await setUp.press('Take Wenna Pascoe out of the plant');
    await setUp.row('People of this plant', 'wenna@marrowby.example').waitFor({ state: 'detached' });
  });

  test('a new password can be seen before it is kept', async () => {
    await new FramePage(page).person.click();
    const field = page.getByLabel('New password');
    await field.fill('herring gulls over the weir');
    await setUp.press('Show the password');
    expect(await field.getAttribute('type')).toBe('text');
    await setUp.press('Hide the password');
    expect(await field.getAttribute('type')).toBe('password');
  });

  test('a line computer gets a token that is shown once, and loses it again', async () => {
    const engineer = await trial.open();
    await engineer.goto('/profile');
    await new SignInPage(engineer).signIn('engineer');
    await engineer.getByText('You have no API token here.').waitFor();
    const form = engineer.getByRole('region', { name: 'API tokens at Marrowby Works' });
    await form.getByRole('button', { name: 'Make an API token' }).click();
    await form.getByText('Say where the token is used').waitFor();
    await form.getByLabel('Where the new token is used').fill('Line computer of Coater 2');
    await form.getByRole('button', { name: 'Make an API token' }).click();
    await form.getByText('It is shown only this once').waitFor();
    const token = await form.getByLabel('The new token: Line computer of Coater 2').inputValue();
    expect(token).toMatch(/^ebb_[\w-]{43}$/);
    const look = () =>
      fetch(`${trial.url}/api/lines/1/intakes`, { headers: { authorization: `Bearer ${token}` } }).then(
        ({ status }) => status,
      );
    expect(await look()).toBe(200);
    await engineer.context().grantPermissions(['clipboard-read', 'clipboard-write']);
    await form.getByRole('button', { name: 'Copy the token' }).click();
    await form.getByText('Copied.').waitFor();
    expect(await engineer.evaluate('navigator.clipboard.readText()')).toBe(token);
    await picture(engineer, 'tokens');
    await form.getByRole('button', { name: 'I have copied it' }).click();
    await engineer.reload();
    await form.getByRole('row', { name: /Line computer of Coater 2.*yes/ }).waitFor();
    expect(await engineer.content()).not.toContain(token);
    await form.getByRole('button', { name: 'Revoke Line computer of Coater 2' }).click();
    await form.getByRole('button', { name: 'Revoke this token' }).click();
    await form.getByRole('row', { name: /Line computer of Coater 2.*revoked/ }).waitFor();
    expect(await look()).toBe(401);
    await engineer.setViewportSize({ width: 390, height: 844 });
    expect(await new FramePage(engineer).isWiderThanWindow()).toBe(false);
    await engineer.context().close();
  });

  test('the header of an administrator takes two rows on a phone, in both themes', async () => {
    await page.setViewportSize({ width: 390, height: 844 });
    for (const theme of ['Night theme', 'Day theme'] as const) {
      expect((await page.getByRole('banner').boundingBox())?.height).toBeLessThan(90);
      expect(await new FramePage(page).isWiderThanWindow()).toBe(false);
      await picture(page, theme);
      await new FramePage(page).chooseTheme(theme);
    }
    expect(trial.troubles).toEqual([]);
  });

  test('who may not finds a clear page, and no entry that leads there', async () => {
    const mayOpen: Record<string, string[]> = {
      technician: [],
      lead: [],
      engineer: ['audit', 'set-up'],
      manager: ['audit', 'set-up'],
      director: ['audit'],
    };
    const plantPath = (await page.getByRole('banner').getByRole('link', { name: 'Set-up' }).getAttribute('href'))!;
    for (const [who, parts] of Object.entries(mayOpen)) {
      const other = await trial.open();
      await other.goto('/');
      await new SignInPage(other).signIn(who);
      await new FramePage(other).heading('Desk').waitFor();
      for (const part of ['people', 'mails', 'audit', 'set-up']) {
        const path = plantPath.replace('set-up', part);
        const isOpen = parts.includes(part);
        expect([who, part, await other.locator(`header a[href="${path}"]`).count()]).toEqual([
          who,
          part,
          isOpen ? 1 : 0,
        ]);
        if (isOpen || part === 'set-up') continue;
        await other.goto(path);
        await other.getByRole('alert').first().waitFor();
      }
      await other.context().close();
    }
  }, 300_000);
});
