import type { Locator, Page } from 'playwright-core';

export interface Invited {
  name: string;
  email: string;
  role: string;
  lines: string[];
}

/** Who is somebody at the plant, as what. */
export class PeoplePage {
  constructor(private readonly page: Page) {}

  async open(): Promise<void> {
    await this.page.getByRole('banner').getByRole('link', { name: 'People' }).click();
  }

  /** Invites somebody, and waits until they stand in the table. */
  async invite({ name, email, role, lines }: Invited): Promise<void> {
    await this.page.getByLabel('Name').fill(name);
    await this.page.getByLabel('E-mail address').fill(email);
    for (const box of [role, ...lines]) await this.page.getByRole('checkbox', { name: box, exact: true }).check();
    await this.page.getByRole('button', { name: 'Send the invitation' }).click();
    await this.row(email).waitFor();
  }

  row(email: string): Locator {
    return this.page.getByRole('table', { name: 'People of this plant' }).getByRole('row').filter({ hasText: email });
  }
}
