import type { Locator, Page } from 'playwright-core';
import { PLANT_PASSWORD } from '../../support/browser-plant';

export class SignInPage {
  readonly email: Locator;
  readonly password: Locator;
  readonly problem: Locator;

  constructor(private readonly page: Page) {
    this.email = page.getByLabel('E-mail address');
    this.password = page.getByLabel('Password');
    this.problem = page.getByRole('alert');
  }

  /** `person` is an address, or the part of a Marrowby one before the @. */
  async signIn(person: string, password = PLANT_PASSWORD): Promise<void> {
    await this.email.fill(person.includes('@') ? person : `${person}@marrowby.example`);
    await this.password.fill(password);
    await this.page.getByRole('button', { name: 'Sign in' }).click();
  }
}
