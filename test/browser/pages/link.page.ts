import type { Locator, Page } from 'playwright-core';

/** What a printed or mailed link leads to. */
export class LinkPage {
  readonly problem: Locator;

  constructor(private readonly page: Page) {
    this.problem = page.getByRole('alert');
  }

  /** Says who one is, where the link asks for it. */
  async introduce(name: string, email: string): Promise<void> {
    await this.page.getByLabel('Your name').fill(name);
    await this.page.getByLabel('E-mail address').fill(email);
  }

  async choose(password: string): Promise<void> {
    await this.page.getByLabel('Password').fill(password);
    await this.page.getByRole('button', { name: /Choose this password/ }).click();
  }
}
