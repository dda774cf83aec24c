import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { createSeededPlant } from '../../support/browser-plant';
import { FramePage } from '../pages/frame.page';
import { SignInPage } from '../pages/sign-in.page';

const FIRST = 'herring gulls over the weir';
const SECOND = 'three kilns and a quiet pond';
let trial: Trial;
let administrator: Page;
let newcomer: Page;
beforeAll(async () => {
  trial = await Trial.start(createSeededPlant);
  [administrator, newcomer] = [await trial.open(), await trial.open({ width: 390 })];
}, 180_000);
afterAll(() => trial?.close());

/** The link in the newest of so many mails. */
async function linkIn(count: number, path: string): Promise<string> {
  const mail = (await trial.mails(count))[count - 1];
  return new RegExp(`${path}/[\\w-]{43}`).exec(mail.text)?.[0] ?? `no link in ${mail.text}`;
}

describe('people', () => {
  test('are invited, told at the field what is missing, and mailed', async () => {
    await administrator.goto('/');
    await new SignInPage(administrator).signIn('admin');
    await administrator.getByRole('link', { name: 'People' }).click();
    await new FramePage(administrator).heading('People').waitFor();
    await administrator.getByLabel('Name').fill('Wenna Pascoe');
    await administrator.getByLabel('E-mail address').fill('wenna');
    await administrator.getByRole('button', { name: 'Send the invitation' }).click();
    await administrator.getByText('Enter an e-mail address, such as').waitFor();
    await administrator.getByText('Choose at least one role.').waitFor();
    trial.troubles.length = 0;
    await administrator.getByLabel('E-mail address').fill('wenna@marrowby.example');
    await administrator.getByRole('checkbox', { name: 'quality engineer' }).check();
    await administrator.getByRole('checkbox', { name: 'Calender 1' }).check();
    await administrator.getByRole('button', { name: 'Send the invitation' }).click();
    await administrator
      .getByRole('row', { name: /Wenna Pascoe.*quality engineer.*Calender 1.*invited until/ })
      .waitFor();
  });

  test('choose a password by the link, on a phone, and are in', async () => {
    await newcomer.goto(await linkIn(1, '/invitation'));
    await newcomer.getByRole('heading', { name: 'Welcome to Ebbline' }).waitFor();
    await newcomer.getByLabel('Password').fill('passwordpassword');
    await newcomer.getByRole('button', { name: /Choose this password/ }).click();
    await newcomer.getByText('Choose another').waitFor();
    trial.troubles.length = 0;
    await newcomer.getByLabel('Password').fill(FIRST);
    await newcomer.getByRole('button', { name: /Choose this password/ }).click();
    await new FramePage(newcomer).heading('Desk').waitFor();
    expect(await new FramePage(newcomer).person.innerText()).toBe('Wenna Pascoe');
  });

  test('find that a link works once', async () => {
    await administrator.reload();
    await administrator.getByRole('row', { name: /Wenna Pascoe.*may sign in/ }).waitFor();
    const link = await linkIn(1, '/invitation');
    const other = await trial.open();
    await other.goto(link);
    await other.getByRole('heading', { name: 'This link does not work' }).waitFor();
    await other.getByText('used already').waitFor();
    trial.troubles.length = 0;
    await other.getByRole('link', { name: 'Forgotten your password?' }).click();
    await other.getByLabel('E-mail address').fill('wenna@marrowby.example');
    await other.getByRole('button', { name: 'Send me a link' }).click();
    await other.getByText('the mail is on its way').waitFor();
    await other.goto(await linkIn(2, '/password'));
    await other.getByLabel('Password').fill(SECOND);
    await other.getByRole('button', { name: /Choose this password/ }).click();
    await new FramePage(other).heading('Desk').waitFor();
    await other.context().close();
  });

  test('choose their mail and theme, which hold wherever they sign in', async () => {
    trial.troubles.length = 0;
    await newcomer.reload();
    await new SignInPage(newcomer).signIn('wenna', SECOND);
    await new FramePage(newcomer).person.click();
    await newcomer.getByRole('heading', { name: 'Your profile' }).waitFor();
    await newcomer.getByRole('radio', { name: 'night theme' }).check();
    const summary = newcomer.getByRole('checkbox', { name: 'the weekly summary' });
    expect(await summary.isChecked()).toBe(false);
    await summary.click();
    await newcomer.waitForResponse((response) => response.url().includes('/api/me/subscriptions/'));
    const other = await trial.open();
    await other.goto('/profile');
    await new SignInPage(other).signIn('wenna', SECOND);
    await other.locator(':root[data-theme=dark]').waitFor();
    await other.getByRole('checkbox', { name: 'the weekly summary' }).waitFor();
    expect(await other.getByRole('checkbox', { name: 'the weekly summary' }).isChecked()).toBe(true);
    await other.context().close();
  });

  test('who are disabled are out with their next request', async () => {
    await administrator.getByRole('button', { name: 'Change Wenna Pascoe' }).click();
    await administrator.getByRole('button', { name: 'Disable Wenna Pascoe' }).click();
    await administrator.getByRole('row', { name: /Wenna Pascoe.*disabled/ }).waitFor();
    await newcomer.goto('/lots');
    await newcomer.getByRole('button', { name: 'Sign in' }).waitFor();
  });
});
