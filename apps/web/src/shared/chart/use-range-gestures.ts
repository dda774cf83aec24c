import { useEffect, useRef, useState, type RefObject } from 'react';
import { isSameRange, panRange, rangeForKey, zoomRange, type TimeRange } from './range';

const CLICK_PX = 4;
const WHEEL_STEP = 0.0018;

interface GestureOptions {
  range: TimeRange;
  bounds: TimeRange;
  home: TimeRange;
  gutters: { left: number; right: number };
  onRange: (range: TimeRange) => void;
  /** A click, or a tap with `isTouch`, at an instant. */
  onPick?: (at: number, isTouch: boolean) => void;
}

/** Share of the pane's width, from its left end, at which a span is being chosen with Shift held. */
export interface ChosenSpan {
  from: number;
  to: number;
}

/**
 * Wheel zooms about the pointer (sideways it pans), dragging pans, dragging with Shift zooms into the span, two fingers pinch,
 * keys as in `rangeForKey`. A wheel turn that changes nothing is left to the page, so that it scrolls on.
 */
export function useRangeGestures(element: RefObject<HTMLElement | null>, options: GestureOptions): ChosenSpan | null {
  const latest = useRef(options);
  useEffect(() => {
    latest.current = options;
  });
  const [chosen, setChosen] = useState<ChosenSpan | null>(null);

  useEffect(() => {
    const target = element.current;
    if (target === null) return;
    const gestures = startGestures(target, () => latest.current, setChosen);
    return () => gestures.abort();
  }, [element]);
  return chosen;
}

type Pointers = Map<number, { startX: number; x: number }>;

function startGestures(
  target: HTMLElement,
  latest: () => GestureOptions,
  setChosen: (span: ChosenSpan | null) => void,
) {
  const listening = new AbortController();
  const { signal } = listening;
  const pointers: Pointers = new Map();
  let isChoosing = false;
  let hasMoved = false;
  let pinch = 0;

  const shareAt = (clientX: number) => {
    const box = target.getBoundingClientRect();
    const { left, right } = latest().gutters;
    return (clientX - box.left - left) / Math.max(box.width - left - right, 1);
  };
  const instantAt = (share: number) => {
    const { range } = latest();
    return range.from + share * (range.to - range.from);
  };
  const change = (next: TimeRange) => {
    if (isSameRange(next, latest().range)) return false;
    latest().range = next;
    latest().onRange(next);
    return true;
  };

  const onWheel = (event: WheelEvent) => {
    const { range, bounds } = latest();
    const unit = event.deltaMode === 1 ? 16 : 1;
    const isSideways = Math.abs(event.deltaX) > Math.abs(event.deltaY);
    const next = isSideways
      ? panRange(range, (event.deltaX * unit) / target.clientWidth, bounds)
      : zoomRange(range, Math.exp(event.deltaY * unit * WHEEL_STEP), instantAt(shareAt(event.clientX)), bounds);
    if (change(next)) event.preventDefault();
  };

  const onDown = (event: PointerEvent) => {
    const share = shareAt(event.clientX);
    if (event.button !== 0 || share < 0 || share > 1) return;
    pointers.set(event.pointerId, { startX: event.clientX, x: event.clientX });
    isChoosing = event.shiftKey;
    hasMoved = pointers.size > 1;
    pinch = spread(pointers);
  };

  const onMove = (event: PointerEvent) => {
    const pointer = pointers.get(event.pointerId);
    if (pointer === undefined) return;
    const moved = event.clientX - pointer.x;
    if (!hasMoved && Math.abs(event.clientX - pointer.startX) < CLICK_PX) return;
    if (!hasMoved) target.setPointerCapture(event.pointerId);
    hasMoved = true;
    pointer.x = event.clientX;
    const { range, bounds } = latest();
    if (pointers.size === 2) {
      const wide = spread(pointers);
      if (pinch > 0 && wide > 0) change(zoomRange(range, pinch / wide, instantAt(shareAt(middle(pointers))), bounds));
      pinch = wide;
    } else if (isChoosing) {
      setChosen(ordered(shareAt(pointer.startX), shareAt(event.clientX)));
    } else {
      const { left, right } = latest().gutters;
      change(panRange(range, -moved / Math.max(target.clientWidth - left - right, 1), bounds));
    }
  };

  const onUp = (event: PointerEvent) => {
    const pointer = pointers.get(event.pointerId);
    if (pointer === undefined) return;
    pointers.delete(event.pointerId);
    const share = shareAt(event.clientX);
    if (!hasMoved && event.type === 'pointerup') latest().onPick?.(instantAt(share), event.pointerType === 'touch');
    if (isChoosing && hasMoved) {
      const span = ordered(shareAt(pointer.startX), share);
      if (span.to > span.from) change({ from: instantAt(span.from), to: instantAt(span.to) });
    }
    isChoosing = false;
    setChosen(null);
  };

  const onKey = (event: KeyboardEvent) => {
    if (event.target !== target || event.ctrlKey || event.metaKey || event.altKey) return;
    const { range, bounds, home } = latest();
    const next = rangeForKey(event.key, range, bounds, home);
    if (next === undefined) return;
    event.preventDefault();
    change(next);
  };

  target.addEventListener('wheel', onWheel, { passive: false, signal });
  target.addEventListener('pointerdown', onDown, { signal });
  target.addEventListener('pointermove', onMove, { signal });
  target.addEventListener('pointerup', onUp, { signal });
  target.addEventListener('pointercancel', onUp, { signal });
  target.addEventListener('keydown', onKey, { signal });
  return listening;
}

const positions = (pointers: Pointers) => [...pointers.values()].map((pointer) => pointer.x);
const spread = (pointers: Pointers) =>
  pointers.size < 2 ? 0 : Math.max(...positions(pointers)) - Math.min(...positions(pointers));
const middle = (pointers: Pointers) => positions(pointers).reduce((sum, x) => sum + x, 0) / pointers.size;
const ordered = (a: number, b: number): ChosenSpan => ({
  from: Math.min(Math.max(Math.min(a, b), 0), 1),
  to: Math.max(Math.min(Math.max(a, b), 1), 0),
});
