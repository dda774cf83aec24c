import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { Page } from 'playwright-core';

/** A folder to take pictures of the journeys into; none are taken without it. */
const FOLDER = process.env.EBBLINE_PICTURES;
const VIEWS = [
  { name: 'desk', width: 1440, height: 900, colorScheme: 'light' },
  { name: 'phone', width: 390, height: 844, colorScheme: 'dark' },
] as const;

/** The page as it stands, on a desk by day and on a phone by night; the window is left as it was. */
export async function takePictures(page: Page, name: string): Promise<void> {
  if (!FOLDER) return;
  await mkdir(FOLDER, { recursive: true });
  const before = page.viewportSize();
  for (const { name: view, width, height, colorScheme } of VIEWS) {
    await page.setViewportSize({ width, height });
    await page.emulateMedia({ colorScheme });
    await page.screenshot({ path: join(FOLDER, `${name}-${view}.png`), fullPage: true });
  }
  await page.emulateMedia({ colorScheme: null });
  if (before) await page.setViewportSize(before);
}
