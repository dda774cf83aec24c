import { holdReminderMail, type HoldReminderFacts, type OldHoldFacts } from './hold-reminder';

const HOUR = 3_600_000;
const hold: OldHoldFacts = {
  lotNumber: '24118',
  lineName: 'Coater 2',
  product: 'SEP-16',
  ageMs: 9 * HOUR + 1_800_000,
  openedAt: '11 Mar 2026, 08:48',
  sentences: ['lies 4.3 σ below its baseline in coat weight (control limit 3.0 σ)'],
  quantity: 500,
  quantityUnit: 'kg',
  value: 2100,
  isSetAside: false,
  deciders: ['Adaeze Thornbury', 'Piotr Halvorsen'],
  remindedAt: '11 Mar 2026, 16:48',
  url: 'http://ebbline.example/holds/9',
};
const facts: HoldReminderFacts = {
  plantName: 'Marrowby Works',
  audience: 'quality_manager',
  hours: 8,
  currency: 'EUR',
  holds: [hold],
};

describe('the reminder of old holds', () => {
  it('has lot, line, age, reason, quantity at risk, who may decide and a link in either part', () => {
    const mail = holdReminderMail(facts);
    expect(mail.subject).toBe('Lot 24118 held for 9 h, Coater 2');
    for (const part of [mail.text, mail.html])
      for (const fact of [
        'Lot 24118 of Coater 2 (Marrowby Works) has been held for 9 h and nobody has decided it. It waits for a quality manager’s decision.',
        'Lot 24118 lies 4.3 σ below its baseline in coat weight',
        '11 Mar 2026, 08:48, for 9 h',
        '500\u202fkg (worth 2\u202f100\u202fEUR)',
        'nobody has confirmed it yet',
        'Adaeze Thornbury, Piotr Halvorsen',
        'http://ebbline.example/holds/9',
        'once a lot, when its hold is older than 8 h',
      ])
        expect(part).toContain(fact);
    expect(mail.text).not.toContain('Quality managers reminded');
  });

  it('tells the director whom to ask, and when they were reminded', () => {
    const { text } = holdReminderMail({ ...facts, audience: 'director', hours: 24 });
    expect(text).toContain('Ask those named below what stands in the way');
    expect(text).toContain('Quality managers reminded: 11 Mar 2026, 16:48');
    const unasked = { ...hold, remindedAt: null, deciders: [] };
    const other = holdReminderMail({ ...facts, audience: 'director', holds: [unasked] }).text;
    expect(other).toContain('Quality managers reminded: no, none of them takes reminders');
    expect(other).toContain('May decide: no quality manager');
  });

  it('is one for several lots, with their quantities together by unit', () => {
    const others = [hold, { ...hold, quantity: 300, quantityUnit: 'm²' }, { ...hold, quantity: null, value: null }];
    const mail = holdReminderMail({ ...facts, holds: others });
    expect(mail.subject).toBe('3 lots held for more than 8 h, Marrowby Works');
    expect(mail.text).toContain(
      'the oldest for 9 h. Together: 500\u202fkg and 300\u202fm² and 1 lot of unknown quantity.',
    );
  });

  it('states no worth where the plant states none', () => {
    expect(holdReminderMail({ ...facts, currency: null }).text).toContain('Quantity at risk: 500\u202fkg\n');
  });

  it('cannot be made to carry markup, and needs no image', () => {
    const { html } = holdReminderMail({ ...facts, holds: [{ ...hold, lotNumber: '<b>', deciders: ['<script>'] }] });
    expect(html).not.toMatch(/<script>|<b>|<img/);
  });
});
