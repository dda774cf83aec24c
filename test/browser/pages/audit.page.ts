import type { Download, Locator, Page } from 'playwright-core';

/** Who did what to what. */
export class AuditPage {
  readonly heading: Locator;

  constructor(private readonly page: Page) {
    this.heading = page.getByRole('heading', { name: 'Audit', level: 1 });
  }

  /** By the link that every page has. */
  async open(): Promise<void> {
    await this.page.getByRole('link', { name: 'Audit', exact: true }).click();
    await this.heading.waitFor();
  }

  /** The row of an entry whose sentence has these words. */
  entry(words: string | RegExp): Locator {
    return this.page.getByRole('row').filter({ hasText: words }).first();
  }

  async find(words: string): Promise<void> {
    await this.page.getByLabel(/^Words in it/).fill(words);
    await this.page.waitForURL(/text=/);
  }

  async changesOf(entry: Locator): Promise<string> {
    await entry.getByRole('button', { name: 'Show what changed' }).click();
    return this.page.locator('dl.changes').first().innerText();
  }

  async export(): Promise<Download> {
    const download = this.page.waitForEvent('download');
    await this.page.getByRole('button', { name: 'Export to Excel' }).click();
    return download;
  }
}
