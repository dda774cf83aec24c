/** Takes the README's four pictures from a running trial. See --help. */
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium } from 'playwright-core';

const HELP = `node tools/pictures.mjs --address http://127.0.0.1:3000 --password … --workbook .data/workbooks/…long.xlsx
Signs in to a freshly started trial and writes intake.png, record.png, desk.png and hold.png into fixtures/pictures.
The workbook is uploaded but not confirmed.`;

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

const argument = (name) => {
  const at = process.argv.indexOf(`--${name}`);
  return at < 0 ? undefined : process.argv[at + 1];
};

const folder = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..', 'fixtures', 'pictures');

async function signedIn(browser, address, who, password) {
  const page = await browser.newPage({ viewport: { width: 1280, height: 860 } });
  await page.goto(address);
  await page.getByLabel('E-mail').fill(`${who}@marrowby.example`);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: /desk/i }).first().waitFor();
  return page;
}

const take = (page, name, options = {}) => page.screenshot({ path: path.join(folder, `${name}.png`), ...options });

async function main() {
  const [address, password, workbook] = ['address', 'password', 'workbook'].map(argument);
  if (process.argv.includes('--help') || !address || !password || !workbook) {
    console.log(HELP);
    process.exit(process.argv.includes('--help') ? 0 : 2);
  }
  mkdirSync(folder, { recursive: true });
  const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: FLAGS });
  try {
    const engineer = await signedIn(browser, address, 'engineer', password);
    await engineer.getByRole('link', { name: 'Intake' }).first().click();
    await engineer.locator('input[type=file]').setInputFiles(workbook);
    await engineer.getByRole('button', { name: /^Confirm/ }).waitFor({ timeout: 60_000 });
    await take(engineer, 'intake');
    await engineer.getByRole('link', { name: 'Channels' }).first().click();
    await engineer.getByRole('link', { name: 'Coat weight' }).first().click();
    await engineer.locator('canvas').first().waitFor();
    await engineer.waitForTimeout(1500);
    await take(engineer, 'record');
    const lead = await signedIn(browser, address, 'lead', password);
    await lead
      .getByRole('link', { name: /^Set lot/ })
      .first()
      .waitFor();
    await take(lead, 'desk');
    const manager = await signedIn(browser, address, 'manager', password);
    await manager
      .getByRole('link', { name: /^Decide lot/ })
      .first()
      .click();
    await manager.getByLabel('Reason').waitFor();
    await manager.waitForTimeout(1500);
    await take(manager, 'hold', { fullPage: true });
  } finally {
    await browser.close();
  }
}

await main();
