/** Numbers as Ebbline shows them: the characteristic's own resolution, U+2212 for minus, a narrow no-break space before the unit. */
const MINUS = '\u2212';
const NARROW_SPACE = '\u202f';

/** Decimals that a resolution needs: 0.01 → 2, 0.5 → 1, 1 → 0, 10 → 0. */
export function decimalsOf(resolution: number): number {
  if (!(resolution > 0)) return 2;
  for (let decimals = 0; decimals < 9; decimals++) {
    const scaled = resolution * 10 ** decimals;
    if (Math.abs(scaled - Math.round(scaled)) < 1e-9 * scaled) return decimals;
  }
  return 9;
}

/** A number with a fixed count of decimals and a real minus sign; a rounded zero carries no sign. */
export function formatNumber(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? MINUS + text : text;
}

/** A characteristic such as pH has no unit. */
function withUnit(number: string, unit: string): string {
  return unit === '' ? number : number + NARROW_SPACE + unit;
}

export function formatValue(value: number, characteristic: { unit: string; resolution: number }): string {
  return withUnit(formatNumber(value, decimalsOf(characteristic.resolution)), characteristic.unit);
}

/** A mean shows one decimal more than a single reading. */
export function formatMean(value: number, characteristic: { unit: string; resolution: number }): string {
  return withUnit(formatNumber(value, decimalsOf(characteristic.resolution) + 1), characteristic.unit);
}

/** A span of time in words, two units at most: "3 h 12 min", "2 d 4 h", "under a minute". */
export function formatSpan(milliseconds: number): string {
  const minutes = Math.floor(milliseconds / 60_000);
  if (minutes < 1) return 'under a minute';
  const days = Math.floor(minutes / 1440);
  const hours = Math.floor((minutes % 1440) / 60);
  const rest = minutes % 60;
  if (days > 0) return hours > 0 ? `${days} d ${hours} h` : `${days} d`;
  if (hours > 0) return rest > 0 ? `${hours} h ${rest} min` : `${hours} h`;
  return `${rest} min`;
}
