import { ageWords, remindedSentence } from './reminder-wording';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

describe('an age in words', () => {
  it('is in minutes up to an hour, then in whole hours, then in days', () => {
    expect(ageWords(20_000)).toBe('under a minute');
    expect(ageWords(40 * MINUTE)).toBe('40 min');
    expect(ageWords(9 * HOUR + 59 * MINUTE)).toBe('9 h');
    expect(ageWords(47 * HOUR)).toBe('1 d 23 h');
    expect(ageWords(52 * HOUR + 30 * MINUTE)).toBe('2 d 4 h');
    expect(ageWords(72 * HOUR + MINUTE)).toBe('3 d');
  });
});

describe('what is said of reminders', () => {
  const now = new Date('2026-03-11T12:00:00Z');
  const managers = { audience: 'quality_manager', at: '2026-03-11T03:00:00Z' } as const;
  const director = { audience: 'director', at: '2026-03-11T11:55:00Z' } as const;

  it('is nothing while nobody was reminded', () => {
    expect(remindedSentence([], now)).toBeNull();
  });

  it('names who was, in the order of asking', () => {
    expect(remindedSentence([managers], now)).toBe('The quality managers were reminded 9 h ago.');
    expect(remindedSentence([director, managers], now)).toBe(
      'The quality managers were reminded 9 h ago, the plant director 5 min ago.',
    );
    expect(remindedSentence([director], now)).toBe('The plant director was reminded 5 min ago.');
  });
});
