import {
  decimalsOf,
  formatNumber,
  formatValue,
  type Characteristic,
  type SpecificationLimits,
  type SpecificationVersionView,
} from '@app/contracts';

/** Versions by when they hold: still to come, in force now, and earlier ones. */
export function sortVersions(versions: readonly SpecificationVersionView[], now: number) {
  const upcoming = versions.filter(({ validFrom }) => Date.parse(validFrom) > now);
  const started = versions.filter(({ validFrom }) => Date.parse(validFrom) <= now);
  const inForce = started.find(({ until }) => until === null || Date.parse(until) > now) ?? null;
  return { upcoming, inForce, earlier: started.filter((version) => version !== inForce) };
}

/** A value at the characteristic's resolution, with more decimals where it has them: a stated limit is never rounded. */
export function statedValue(value: number, { unit, resolution }: Pick<Characteristic, 'unit' | 'resolution'>): string {
  const rounded = Number(value.toFixed(decimalsOf(resolution)));
  if (rounded === value) return formatValue(value, { unit, resolution });
  const decimals = String(value).split('.')[1]?.length ?? 0;
  return unit === '' ? formatNumber(value, decimals) : `${formatNumber(value, decimals)}\u202f${unit}`;
}

/** "180.0 g/m², specification limits 178.0 and 182.0 g/m²", or the one that is stated. */
export function limitsWords(limits: SpecificationLimits, characteristic: Characteristic): string {
  const value = (number: number) => statedValue(number, characteristic);
  const nominal = `nominal value ${value(limits.nominal)}`;
  const { lower, upper } = limits;
  if (lower === null) return `${nominal}, at most ${upper === null ? '–' : value(upper)}`;
  if (upper === null) return `${nominal}, at least ${value(lower)}`;
  return `${nominal}, specification limits ${value(lower)} and ${value(upper)}`;
}

export const appliesWords = ({ appliesToIndividuals }: Pick<SpecificationLimits, 'appliesToIndividuals'>): string =>
  appliesToIndividuals ? 'every reading' : 'lot mean only';
