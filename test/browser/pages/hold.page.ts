import type { Locator, Page } from 'playwright-core';
import { PLANT_PASSWORD } from '../../support/browser-plant';

export class HoldPage {
  readonly reason: Locator;
  readonly decision: Locator;
  readonly setAside: Locator;
  readonly history: Locator;
  readonly password: Locator;
  readonly passwordError: Locator;
  readonly signature: Locator;
  readonly evidence: Locator;

  constructor(private readonly page: Page) {
    this.reason = page.locator('.hold-reason');
    this.decision = page.getByRole('region', { name: 'Decision' });
    this.setAside = page.getByRole('region', { name: 'Set aside' });
    this.history = page.getByRole('region', { name: 'What happened' });
    this.password = page.getByLabel('Your password again');
    this.passwordError = this.decision.locator('.field', { has: this.password }).locator('.field__error');
    this.signature = this.decision.getByRole('status');
    this.evidence = page.getByRole('table', { name: /^Verdicts of lot/ });
  }

  async confirmSetAside(place: string): Promise<void> {
    await this.page.getByLabel('Where it stands').fill(place);
    await this.page.getByRole('button', { name: /is set aside$/ }).click();
  }

  async decide(choice: 'Release' | 'Scrap', reason: string, password = PLANT_PASSWORD): Promise<void> {
    await this.page.getByLabel(new RegExp(`^${choice}:`)).check();
    await this.page.getByLabel('Reason').fill(reason);
    await this.sign(choice, password);
  }

  /** Presses the button that signs, with what the form has. */
  async sign(choice: 'Release' | 'Scrap', password = PLANT_PASSWORD): Promise<void> {
    await this.password.fill(password);
    await this.page.getByRole('button', { name: new RegExp(`^${choice} lot`) }).click();
  }
}
