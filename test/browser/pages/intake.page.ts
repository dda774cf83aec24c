import type { Locator, Page } from 'playwright-core';

export interface FileToUpload {
  name: string;
  bytes: Buffer;
}

/** The drop zone with the line's recent workbooks, and one workbook on its way. */
export class IntakePage {
  readonly dropZone: Locator;
  readonly recent: Locator;
  readonly confirm: Locator;
  readonly problem: Locator;
  readonly status: Locator;
  readonly accounting: Locator;
  readonly lots: Locator;
  readonly outcome: Locator;
  readonly readAgain: Locator;
  readonly firstReadings: Locator;

  constructor(private readonly page: Page) {
    this.dropZone = page.locator('input[type=file]');
    this.recent = page.getByRole('table', { name: /^Recent intakes/ });
    this.confirm = page.getByRole('button', { name: /^Confirm and score/ });
    this.problem = page.getByRole('alert');
    this.status = page.getByRole('status');
    this.accounting = page.locator('.accounting');
    this.lots = page.getByRole('table', { name: 'Lots found in the workbook' });
    this.outcome = page.locator('.outcome');
    this.readAgain = page.getByRole('button', { name: /^Read it again with/ }).first();
    this.firstReadings = page.getByRole('table', { name: 'The first readings as they are read' });
  }

  /** A file on the disk by its path, or bytes under a name. */
  async upload(file: FileToUpload | string): Promise<void> {
    await this.dropZone.setInputFiles(
      typeof file === 'string' ? file : { name: file.name, mimeType: 'application/octet-stream', buffer: file.bytes },
    );
  }

  /** The sentence about a scored workbook's lots. */
  cameOfIt(): Promise<string> {
    return this.page.getByRole('region', { name: 'What came of it' }).getByText('scored').first().innerText();
  }

  /** Takes a choice that a question offers. */
  choose(choice: string): Promise<void> {
    return this.page.getByRole('listitem').getByRole('button', { name: choice }).click();
  }

  /** What a column of a sheet is read as, to be chosen. */
  column(letters: string, sheet: string): Locator {
    return this.page.getByLabel(`What column ${letters} of ${sheet} is`);
  }

  openHold(lot: string): Promise<void> {
    return this.page.getByRole('link', { name: `Open the hold of lot ${lot}` }).click();
  }
}
