const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/** A decimal number as it stands, with a point; undefined for anything else. Infinite where it is too large for double precision. */
export const parseNumber = (text: string): number | undefined => (NUMBER.test(text) ? Number(text) : undefined);
