import type { Locator, Page } from 'playwright-core';

/** What stands around every page: header, tape, navigation, and the page's own heading. */
export class FramePage {
  readonly main: Locator;
  readonly person: Locator;
  /** The lots of the tape, in time order. */
  readonly tapeLots: Locator;

  constructor(private readonly page: Page) {
    this.main = page.getByRole('main');
    this.person = page.locator('.header__person');
    this.tapeLots = page.getByRole('group', { name: 'Arrow keys walk from lot to lot' }).getByRole('link');
  }

  heading(text: string | RegExp): Locator {
    return this.page.getByRole('heading', { level: 1, name: text });
  }

  to(page: 'Desk' | 'Intake' | 'Lots' | 'Channels' | 'Summary'): Promise<void> {
    return this.page
      .getByRole('navigation', { name: /^Pages of/ })
      .getByRole('link', { name: page })
      .click();
  }

  otherLine(name: string): Promise<void> {
    return this.page.getByRole('navigation', { name: 'Other lines' }).getByRole('link', { name }).click();
  }

  tapeLot(number: string): Locator {
    return this.page.getByRole('link', { name: new RegExp(`^Lot ${number}\\b`) });
  }

  sheet(title: string | RegExp): Locator {
    return this.page.getByRole('region', { name: title });
  }

  signOut(): Promise<void> {
    return this.page.getByRole('button', { name: 'Sign out' }).click();
  }

  chooseTheme(name: 'Night theme' | 'Day theme'): Promise<void> {
    return this.page.getByRole('button', { name }).click();
  }

  /** Whether anything of the page lies to the right of the window. */
  async isWiderThanWindow(): Promise<boolean> {
    return this.page.evaluate('document.scrollingElement.scrollWidth > window.innerWidth');
  }
}
