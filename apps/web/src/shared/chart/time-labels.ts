const DAY_MS = 86_400_000;

function formatters(zone: string) {
  const of = (options: Intl.DateTimeFormatOptions) =>
    new Intl.DateTimeFormat('en-GB', { timeZone: zone, hourCycle: 'h23', ...options });
  return {
    day: of({ day: 'numeric', month: 'short' }),
    year: of({ year: 'numeric' }),
    month: of({ month: 'short' }),
    minute: of({ hour: '2-digit', minute: '2-digit' }),
    second: of({ hour: '2-digit', minute: '2-digit', second: '2-digit' }),
  };
}
const known = new Map<string, ReturnType<typeof formatters>>();
function formattersOf(zone: string) {
  let found = known.get(zone);
  if (!found) known.set(zone, (found = formatters(zone)));
  return found;
}

/**
 * Words under the splits of a time axis in the plant's zone, 24-hour: times of day with the date under the first one of each
 * day, or dates with the year under the first one of each year when the splits lie a day or more apart.
 */
export function timeLabels(splits: readonly number[], stepMs: number, zone: string): string[] {
  const { day, year, month, minute, second } = formattersOf(zone);
  const isDaily = stepMs >= DAY_MS;
  const isMonthly = stepMs >= 28 * DAY_MS;
  let previous = '';
  return splits.map((at) => {
    const group = isDaily ? year.format(at) : day.format(at);
    const main = isMonthly ? month : isDaily ? day : stepMs < 60_000 ? second : minute;
    const text = group === previous ? main.format(at) : `${main.format(at)}\n${group}`;
    previous = group;
    return text;
  });
}
