/** Folds a name to what is compared: letters and digits alone, lower case, without accents ("Lot-Nr." is "lotnr"). */
export const foldName = (text: string): string =>
  text
    .normalize('NFKD')
    .toLowerCase()
    .replace(/ß/g, 'ss')
    .replace(/[^\p{L}\p{N}]/gu, '');

const UNIT_WORDS: Record<string, string> = {
  micron: 'µm',
  microns: 'µm',
  gsm: 'g/m2',
  percent: '%',
  prozent: '%',
  sec: 's',
  degc: '°C',
  degf: '°F',
};

/**
 * Folds a unit to one spelling: both micro signs and a leading u are µ, superscripts are digits (g/m² is g/m2),
 * blanks go, every multiplication sign is ·, "deg C" is °C. Upper and lower case stay, since mPa is not MPa.
 */
export function foldUnit(unit: string): string {
  const folded = unit
    .normalize('NFKC')
    .replace(/\s/g, '')
    .replace(/\u03bc/g, 'µ')
    .replace(/^u(?=(m|g|l|L|s|A|V|N)$)/, 'µ')
    .replace(/\^/g, '')
    .replace(/[*.⋅∙•×]/g, '·')
    .replace(/−/g, '-')
    .replace(/^[°º]/, '°');
  return UNIT_WORDS[folded.toLowerCase()] ?? folded;
}

/** Whether two spellings name one unit; case counts only in a first m or M before another letter than m (mPa, MPa). */
export function isSameUnit(one: string, other: string): boolean {
  const [a, b] = [foldUnit(one), foldUnit(other)];
  if (a === b) return true;
  const isPrefixClash = a[0] !== b[0] && /^m/i.test(a) && a.slice(1) === b.slice(1) && a.length > 1 && a[1] !== 'm';
  return !isPrefixClash && a.toLowerCase() === b.toLowerCase();
}

export interface NamedUnit {
  name: string;
  unit: string | null;
}

/** Splits "Thickness [µm]", "Thickness (µm)" or "Dicke in µm" into the name and the unit. */
export function splitUnit(header: string): NamedUnit {
  const text = header.replace(/\s+/g, ' ').trim();
  const match = /^(.*?)\s*(?:\[([^\]]*)\]|\(([^)]*)\))$/.exec(text) ?? /^(.+?) in (\S+)$/i.exec(text);
  if (!match) return { name: text, unit: null };
  const unit = (match[2] ?? match[3] ?? '').trim();
  return unit === '' || unit === '-' ? { name: match[1], unit: null } : { name: match[1], unit };
}
