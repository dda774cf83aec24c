import { decisionMail, type DecisionFacts } from './decision';
import { type HeldCause, heldLotsMail } from './held-lots';
import { zonedText } from './zoned-text';

const cause: HeldCause = {
  channelName: 'Coat weight',
  unit: 'g/m²',
  resolution: 0.01,
  gaugeAssetNumber: 'MW-0217',
  sentence: 'lies 6.4 σ below its baseline in coat weight (control limit 3.0 σ)',
  lotMean: 6.413,
  baseline: 6.6,
  score: -6.39,
  limit: 3,
  controlLow: 6.512,
  controlHigh: 6.688,
  lower: 5.7,
  upper: 7.1,
  isProvisional: true,
  wouldConstantHold: false,
};
const lot = {
  lotNumber: '24502',
  product: 'CS-20',
  span: '30 Nov 2026, 08:00 to 09:59',
  isLate: false,
  url: 'http://ebbline.example/holds/9',
  causes: [cause],
};
const held = (lots = [lot]) =>
  heldLotsMail({ plantName: 'Marrowby Works', lineName: 'Coater 2', occasion: 'the intake of a.xlsx', lots });

describe('the mail about held lots', () => {
  it('has lot, line, gauge, characteristic, value, baseline, score, limits and a link in either part', () => {
    const mail = held();
    expect(mail.subject).toBe('Lot 24502 held, Coater 2');
    for (const part of [mail.text, mail.html])
      for (const fact of [
        'Coater 2',
        'Lot 24502 lies 6.4 σ below its baseline in coat weight',
        'MW-0217',
        'Coat weight',
        '6.413\u202fg/m²',
        'No gauge checks: not corrected',
        '6.600\u202fg/m²',
        '\u22126.4\u202fσ (provisional)',
        '±3.0\u202fσ',
        '6.512\u202fg/m² to 6.688\u202fg/m²',
        '5.70\u202fg/m² to 7.10\u202fg/m²',
        'would not have held it',
        'http://ebbline.example/holds/9',
      ])
        expect(part).toContain(fact);
  });

  it('gives the figures of a channel once, however many signals it has', () => {
    const twice = { ...lot, causes: [cause, { ...cause, sentence: 'is outside its specification in coat weight' }] };
    const { text } = held([twice]);
    expect(text.split('MW-0217')).toHaveLength(2);
    expect(text).toContain('; it also is outside its specification');
  });

  it('is one for several lots and names them in its subject', () => {
    const others = ['1', '2', '3', '4', '5', '6', '7'].map((lotNumber) => ({ ...lot, lotNumber }));
    expect(held(others).subject).toBe('7 lots held, Coater 2: 1, 2, 3, 4, 5 …');
  });

  it('says that a hold is late', () => {
    expect(held([{ ...lot, isLate: true }]).text).toContain('Held late: it was within its control limits before');
  });

  it('cannot be made to carry markup', () => {
    const { html } = heldLotsMail({ plantName: '<script>', lineName: 'a & b', occasion: '"quoted"', lots: [] });
    expect(html).not.toContain('<script>');
    expect(html).toContain('a &amp; b');
  });

  it('needs no image and no style sheet', () => {
    expect(held().html).not.toMatch(/<img|<link|<style|url\(/);
  });
});

describe('the mail about a decision', () => {
  const facts: DecisionFacts = {
    plantName: 'Marrowby Works',
    lineName: 'Coater 2',
    lotNumber: '24502',
    disposition: 'scrap',
    reason: 'Retained samples confirm it.',
    note: null,
    by: 'Adaeze Thornbury',
    at: '1 Dec 2026, 14:05',
    quantity: 2100,
    quantityUnit: 'm²',
    isSetAside: false,
    causes: [cause.sentence],
    url: 'http://ebbline.example/holds/9',
  };

  it('says who decided what, why, and what the line must do now', () => {
    const scrapped = decisionMail(facts);
    expect(scrapped.subject).toBe('Lot 24502 scrapped, Coater 2');
    expect(scrapped.text).toContain(
      'Adaeze Thornbury scrapped lot 24502 of Coater 2 (Marrowby Works) on 1 Dec 2026, 14:05.',
    );
    expect(scrapped.text).toContain('take it out of the line now');
    expect(scrapped.text).toContain('Retained samples confirm it.');
    const released = decisionMail({ ...facts, disposition: 'release', isSetAside: true });
    expect(released.text).toContain('It was set aside; it may move on now.');
    expect(released.html).toContain('released');
  });
});

describe('an instant in words', () => {
  it('is the plant’s wall clock on either side of a clock change', () => {
    expect(zonedText(new Date('2026-03-29T00:59:00Z'), 'Europe/London')).toBe('29 Mar 2026, 00:59');
    expect(zonedText(new Date('2026-03-29T01:00:00Z'), 'Europe/London')).toBe('29 Mar 2026, 02:00');
  });
});
