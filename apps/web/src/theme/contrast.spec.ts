import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** WCAG 2.2, "relative luminance" and "contrast ratio". */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [dark, light] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return (light + 0.05) / (dark + 0.05);
}

const palette = Object.fromEntries(
  [...readFileSync(join(__dirname, 'base.css'), 'utf8').matchAll(/--([a-z-]+): (#[0-9a-f]{6});/g)].map((match) => [
    match[1],
    match[2],
  ]),
);
const TEXTS = ['ink', 'ink-soft', 'blue', 'ochre', 'rust', 'plum', 'grey-green', 'teal', 'olive'];

test('black on white has the contrast 21 that the guideline names', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
});

describe.each(['day', 'night'])('by %s', (time) => {
  test.each(TEXTS)('%s can be read on the ground and on a sheet', (name) => {
    for (const paper of ['ground', 'sheet']) {
      expect(contrast(palette[`${time}-${name}`], palette[`${time}-${paper}`])).toBeGreaterThanOrEqual(4.5);
    }
  });

  test('the words on the main action can be read', () => {
    expect(contrast(palette[`${time}-blue`], palette[`${time}-blue-ink`])).toBeGreaterThanOrEqual(4.5);
  });

  test('outlines that carry meaning stand out from a sheet', () => {
    expect(contrast(palette[`${time}-rule-meaning`], palette[`${time}-sheet`])).toBeGreaterThanOrEqual(3);
  });
});
