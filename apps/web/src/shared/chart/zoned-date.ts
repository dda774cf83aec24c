const formatters = new Map<string, Intl.DateTimeFormat>();

function formatterOf(zone: string): Intl.DateTimeFormat {
  let formatter = formatters.get(zone);
  if (formatter === undefined) {
    formatter = new Intl.DateTimeFormat('en-GB', {
      timeZone: zone,
      hourCycle: 'h23',
      year: 'numeric',
      month: '2-digit',
      day: '2-digit',
      hour: '2-digit',
      minute: '2-digit',
      second: '2-digit',
    });
    formatters.set(zone, formatter);
  }
  return formatter;
}

/**
 * A Date whose local fields show what the zone's clocks show at the instant: what uPlot's `tzDate` option wants. The same as
 * its own uPlot.tzDate, with the formatter kept, since an axis asks hundreds of times while it is zoomed.
 */
export function zonedDate(at: number, zone: string): Date {
  const field: Record<string, number> = {};
  for (const { type, value } of formatterOf(zone).formatToParts(at)) field[type] = Number(value);
  const milliseconds = ((at % 1000) + 1000) % 1000;
  return new Date(field.year, field.month - 1, field.day, field.hour, field.minute, field.second, milliseconds);
}
