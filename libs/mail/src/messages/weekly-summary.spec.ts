import type { SummaryContent } from '@app/contracts';
import { figures, gauge, lotsOf500, madeSummary, openHold } from '../../../contracts/src/testing/made-summary';
import { renderPng } from '../chart/render-png';
import { chartInWords, summaryChart } from '../chart/summary-chart';
import { CHART_CONTENT_ID, weeklySummaryMail, type WeeklySummaryFacts } from './weekly-summary';

const line = { id: 1, name: 'Coater 2' };
const week = figures({
  held: lotsOf500(3),
  decided: [
    { disposition: 'release', ...lotsOf500(1) },
    { disposition: 'scrap', ...lotsOf500(1) },
  ],
  stillOpen: lotsOf500(1),
  stillOpenByAge: [
    { fromHours: 0, toHours: 8, ...lotsOf500(0) },
    { fromHours: 8, toHours: 24, ...lotsOf500(0) },
    { fromHours: 24, toHours: 72, ...lotsOf500(1) },
    { fromHours: 72, toHours: null, ...lotsOf500(0) },
  ],
});
const full: SummaryContent = madeSummary({
  headline: 'Lot 24118 of Coater 2 had been on hold for 2 d 4 h at the week’s end and is still undecided.',
  whatToAsk: [
    {
      whom: 'the quality manager, Adaeze Thornbury',
      question: 'What keeps lot 24118 from being decided?',
      path: '/holds/7',
    },
  ],
  total: { week, lastWeek: figures({ held: lotsOf500(1) }) },
  lines: [
    { line, week, lastWeek: figures({ held: lotsOf500(1) }) },
    { line: { id: 2, name: 'Slurry <3>' }, week: figures(), lastWeek: null },
  ],
  openHolds: { count: 1, holds: [openHold({ isSetAside: false })] },
  changedByBaseline: {
    onlyUnadjusted: {
      count: 2,
      lots: [],
      fates: [
        { fate: 'moved_on', lots: 1 },
        { fate: 'release', lots: 1 },
      ],
      lastWeekCount: 5,
    },
    onlyPlan: { count: 0, lots: [], fates: [], lastWeekCount: null },
  },
  gauges: [
    gauge({ share: 1.12, lastWeekShare: 0.9, isGettingWorse: true }),
    gauge({ channel: { id: 12, name: 'pH' } }),
  ],
  notScored: [
    {
      line,
      channel: { id: 11, name: 'Coat weight' },
      reason: 'learning',
      sentence: 'the baseline is still learning',
      lots: 4,
      lastWeekLots: 0,
    },
  ],
  intakes: {
    count: 1,
    intakes: [
      {
        id: 5,
        line,
        fileName: 'late & messy.xlsx',
        state: 'needs_attention',
        receivedAt: '2026-03-05T00:00:00.000Z',
        receivedBy: 'Maren Holloway',
        sentence: 'It waits.',
      },
    ],
  },
});
const mailOf = (content: SummaryContent, version = 1, earlier: WeeklySummaryFacts['earlier'] = []) =>
  weeklySummaryMail({
    content,
    version,
    earlier,
    allWeeksUrl: 'http://ebbline.example/plants/1/summaries',
    publicUrl: 'http://ebbline.example',
    url: 'http://ebbline.example/summaries/9',
  });
const plain = (text: string) => text.replaceAll('\u202f', ' ');

describe('the mail of a week', () => {
  it('says in either part, without a picture, what is held, what it costs, what gets worse, and what to ask whom', () => {
    const mail = mailOf(full);
    expect(mail.subject).toBe(`Marrowby Works, 2 to 8 Mar 2026: ${full.headline}`);
    const html = mail.html
      .replace(/<[^>]*>/g, ' ')
      .replaceAll('&amp;', '&')
      .replaceAll('&gt;', '>')
      .replaceAll('&lt;', '<');
    for (const part of [mail.text, html])
      for (const fact of [
        full.headline,
        'Ask the quality manager, Adaeze Thornbury: What keeps lot 24118 from being decided?',
        'Slurry <3>',
        '1 lot waited for a decision at the week’s end (0 the week before): 1 of Coater 2; the oldest, lot 24118 of Coater 2, for 2 d 4 h.',
        'In the week 3 lots were held (1 the week before).',
        'At risk on hold: 500 m, worth 900 EUR.',
        'Scrapped in the week: 1 lot (500 m, 900 EUR).',
        'Released in the week: 1 lot (500 m, 900 EUR).',
        'Holds grow old: 1 lot had waited 1 d or longer at the week’s end, 0 the week before.',
        'Coat weight on Coater 2, gauge BG-204: the slow movement has used 112 % of its allowance, 90 % the week before; its lots are not scored until the gauge is checked.',
        '3, 1 the week before: 1 500 m, 2 700 EUR',
        '1 released, 1 scrapped',
        '1 d to 3 d: 1 lot (500 m, 900 EUR)',
        'not confirmed to be set aside: Lot 24118 lies 4.3 σ below its baseline',
        '112 %',
        'BG-204',
        '2 lots that limits on unadjusted lot means would have held, and the plans did not',
        'What became of them: 1 never held, 1 released. Week before: 5.',
        'Coater 2, Coat weight: 4 lots, since the baseline is still learning. Week before: 0.',
        'late & messy.xlsx for Coater 2, from Maren Holloway, needs attention: It waits.',
      ])
        expect(plain(part)).toContain(fact);
    expect(mail.text).toContain('http://ebbline.example/holds/7');
    expect(mail.html).toContain('href="http://ebbline.example/summaries/9"');
  });

  it('opens with the first sentence, and tells later versions apart', () => {
    const [heading, first] = mailOf(full).text.split('\n\n');
    expect([heading, first]).toEqual(['Marrowby Works, week of 2 to 8 Mar 2026', full.headline]);
    const { html, text } = mailOf(full);
    for (const part of [html, text.toLowerCase()]) {
      const titles = [
        'held',
        'what it costs',
        'getting worse',
        'what to ask whom',
        'open the page of this week',
        'lots of each line',
      ];
      const places = titles.map((title) => part.toLowerCase().search(new RegExp(`(^|>)${title}`, 'm')));
      expect([titles, places]).toEqual([titles, [...places].sort((a, b) => a - b)]);
      expect(places[0]).toBeGreaterThan(0);
    }
    expect(mailOf(full, 2).text).toContain('week of 2 to 8 Mar 2026, version 2');
  });

  it('carries no markup of what it tells, and no picture but its own chart, described in words', () => {
    const { html } = mailOf(full);
    expect(html).not.toContain('<3>');
    expect(html.match(/<img[^>]*>/g)).toEqual([expect.stringContaining(`src="cid:${CHART_CONTENT_ID}"`)]);
    expect(html).toContain('alt="Chart. Lots on hold at the week’s end: Coater 2 1 lot');
  });

  it('leaves out what a quiet week does not have', () => {
    const { text } = mailOf(madeSummary({ headline: 'No lot was held, and all 84 lots measured were scored.' }));
    for (const sentence of [
      'No lot waited for a decision at the week’s end. In the week 0 lots were held (0 the week before).',
      'Nothing was scrapped, reworked or regraded in the week.',
      'No slow movement took up a tenth more of its allowance than in the week before; the largest is Coat weight on Coater 2 at 41 %.',
      'Nothing waits for anybody.',
    ])
      expect(plain(text)).toContain(sentence);
    for (const title of ['HELD AND UNDECIDED', 'LOTS WITHOUT A SCORE', 'WORKBOOKS THAT NEED'])
      expect(text).not.toContain(title);
    expect(text).toContain('LOTS OF EACH LINE');
    expect(text).not.toContain('TOLD ONLY NOW');
  });

  it('names and links the weeks that were missed, the newest of many', () => {
    const week = (day: number) => ({
      weekStartsOn: `2026-02-${String(day).padStart(2, '0')}`,
      headline: `Headline <${day}>.`,
      url: `http://ebbline.example/summaries/${day}`,
    });
    const mail = mailOf(full, 1, [week(16), week(23)]);
    expect(mail.text).toContain(
      '2 WEEKS TOLD ONLY NOW\n- 16 to 22 Feb 2026: Headline <16>.\n  http://ebbline.example/summaries/16\n- 23 Feb to 1 Mar 2026: Headline <23>.\n  http://ebbline.example/summaries/23',
    );
    expect(mail.html).toContain('Headline &lt;16&gt;. <a href="http://ebbline.example/summaries/16"');
    expect(mail.text.indexOf('TOLD ONLY NOW')).toBeLessThan(mail.text.indexOf('LOTS OF EACH LINE'));
    const many = mailOf(
      full,
      1,
      [...Array(10).keys()].map((index) => week(index + 1)),
    ).text;
    expect(many).toContain(
      '- 2 more before these: see the list of weeks.\n  http://ebbline.example/plants/1/summaries',
    );
    expect(many).not.toContain('Headline <2>');
    expect(mailOf(full, 1, [week(23)]).text).toContain('A WEEK TOLD ONLY NOW');
  });
});

describe('the chart of a week', () => {
  it('says the same in words', () => {
    expect(plain(chartInWords(full))).toBe(
      'Chart. Lots on hold at the week’s end: Coater 2 1 lot, oldest 2 d 4 h, Slurry <3> none. ' +
        'Slow movement as a share of its allowance: Coat weight on Coater 2 112 % (week before 90 %), pH on Coater 2 41 % (week before 38 %).',
    );
  });

  it('is a picture of its size at twice the points, with its letters drawn without any font of the machine', () => {
    const { svg, height } = summaryChart(full);
    const png = renderPng(svg);
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([1136, 2 * height]);
    const letterless = renderPng(svg.replace(/<text[^>]*>[^<]*<\/text>/g, ''));
    expect(png.length).toBeGreaterThan(letterless.length + 2000);
  });
});
