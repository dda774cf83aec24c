import { type Browser, chromium, type Page } from 'playwright-core';
import type { AgeMeasure, SummaryContent } from '@app/contracts';
import { summaryChart, weeklySummaryMail } from '@app/mail';
import { figures, gauge, lotsOf500, madeSummary, openHold } from '../../../libs/contracts/src/testing/made-summary';

const LINES = [
  { id: 1, name: 'Coater 2' },
  { id: 3, name: 'Slurry 3' },
];
const ages = (...lots: [number, number, number]): AgeMeasure[] => [
  { fromHours: 0, toHours: 8, ...lotsOf500(lots[0]) },
  { fromHours: 8, toHours: 24, ...lotsOf500(lots[1]) },
  { fromHours: 24, toHours: null, ...lotsOf500(lots[2]) },
];
const open = (lots: number, byAge: AgeMeasure[]) => figures({ stillOpen: lotsOf500(lots), stillOpenByAge: byAge });
const content: SummaryContent = madeSummary({
  headline: 'Lot 24118 of Coater 2 had been on hold for 2 d 4 h at the week’s end and is still undecided.',
  total: { week: open(3, ages(1, 0, 2)), lastWeek: figures() },
  lines: [
    { line: LINES[0], week: open(2, ages(1, 0, 1)), lastWeek: figures() },
    { line: LINES[1], week: open(1, ages(0, 0, 1)), lastWeek: null },
  ],
  openHolds: {
    count: 3,
    holds: [openHold(), openHold({ line: LINES[1], ageHours: 30 }), openHold({ holdId: 9, ageHours: 3 })],
  },
  gauges: [
    gauge({ share: 1.12, lastWeekShare: 0.9, isGettingWorse: true }),
    gauge({ channel: { id: 12, name: 'Viscosity' }, line: LINES[1], share: 0.33, lastWeekShare: 0.29 }),
  ],
});
const publicUrl = 'http://ebbline.example';
const mail = weeklySummaryMail({
  content,
  version: 1,
  publicUrl,
  url: `${publicUrl}/summaries/9`,
  allWeeksUrl: `${publicUrl}/plants/1/summaries`,
});

describe('the mail of a week in a reader of mails', () => {
  let browser: Browser;
  beforeAll(async () => {
    browser = await chromium.launch({
      executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking'],
    });
  });
  afterAll(() => browser?.close());

  /** With its pictures taken away, as most readers show it first. */
  async function opened(width: number, colorScheme: 'light' | 'dark' = 'light'): Promise<Page> {
    const page = await browser.newPage({ viewport: { width, height: 900 }, colorScheme });
    await page.setContent(mail.html.replace(/<img[^>]*>/g, ''));
    return page;
  }

  test('tells without its picture, and without the words in place of it, all that the picture tells', async () => {
    const page = await opened(640);
    const seen = await page.innerText('body');
    const drawn = [...summaryChart(content).svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, words]) => words);
    const facts = drawn.flatMap((words) => words.match(/\d+\u202f%|\d+\u202f[dh](?: \d+\u202fh)?/g) ?? []);
    expect(facts.length).toBeGreaterThan(8);
    // The mark that the allowance itself stands at.
    for (const fact of facts.filter((words) => words !== '100\u202f%')) expect(seen).toContain(fact);
    const plain = seen.replaceAll('\u202f', ' ');
    for (const line of ['Coater 2, 2 lots: under 8 h: 1 lot; over 1 d: 1 lot.', 'Slurry 3, 1 lot: over 1 d: 1 lot.'])
      expect(plain).toContain(line);
  });

  test('has its answers on the first screen, before any table', async () => {
    const page = await opened(640);
    const table = (await page.locator('table').first().boundingBox())?.y ?? 0;
    for (const title of ['Held', 'What it costs', 'Getting worse', 'What to ask whom']) {
      const { y } = (await page.getByText(title, { exact: true }).boundingBox()) ?? { y: Infinity };
      expect(y).toBeLessThan(Math.min(900, table));
    }
  });

  test.each([
    [640, 'light'],
    [390, 'light'],
    [390, 'dark'],
  ] as const)('is no wider than a window of %i px (%s), and names each value of a row', async (width, scheme) => {
    const page = await opened(width, scheme);
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBe(width);
    const names = page.locator('.rows .name');
    expect(await names.first().isVisible()).toBe(width < 480);
    expect(await page.locator('.rows thead').first().isVisible()).toBe(width > 480);
    expect(await page.evaluate('getComputedStyle(document.body).backgroundColor')).toBe('rgb(237, 242, 238)');
  });
});
