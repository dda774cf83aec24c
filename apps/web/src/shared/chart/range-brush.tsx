import { memo, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import { mergeColumns, type Columns } from './columns';
import { guttersOf } from './pane-stack';
import { clampRange, panRange, SHORTEST_SPAN_MS, type TimeRange } from './range';
import { useWidth } from './use-width';

interface RangeBrushProps {
  range: TimeRange;
  bounds: TimeRange;
  /** The whole record, drawn small behind the window. */
  columns: Columns | null;
  breaks: readonly number[];
  format: (at: number) => string;
  onRange: (range: TimeRange) => void;
}

type Part = 'from' | 'to' | 'window';
const HEIGHT = 36;
const STEP_SHARE = 0.02;

/** The whole record with a window on what is shown above: drag it, or its ends; arrow keys move each. */
export function RangeBrush({ range, bounds, columns, breaks, format, onRange }: RangeBrushProps) {
  const element = useRef<HTMLDivElement>(null);
  const [held, setHeld] = useState<{ part: Part; x: number; range: TimeRange } | null>(null);
  const width = useWidth(element);
  const { left, right } = guttersOf(width);
  const inner = Math.max(width - left - right, 1);
  const whole = Math.max(bounds.to - bounds.from, 1);
  const place = (at: number) => left + ((at - bounds.from) / whole) * inner;

  const move = (part: Part, from: TimeRange, by: number) => {
    if (part === 'window') onRange(clampRange({ from: from.from + by, to: from.to + by }, bounds));
    if (part === 'from')
      onRange({ from: Math.max(Math.min(from.from + by, from.to - SHORTEST_SPAN_MS), bounds.from), to: from.to });
    if (part === 'to')
      onRange({ from: from.from, to: Math.min(Math.max(from.to + by, from.from + SHORTEST_SPAN_MS), bounds.to) });
  };
  const grip = (part: Part) => ({
    onPointerDown: (event: PointerEvent) => {
      event.currentTarget.setPointerCapture(event.pointerId);
      setHeld({ part, x: event.clientX, range });
    },
    onPointerMove: (event: PointerEvent) => {
      if (held?.part === part) move(part, held.range, ((event.clientX - held.x) / inner) * whole);
    },
    onPointerUp: () => setHeld(null),
    onPointerCancel: () => setHeld(null),
    onKeyDown: (event: KeyboardEvent) => {
      const sign = event.key === 'ArrowLeft' ? -1 : event.key === 'ArrowRight' ? 1 : 0;
      if (sign === 0) return;
      event.preventDefault();
      if (part === 'window') onRange(panRange(range, sign * 0.2, bounds));
      else move(part, range, sign * STEP_SHARE * whole);
    },
  });
  const slider = (part: 'from' | 'to') => ({
    role: 'slider',
    tabIndex: 0,
    'aria-label': part === 'from' ? 'Shown from' : 'Shown until',
    'aria-valuemin': bounds.from,
    'aria-valuemax': bounds.to,
    'aria-valuenow': Math.round(range[part]),
    'aria-valuetext': format(range[part]),
  });

  return (
    <div ref={element} className="range-brush" style={{ height: HEIGHT }}>
      {width > 0 && (
        <>
          <svg width={width} height={HEIGHT} aria-hidden="true">
            {columns !== null && <Ink columns={columns} bounds={bounds} inner={inner} left={left} />}
            {breaks.map((at) => (
              <line key={at} className="range-brush-break" x1={place(at)} x2={place(at)} y1={0} y2={HEIGHT} />
            ))}
          </svg>
          <div
            className="range-brush-window"
            style={{ left: place(range.from), width: Math.max(place(range.to) - place(range.from), 4) }}
            {...grip('window')}
          />
          {(['from', 'to'] as const).map((part) => (
            <div
              key={part}
              className="range-brush-end"
              style={{ left: place(range[part]) }}
              {...slider(part)}
              {...grip(part)}
            />
          ))}
        </>
      )}
    </div>
  );
}

interface InkProps {
  columns: Columns;
  bounds: TimeRange;
  inner: number;
  left: number;
}

/** Drawn once, not with every move of the window. */
const Ink = memo(function Ink({ columns, bounds, inner, left }: InkProps) {
  return <path className="range-brush-ink" d={inkPath(columns, bounds, inner, left)} />;
});

function inkPath(columns: Columns, bounds: TimeRange, inner: number, left: number): string {
  const { at, low, high } = mergeColumns(columns, bounds.from, bounds.to, inner / 1.5);
  const least = Math.min(...low);
  const most = Math.max(...high);
  const scale = (value: number) => 3 + ((most - value) / (most - least || 1)) * (HEIGHT - 6);
  return at
    .map((time, i) => {
      const x = left + ((time - bounds.from) / (bounds.to - bounds.from)) * inner;
      return `M${x.toFixed(1)},${scale(high[i]).toFixed(1)}V${(scale(low[i]) + 0.75).toFixed(1)}`;
    })
    .join('');
}
