export const TRACE_WIDTH = 1440;
export const TRACE_HEIGHT = 220;

const STEP = 36;
const HELD_AT = 26;

/** The drawn slow movement: three slow waves, no data. */
const movement = (x: number) =>
  TRACE_HEIGHT / 2 + 34 * Math.sin(x / 260) + 14 * Math.sin(x / 97 + 1.3) - (24 * x) / TRACE_WIDTH;

const rounded = (value: number) => Math.round(value * 10) / 10;

export function tracePath(): string {
  const points: string[] = [];
  for (let x = 0; x <= TRACE_WIDTH; x += 12) points.push(`${x},${rounded(movement(x))}`);
  return `M${points.join('L')}`;
}

export function traceLots(): { x: number; y: number; isHeld: boolean }[] {
  return Array.from({ length: Math.floor(TRACE_WIDTH / STEP) }, (_, index) => {
    const x = STEP / 2 + index * STEP;
    const isHeld = index === HELD_AT;
    const scatter = isHeld ? 62 : 13 * Math.sin(index * 12.9898) * Math.cos(index * 4.1414);
    return { x, y: rounded(movement(x) + scatter), isHeld };
  });
}
