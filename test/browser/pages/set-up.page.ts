import type { Locator, Page } from 'playwright-core';
import { PLANT_PASSWORD } from '../../support/browser-plant';

/** A plant's set-up: what is missing, and its parts with their form rows. */
export class SetUpPage {
  readonly missing: Locator;
  readonly inPlace: Locator;
  /** What the server or the form said at a field. */
  readonly fieldError: Locator;

  constructor(private readonly page: Page) {
    this.missing = page.getByRole('region', { name: 'Missing' });
    this.inPlace = page.getByRole('region', { name: 'In place' });
    this.fieldError = page.locator('.field__error');
  }

  /** From any page, by the header. */
  async open(): Promise<void> {
    await this.page.getByRole('banner').getByRole('link', { name: 'Set-up' }).click();
  }

  async part(name: string): Promise<void> {
    await this.page
      .getByRole('navigation', { name: 'Parts of the set-up' })
      .getByRole('link', { name, exact: true })
      .click();
  }

  table(caption: string): Locator {
    return this.page.getByRole('table', { name: caption });
  }

  row(caption: string, text: string): Locator {
    return this.table(caption).getByRole('row').filter({ hasText: text }).first();
  }

  async press(name: string | RegExp): Promise<void> {
    await this.page.getByRole('button', { name, exact: typeof name === 'string' }).click();
  }

  /** Types into fields by the beginning of their labels, of the one form that is open. */
  async type(values: Record<string, string>): Promise<void> {
    for (const [label, value] of Object.entries(values))
      await this.page
        .getByLabel(new RegExp(`^${label}`))
        .first()
        .fill(value);
  }

  async choose(label: string, option: string): Promise<void> {
    await this.page.getByLabel(label).selectOption({ label: option });
  }

  /** Opens the form, fills it in, sends it, and waits until it has closed. */
  async add(opens: string, values: Record<string, string>, sends: string): Promise<void> {
    await this.press(opens);
    await this.type(values);
    await this.press(sends);
    await this.page.getByRole('button', { name: sends, exact: true }).waitFor({ state: 'detached' });
  }

  async makePlant(values: { name: string; timeZone: string }): Promise<void> {
    await this.page.getByRole('link', { name: 'Set up another plant' }).click();
    await this.type({ Name: values.name, 'Time zone': values.timeZone });
    await this.press('Make the plant');
  }

  async approve(what: string, version: number, password = PLANT_PASSWORD): Promise<void> {
    const field = this.page.getByLabel('Your password again');
    if ((await field.count()) === 0) await this.press(`Approve ${what}`);
    await field.fill(password);
    await this.press(`Approve version ${version}`);
  }

  /** On the page of people: gives somebody one role at the plant, and waits until they stand in its table. */
  async invite(email: string, name: string, role: string): Promise<void> {
    await this.type({ Name: name, 'E-mail address': email });
    await this.page.getByRole('checkbox', { name: role }).check();
    await this.press('Send the invitation');
    await this.row('People of this plant', email).waitFor();
  }

  async choosePlant(name: string): Promise<void> {
    await this.page.getByLabel('Plant').selectOption({ label: name });
  }
}
