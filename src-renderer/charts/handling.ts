// How a chart answers the pointer, the wheel and the keys; the same on every chart.
import { nearest } from './nearest.ts';
import type { Plot } from './plot.ts';
import type { Range, Series } from './series.ts';
import { following, panned, zoomed } from './view.ts';

interface Hands {
  plot(): Plot | null;
  series(): readonly Series[];
  shown(): { x: Range; y: Range };
  whole(): { x: Range; y: Range };
  cursor(): number | null;
  /** Null shows the whole; a missing axis stays. */
  setView(next: { x?: Range | null; y?: Range | null }): void;
  setCursor(at: number | null, pointer: { x: number; y: number } | null): void;
  pick(key: string, index: number): void;
}

/** Below this a press is a click, not a drag, px. */
const dragsFrom = 4;
/** How near a click must be to a line, px. */
const hits = 12;

/**
 * Wheel zooms about the pointer (with Shift: up and down), a drag moves the view, a double click shows the whole again, a
 * click picks the nearest series. Keys: + and − zoom about the crosshair, 0 shows the whole, left and right move the
 * crosshair and take the view along, Shift by ten.
 */
export function handling(hands: Hands): (element: HTMLElement) => () => void {
  return (element) => {
    const listening = new AbortController();
    const listen = <K extends keyof HTMLElementEventMap>(
      kind: K,
      act: (event: HTMLElementEventMap[K]) => void,
      options: AddEventListenerOptions = {},
    ): void => element.addEventListener(kind, act, { ...options, signal: listening.signal });

    let drag: { x: number; y: number; from: { x: Range; y: Range }; moves: boolean } | null = null;
    const within = (event: MouseEvent): { x: number; y: number } => {
      const box = element.getBoundingClientRect();
      return { x: event.clientX - box.left, y: event.clientY - box.top };
    };

    listen(
      'wheel',
      (event) => {
        const plot = hands.plot();
        if (!plot) return;
        event.preventDefault();
        const at = within(event);
        const factor = Math.exp(Math.sign(event.deltaY || event.deltaX) * 0.18);
        const { x, y } = hands.shown();
        const whole = hands.whole();
        if (event.shiftKey) hands.setView({ y: zoomed(y, whole.y, plot.toY(at.y), factor) });
        else hands.setView({ x: zoomed(x, whole.x, plot.toX(at.x), factor) });
      },
      { passive: false },
    );

    listen('pointerdown', (event) => {
      if (event.button !== 0) return;
      drag = { ...within(event), from: hands.shown(), moves: false };
      element.setPointerCapture(event.pointerId);
    });
    listen('pointermove', (event) => {
      const plot = hands.plot();
      if (!plot) return;
      const at = within(event);
      if (drag && (drag.moves || Math.hypot(at.x - drag.x, at.y - drag.y) > dragsFrom)) {
        drag.moves = true;
        const whole = hands.whole();
        const area = plot.area();
        const { x, y } = drag.from;
        const dx = ((drag.x - at.x) / (area.right - area.left)) * (x.to - x.from);
        const dy = ((at.y - drag.y) / (area.bottom - area.top)) * (y.to - y.from);
        if (x.to - x.from < whole.x.to - whole.x.from) hands.setView({ x: panned(x, whole.x, dx) });
        if (y.to - y.from < whole.y.to - whole.y.from) hands.setView({ y: panned(y, whole.y, dy) });
        return;
      }
      const x = plot.toX(at.x);
      const { x: shown } = hands.shown();
      hands.setCursor(Math.max(shown.from, Math.min(shown.to, x)), at);
    });
    listen('pointerup', (event) => {
      const plot = hands.plot();
      const wasDrag = drag?.moves === true;
      drag = null;
      if (wasDrag || !plot) return;
      const at = within(event);
      const found = nearest(hands.series(), at.x, at.y, { x: plot.pixelX, y: plot.pixelY });
      if (found && found.away <= hits) hands.pick(found.series.key, found.index);
    });
    listen('pointercancel', () => (drag = null));
    listen('pointerleave', () => hands.setCursor(null, null));
    listen('dblclick', () => hands.setView({ x: null, y: null }));

    listen('keydown', (event) => {
      if (event.ctrlKey || event.metaKey || event.altKey) return;
      const { x } = hands.shown();
      const whole = hands.whole().x;
      const middle = hands.cursor() ?? (x.from + x.to) / 2;
      const step = ((x.to - x.from) / 200) * (event.shiftKey ? 10 : 1);
      if (event.key === '+' || event.key === '=') hands.setView({ x: zoomed(x, whole, middle, 0.7) });
      else if (event.key === '-' || event.key === '−') hands.setView({ x: zoomed(x, whole, middle, 1 / 0.7) });
      else if (event.key === '0') hands.setView({ x: null, y: null });
      else if (event.key === 'ArrowLeft' || event.key === 'ArrowRight') {
        const to = middle + (event.key === 'ArrowLeft' ? -step : step);
        const at = Math.max(whole.from, Math.min(whole.to, to));
        const plot = hands.plot();
        hands.setCursor(at, plot ? { x: plot.pixelX(at), y: plot.area().top + 24 } : null);
        const next = following(x, whole, at);
        if (next !== x) hands.setView({ x: next });
      } else return;
      event.preventDefault();
      event.stopPropagation();
    });

    return () => listening.abort();
  };
}
