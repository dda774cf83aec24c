import type { LotMark } from '@app/contracts';
import { MARK_EXTENT, markParts } from './mark-shapes';
import { markWords } from './mark-words';

interface MarkProps {
  mark: LotMark;
  size?: number;
  /** Beside words that say the same, the mark is silent. */
  isSilent?: boolean;
}

export function Mark({ mark, size = 20, isSilent = false }: MarkProps) {
  const label = markWords(mark);
  const naming = isSilent ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label };
  const box = `${-MARK_EXTENT} ${-MARK_EXTENT} ${2 * MARK_EXTENT} ${2 * MARK_EXTENT}`;
  return (
    <svg className="mark" width={size} height={size} viewBox={box} {...naming}>
      {!isSilent && <title>{label}</title>}
      <MarkPaths mark={mark} />
    </svg>
  );
}

/** The mark's shapes alone, to stand in a larger drawing. */
export function MarkPaths({ mark }: { mark: LotMark }) {
  return markParts(mark).map((part, index) => (
    <path
      key={index}
      d={part.path}
      fill={part.fill === null ? 'none' : `var(--${part.fill})`}
      stroke={part.stroke === null ? 'none' : `var(--${part.stroke})`}
      strokeWidth={part.strokeWidth}
      opacity={part.opacity}
    />
  ));
}
