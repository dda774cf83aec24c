const NARROW_SPACE = '\u202f';

/** "1200 m", or a dash where nobody said. */
export function quantityWords(lot: { quantity: number | null; quantityUnit: string | null }): string {
  if (lot.quantity === null) return '–';
  return lot.quantityUnit === null ? String(lot.quantity) : `${lot.quantity}${NARROW_SPACE}${lot.quantityUnit}`;
}
