import { formatSpan } from './format';

/** Whom an old open hold is told of, once each. */
export const REMINDER_AUDIENCES = ['quality_manager', 'director'] as const;
export type ReminderAudience = (typeof REMINDER_AUDIENCES)[number];

/** That an audience was told of an open hold's age, and when (ISO). */
export interface HoldReminder {
  audience: ReminderAudience;
  at: string;
}

const AUDIENCE_WORDS: Record<ReminderAudience, string> = {
  quality_manager: 'the quality managers',
  director: 'the plant director',
};

const HOUR_MS = 3_600_000;

/** An age as one says it: "40 min", "9 h", "2 d 4 h". Whole hours, rounded down, from one hour on. */
export function ageWords(milliseconds: number): string {
  return formatSpan(milliseconds < HOUR_MS ? milliseconds : Math.floor(milliseconds / HOUR_MS) * HOUR_MS);
}

/** "The quality managers were reminded 1 h ago, the plant director 5 min ago."; null when nobody was. */
export function remindedSentence(reminders: readonly HoldReminder[], now: Date): string | null {
  const told = REMINDER_AUDIENCES.flatMap((audience) => reminders.filter((reminder) => reminder.audience === audience));
  if (told.length === 0) return null;
  const [first, ...rest] = told.map(
    ({ audience, at }) => [AUDIENCE_WORDS[audience], ageWords(Math.max(0, now.getTime() - Date.parse(at)))] as const,
  );
  const verb = told[0].audience === 'director' ? 'was' : 'were';
  const opening = `${first[0][0].toUpperCase()}${first[0].slice(1)} ${verb} reminded ${first[1]} ago`;
  return `${[opening, ...rest.map(([who, ago]) => `${who} ${ago} ago`)].join(', ')}.`;
}
