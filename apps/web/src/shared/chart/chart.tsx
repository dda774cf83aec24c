import { useEffect, useLayoutEffect, useRef } from 'react';
import uPlot from 'uplot';
import 'uplot/dist/uPlot.min.css';
import { chartOptions, type ChartContent, type ChartFrame } from './chart-options';
import './chart.css';

export interface ChartProps extends ChartFrame, ChartContent {
  width: number;
  height: number;
}

/**
 * The one owner of uPlot's life: builds it, feeds it, sizes it, ends it. uPlot is used directly because uplot-react's types
 * need the global JSX namespace that React 19 dropped, and because it builds the chart anew whenever an option is a new object.
 */
export function Chart(props: ChartProps) {
  const { zone, unit, hasTimeAxis, syncKey, gutters, width, height, range, plugins, theme, leastHeight } = props;
  const { left, right } = gutters;
  const host = useRef<HTMLDivElement>(null);
  const chart = useRef<uPlot>(null);
  const content = useRef<ChartContent>(props);
  const size = useRef({ width, height });

  useLayoutEffect(() => {
    content.current = props;
    size.current = { width, height };
  });

  useLayoutEffect(() => {
    if (host.current === null) return;
    const { from, to } = content.current.range;
    const frame = { zone, unit, hasTimeAxis, syncKey, gutters: { left, right } };
    const options = chartOptions(frame, size.current, () => content.current);
    chart.current = new uPlot(
      options,
      [
        [from, to],
        [null, null],
      ],
      host.current,
    );
    return () => {
      chart.current?.destroy();
      chart.current = null;
    };
  }, [zone, unit, hasTimeAxis, syncKey, left, right]);

  useEffect(() => {
    chart.current?.setSize({ width, height });
  }, [width, height]);

  useEffect(() => {
    // Setting the time scale ranges the value scale anew and draws.
    chart.current?.setScale('x', { min: range.from, max: range.to });
  }, [range.from, range.to, plugins, theme, leastHeight]);

  return <div ref={host} className="chart" style={{ height }} aria-hidden="true" />;
}
