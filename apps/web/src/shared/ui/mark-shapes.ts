import type { Disposition, LotMark } from '@app/contracts';
import type { ColourToken } from '../theme/token-colour';

/** One stroke or filled shape of a mark. Path data in a square from −10 to 10, its centre at the lot. */
export interface MarkPart {
  path: string;
  fill: ColourToken | null;
  stroke: ColourToken | null;
  strokeWidth: number;
  opacity: number;
}

export const MARK_EXTENT = 10;

const circle = (r: number) => `M${-r},0a${r},${r} 0 1 0 ${2 * r},0a${r},${r} 0 1 0 ${-2 * r},0Z`;
const diamond = (r: number) => `M0,${-r}L${r},0L0,${r}L${-r},0Z`;

const DOT = circle(2.8);
const DOT_OUTLINE = circle(5.2);
const DIAMOND = diamond(4);
const DIAMOND_OUTLINE = diamond(6.6);
const DASH = 'M-3.5,0H3.5';
const DASH_OUTLINE = 'M-5.5,-2.5H5.5V2.5H-5.5Z';
const TICK = 'M0,-10V-6.5';
const BRACKETS = 'M-6.8,-8H-9.2V8H-6.8M6.8,-8H9.2V8H6.8';
const RING_WITH_GAP = 'M3.4,-7.6A8.3,8.3 0 1 1 -3.4,-7.6';
const SALTIRE = 'M-7,-7L7,7M7,-7L-7,7';
const RING_WITH_ARROW = 'M8.3,0A8.3,8.3 0 1 1 2.8,-7.8M-0.6,-9.8L3.6,-7.5L0.6,-3.9';
const RING = circle(8.3);
const HALF_DISC = 'M0,-8.3A8.3,8.3 0 0 0 0,8.3Z';
const STRIKE = 'M-9,4.5L9,-4.5';

/** The parts of a lot's mark, in drawing order: shape first, colour second. */
export function markParts(mark: LotMark): MarkPart[] {
  const parts: MarkPart[] = [];
  if (mark.disposition !== null) parts.push(...dispositionParts(mark.disposition));
  parts.push(...verdictParts(mark));
  if (mark.hasNotice) parts.push(line(TICK, 'notice', 1.8));
  if (mark.holdState === 'open') parts.push(line(BRACKETS, 'held', 1.8));
  if (mark.isExcluded) parts.push(line(STRIKE, 'ink', 1));
  return parts;
}

function verdictParts(mark: LotMark): MarkPart[] {
  const isOutside = mark.specificationState === 'outside_specification';
  if (mark.controlState === 'not_scored') {
    const dash = line(DASH, isOutside ? 'held' : 'ink-soft', 1.8);
    return isOutside ? [dash, line(DASH_OUTLINE, 'held', 1.3)] : [dash];
  }
  const isDiamond = mark.controlState === 'outside_control_limits';
  const tone: ColourToken = isDiamond || isOutside ? 'held' : 'ink';
  const core: MarkPart = {
    path: isDiamond ? DIAMOND : DOT,
    fill: mark.isProvisional ? 'sheet' : tone,
    stroke: tone,
    strokeWidth: 1.3,
    opacity: 1,
  };
  return isOutside ? [core, line(isDiamond ? DIAMOND_OUTLINE : DOT_OUTLINE, tone, 1.3)] : [core];
}

function dispositionParts(disposition: Disposition): MarkPart[] {
  switch (disposition) {
    case 'release':
      return [line(RING_WITH_GAP, 'released', 1.6)];
    case 'scrap':
      return [line(SALTIRE, 'scrapped', 1.8)];
    case 'rework':
      return [line(RING_WITH_ARROW, 'rework', 1.6)];
    case 'concession':
    case 'regrade':
      return [
        { path: HALF_DISC, fill: 'rework', stroke: null, strokeWidth: 0, opacity: 0.35 },
        line(RING, 'rework', 1.4),
      ];
  }
}

const line = (path: string, stroke: ColourToken, strokeWidth: number): MarkPart => ({
  path,
  fill: null,
  stroke,
  strokeWidth,
  opacity: 1,
});
