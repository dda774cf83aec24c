/** The colours that a canvas may draw with, by the names of theme/functional.css. */
export type ColourToken =
  | 'ground'
  | 'sheet'
  | 'grid'
  | 'ink'
  | 'ink-soft'
  | 'rule-meaning'
  | 'action'
  | 'action-ink'
  | 'baseline'
  | 'baseline-band'
  | 'held'
  | 'scrapped'
  | 'released'
  | 'rework'
  | 'notice';

/** The token's colour in the theme shown now, as text that canvas understands. Ask again when the theme changes. */
export function tokenColour(token: ColourToken): string {
  const probe = document.createElement('span');
  probe.style.color = `var(--${token})`;
  document.body.append(probe);
  const colour = getComputedStyle(probe).color;
  probe.remove();
  return colour;
}
