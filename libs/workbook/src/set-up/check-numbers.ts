import type { LooseDocument, Say } from './loose';

const isNumber = (value: unknown): value is number => typeof value === 'number';

/** Numbers that must stand in an order, and cells that are needed together. */
export function checkNumbers({ plant, specifications, channels }: LooseDocument, say: Say): void {
  plant?.forEach(
    ({ reminderManagerHours, reminderDirectorHours, allowanceNoticePercent, allowanceCapPercent }, index) => {
      if (
        isNumber(reminderManagerHours) &&
        isNumber(reminderDirectorHours) &&
        reminderDirectorHours < reminderManagerHours
      )
        say(
          'plant',
          index,
          'reminderDirectorHours',
          'reminders-reversed',
          `Directors would be reminded after ${reminderDirectorHours} h, before quality managers after ${reminderManagerHours} h.`,
          'Write the longer time here.',
        );
      if (
        isNumber(allowanceNoticePercent) &&
        isNumber(allowanceCapPercent) &&
        allowanceCapPercent < allowanceNoticePercent
      )
        say(
          'plant',
          index,
          'allowanceCapPercent',
          'allowances-reversed',
          `The cap of ${allowanceCapPercent} % lies below the notice of ${allowanceNoticePercent} %.`,
          'Write the larger share here.',
        );
    },
  );
  specifications?.forEach(({ lower, upper }, index) => {
    if (isNumber(lower) && isNumber(upper) && !(lower < upper))
      say(
        'specifications',
        index,
        'lower',
        'limits-reversed',
        `The lower specification limit ${lower} is not below the upper one, ${upper}.`,
        'Change one of both.',
      );
    if (lower === null && upper === null)
      say(
        'specifications',
        index,
        'lower',
        'no-limit',
        'Both specification limits are empty.',
        'Fill in one at least.',
      );
  });
  channels?.forEach(({ gauge, gaugeSince }, index) => {
    if (typeof gauge === 'string' && gaugeSince === null)
      say(
        'channels',
        index,
        'gaugeSince',
        'missing',
        'Gauge since is empty.',
        'Write since when the gauge serves here.',
      );
    if (gauge === null && isNumber(gaugeSince))
      say('channels', index, 'gauge', 'missing', 'Gauge is empty, but a time stands beside it.', 'Name the gauge.');
  });
}
