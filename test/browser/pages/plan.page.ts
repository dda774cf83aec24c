import type { Locator, Page } from 'playwright-core';

/** How a channel is judged. */
export class PlanPage {
  readonly proposed: Locator;
  readonly inForce: Locator;

  constructor(private readonly page: Page) {
    this.proposed = page.getByRole('region', { name: /^Revision \d+, proposed/ });
    this.inForce = page.getByRole('region', { name: /^Revision \d+, in force/ });
  }

  /** Proposes the default plan, and waits until it is worked out. */
  async propose(reason: string): Promise<void> {
    await this.page.getByLabel('Reason').fill(reason);
    await this.page.getByRole('button', { name: 'Work out the default plan and propose it' }).click();
    await this.proposed.waitFor();
  }

  async approve(password: string): Promise<void> {
    await this.page.getByLabel('Your password again').fill(password);
    await this.page.getByRole('button', { name: /^Approve revision/ }).click();
    await this.inForce.waitFor();
  }
}
