import type { Locator, Page } from 'playwright-core';

export class RecordPage {
  /** The three panes; its name tells the span that they show. */
  readonly panes: Locator;
  readonly figures: Locator;

  constructor(page: Page) {
    this.panes = page.getByLabel(/^Record of .* from .* until/);
    this.figures = page.getByRole('region', { name: 'The same figures' });
  }

  /** Presses a key on the panes. */
  async press(key: string): Promise<void> {
    await this.panes.press(key);
  }

  async span(): Promise<string> {
    return (await this.panes.getAttribute('aria-label')) ?? '';
  }
}
