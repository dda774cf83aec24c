import { useId, useMemo, useRef } from 'react';
import { Chart } from './chart';
import { TIME_AXIS_PX } from './chart-options';
import { useChartTheme } from './chart-theme';
import type { PanePlugin } from './pane-plugin';
import { clampRange, type TimeRange } from './range';
import { useRangeGestures } from './use-range-gestures';
import { useWidth } from './use-width';

export interface Pane {
  key: string;
  /** Title and unit, in the pane's upper left. */
  unit: string;
  /** Share of the height beside the other panes' shares. */
  share: number;
  plugins: readonly PanePlugin[];
  /** The value axis never spans less than this. */
  leastHeight: number;
}

interface PaneStackProps {
  panes: readonly Pane[];
  range: TimeRange;
  bounds: TimeRange;
  /** Where 0 goes back to. */
  home: TimeRange;
  zone: string;
  /** Height of all panes together, CSS pixels. */
  height: number;
  /** What the drawing shows, for those who do not see it. */
  label: string;
  /** Neither pans nor zooms; bounds and range are then the same. */
  isStill?: boolean;
  onRange?: (range: TimeRange) => void;
  onCursor?: (at: number | null) => void;
  onPick?: (at: number, isTouch: boolean) => void;
}

const NARROW_PX = 560;
const stay = () => undefined;
/** Room for the value axis at the left and for the lines' words at the right. */
export const guttersOf = (width: number) => (width < NARROW_PX ? { left: 44, right: 78 } : { left: 56, right: 138 });

/** Panes over one time axis, with one cursor, panned and zoomed together. */
export function PaneStack({ panes, range, bounds, home, zone, height, label, isStill = false, ...on }: PaneStackProps) {
  const element = useRef<HTMLDivElement>(null);
  const width = useWidth(element);
  const theme = useChartTheme();
  const syncKey = useId();
  const gutters = guttersOf(width);
  const whole = useMemo(() => clampRange(range, bounds), [range, bounds]);
  const { onRange = stay, onPick } = on;
  const chosen = useRangeGestures(element, { range: whole, bounds, home, gutters, onRange, onPick });
  const shares = panes.reduce((sum, pane) => sum + pane.share, 0);
  const hintId = useId();
  return (
    <div className="pane-stack-frame">
      <div
        ref={element}
        className="pane-stack"
        role={isStill ? 'img' : 'application'}
        tabIndex={isStill ? undefined : 0}
        aria-label={label}
        aria-describedby={isStill ? undefined : hintId}
      >
        {width > 0 &&
          panes.map((pane, i) => (
            <Chart
              key={pane.key}
              {...{ zone, syncKey, gutters, width, theme, range: whole }}
              unit={pane.unit}
              plugins={pane.plugins}
              leastHeight={pane.leastHeight}
              hasTimeAxis={i === panes.length - 1}
              height={Math.round((height * pane.share) / shares) + (i === panes.length - 1 ? TIME_AXIS_PX : 0)}
              onCursor={on.onCursor}
            />
          ))}
        {chosen !== null && (
          <div
            className="pane-stack-chosen"
            style={{
              left: gutters.left + chosen.from * (width - gutters.left - gutters.right),
              width: (chosen.to - chosen.from) * (width - gutters.left - gutters.right),
            }}
          />
        )}
      </div>
      <p id={hintId} className="pane-stack-hint" hidden={isStill}>
        Drag or arrow keys pan; the wheel, <kbd>+</kbd> and <kbd>−</kbd> zoom; Shift and drag zooms into a span;{' '}
        <kbd>0</kbd> goes back.
      </p>
    </div>
  );
}
