import { useCallback, useEffect, useRef, useState } from 'react';
import { isSameRange, type TimeRange } from './range';

const SETTLE_MS = 250;

/**
 * The range on the screen, which follows the hand at once, and its settled value, handed to `onSettle` when the hand has
 * rested. A new `settled` from outside (the address bar, another link) replaces what is on the screen.
 */
export function useLiveRange(
  settled: TimeRange,
  onSettle: (range: TimeRange) => void,
): [TimeRange, (range: TimeRange) => void] {
  const [live, setLive] = useState(settled);
  const [known, setKnown] = useState(settled);
  if (!isSameRange(known, settled)) {
    setKnown(settled);
    setLive(settled);
  }
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const settle = useRef(onSettle);
  useEffect(() => {
    settle.current = onSettle;
  });
  useEffect(() => () => clearTimeout(timer.current), []);
  const follow = useCallback((range: TimeRange) => {
    setLive(range);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => settle.current(range), SETTLE_MS);
  }, []);
  return [live, follow];
}
