import { foldUnit } from '../reading/names';

/** Symbols that stand alone or after a prefix (BIPM, SI Brochure, 9th ed., tables 2, 4, 7 and 8), and those of the trade. */
const SYMBOLS = new Set(
  (
    'm g s A K mol cd rad sr Hz N Pa J W C V F Ω S Wb T H lm lx Bq Gy Sv kat L l t eV Da u bar min h d a ha ° °C °F °d ′ ″ % ‰ ppm ppb dB dBm St P ' +
    'VA var Wh gf kgf lb lbf oz in ft yd psi inHg mmHg Torr atm mil RH %RH NTU FNU HU HV HRC HB GU ShoreA ShoreD rpm r/min 1/min pcs pc st Stk DIN den tex dtex cP'
  ).split(' '),
);
const PREFIX = /^(da|[QRYZEPTGMkhdcmµnpfazyrq])/;

/** Whether a unit is made of symbols that are known, with SI prefixes, exponents, · and /: "g/m²", "mPa·s", "1/min". The empty unit is. */
export function isKnownUnit(unit: string): boolean {
  const folded = foldUnit(unit);
  if (folded === '' || folded === '1' || SYMBOLS.has(folded)) return true;
  return folded.split(/[·/]/).every((part) => part === '1' || isFactor(part.replace(/^\(|\)$/g, '')));
}

function isFactor(part: string): boolean {
  const symbol = part.replace(/-?\d+$/, '');
  return SYMBOLS.has(symbol) || SYMBOLS.has(symbol.replace(PREFIX, ''));
}
