import { isSameUnit } from './names';

/** Symbols before which an SI prefix may stand, and their names in mathjs. */
const WITH_PREFIX: Record<string, string> = {
  ...Object.fromEntries('m g s A K N Pa J W V C F Hz l L bar P St'.split(' ').map((symbol) => [symbol, symbol])),
  Ω: 'ohm',
};
const PREFIX: Record<string, string> = { µ: 'u' };
const PREFIXES = /^(?:da|[GMkhdcmµnp])/;

/** Symbols and words without a prefix, and their names in mathjs or in `DEFINITIONS`. */
const PLAIN: Record<string, string> = {
  '°C': 'degC',
  '°F': 'degF',
  sec: 's',
  min: 'minute',
  h: 'hour',
  hr: 'hour',
  d: 'day',
  t: 'tonne',
  in: 'inch',
  inch: 'inch',
  inches: 'inch',
  Zoll: 'inch',
  '″': 'inch',
  '"': 'inch',
  mil: 'mil',
  mils: 'mil',
  thou: 'mil',
  ft: 'ft',
  yd: 'yard',
  lb: 'lb',
  lbs: 'lb',
  oz: 'oz',
  lbf: 'lbf',
  gf: 'gramForce',
  kgf: 'kgf',
  kp: 'kgf',
  psi: 'psi',
  atm: 'atm',
  Torr: 'torr',
  mmHg: 'mmHg',
  inHg: 'inHg',
  rpm: 'rpm',
  '%': 'percent',
  '‰': 'permille',
  ppm: 'partPerMillion',
  ppb: 'partPerBillion',
};

/**
 * What mathjs lacks, or knows to fewer digits: BIPM, SI Brochure, 9th ed. (poise and stokes, percent); NIST SP 811,
 * appendix B.8 (psi from the exact pound-force and inch, torr, conventional millimetre and inch of mercury).
 */
export const DEFINITIONS: Record<string, { definition: string; prefixes?: string }> = {
  P: { definition: '0.1 Pa s', prefixes: 'short' },
  St: { definition: '1 cm^2 / s', prefixes: 'short' },
  psi: { definition: '1 lbf / inch^2' },
  torr: { definition: '133.3223684210526315789473684210526315789 Pa' },
  mmHg: { definition: '133.322387415 Pa' },
  inHg: { definition: '3386.389 Pa' },
  gramForce: { definition: '0.00980665 N' },
  rpm: { definition: '1 / minute' },
  percent: { definition: '0.01 ratioOfOne' },
  permille: { definition: '0.001 ratioOfOne' },
  partPerMillion: { definition: '0.000001 ratioOfOne' },
  partPerBillion: { definition: '0.000000001 ratioOfOne' },
};

/** Spellings in which factors are written together. */
const TOGETHER: [RegExp, string][] = [
  [/^([mk]?Pa)s$/, '$1·s'],
  [/^([mk]?N)([cm]?m)$/, '$1·$2'],
  [/^(?:r|U|rev)\/min$/i, 'rpm'],
];

/** Units of the trade, under which other spellings ("MM", "Kpa", "PSI") are looked for. */
const USUAL =
  'nm µm mm cm dm m km mil in ft mg g kg t mbar bar hPa kPa MPa Pa psi °C °F K mN N kN mPa·s Pa·s cP g/m2 g/cm3 kg/m3 g/l % ‰ ppm s min h ml l mV V mA A Hz kHz m/min m/s rpm'.split(
    ' ',
  );

/**
 * The unit as an expression of mathjs, or null when a symbol in it is not known.
 *
 * @param folded a unit as `foldUnit` writes it, such as "g/m2" or "mPa·s"
 */
export function toExpression(folded: string): string | null {
  const direct = parse(folded);
  if (direct !== null) return direct;
  const usual = USUAL.filter((unit) => isSameUnit(unit, folded));
  return usual.length === 1 ? parse(usual[0]) : null;
}

function parse(folded: string): string | null {
  const [spelling, as] = TOGETHER.find(([one]) => one.test(folded)) ?? [/$^/, ''];
  const text = folded.replace(spelling, as);
  const parts = text.split('/');
  if (text === '' || parts.length > 2) return null;
  const sides = parts.map((side) => {
    const factors = side
      .replace(/^\((.*)\)$/, '$1')
      .split('·')
      .map(parseFactor);
    return factors.includes(null) ? null : factors.join(' ');
  });
  if (sides.includes(null)) return null;
  const isPlainNumber = sides.every((side) => /^[1 ]+$/.test(side!));
  return isPlainNumber ? 'ratioOfOne' : sides.map((side) => (side === '1' ? '1' : `(${side})`)).join(' / ');
}

function parseFactor(factor: string): string | null {
  if (factor === '1') return '1';
  const [, symbol, power] = /^(\D+?)(-?[1-4])?$/.exec(factor) ?? [];
  const name = symbol === undefined ? undefined : nameOf(symbol);
  return name === undefined ? null : power === undefined ? name : `${name}^${power}`;
}

function nameOf(symbol: string): string | undefined {
  const plain = PLAIN[symbol] ?? WITH_PREFIX[symbol];
  const prefix = PREFIXES.exec(symbol)?.[0];
  const base = prefix === undefined ? undefined : WITH_PREFIX[symbol.slice(prefix.length)];
  return plain ?? (base === undefined ? undefined : `${PREFIX[prefix!] ?? prefix}${base}`);
}

/** The usual units of one quantity, for choices. */
export const USUAL_UNITS: readonly string[] = USUAL;
