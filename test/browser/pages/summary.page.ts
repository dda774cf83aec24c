import type { Locator, Page } from 'playwright-core';

/** A week's summary, and the list of weeks. */
export class SummaryPage {
  readonly weeks: Locator;
  readonly headline: Locator;
  readonly version: Locator;

  constructor(private readonly page: Page) {
    this.weeks = page.locator('.summary__week');
    this.headline = page.locator('.summary__headline');
    this.version = page.locator('.page-heading__lead');
  }

  makeAnew(): Promise<void> {
    return this.page.getByRole('button', { name: 'Make it anew', exact: true }).click();
  }

  makeAnewAndSend(): Promise<void> {
    return this.page.getByRole('button', { name: 'Make it anew and send' }).click();
  }

  /** The name of the workbook that comes. */
  async downloadWorkbook(): Promise<string> {
    const [download] = await Promise.all([
      this.page.waitForEvent('download'),
      this.page.getByRole('button', { name: 'Download the workbook' }).click(),
    ]);
    return download.suggestedFilename();
  }
}
