// What every chart rests on: ticks, thinning, reading at the crosshair, zooming, colours, and the files it makes.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xExtent, yExtent } from '../../src-renderer/charts/extent.ts';
import { extremes } from '../../src-renderer/charts/extremes.ts';
import { covered, emptiestCorner } from '../../src-renderer/charts/legend-corner.ts';
import { nearest } from '../../src-renderer/charts/nearest.ts';
import { chartNumbers } from '../../src-renderer/charts/numbers.ts';
import { ladderPlace, mixed, paintColour } from '../../src-renderer/charts/paint.ts';
import { valueAt, type Series } from '../../src-renderer/charts/series.ts';
import { thinned } from '../../src-renderer/charts/thin.ts';
import { roundStep, tickLabel, ticks } from '../../src-renderer/charts/ticks.ts';
import { chartVector } from '../../src-renderer/charts/vector.ts';
import { following, panned, zoomed } from '../../src-renderer/charts/view.ts';

const line = (y: ArrayLike<number>, more: Partial<Series> = {}): Series => ({
  key: 'k',
  label: 'recorded',
  x: { start: 0, interval: 0.1 },
  y,
  paint: { token: '--a' },
  stroke: 'solid',
  drawn: 'line',
  ...more,
});
const seed = { seed: 7, numRuns: 300 };
const ranges = fc
  .tuple(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.double({ min: 1e-3, max: 1e6, noNaN: true }))
  .map(([from, width]) => ({ from, to: from + width }));

describe('ticks', () => {
  it('are at most as many as asked for, at least one, within the range and multiples of the step', () => {
    fc.assert(
      fc.property(ranges, fc.integer({ min: 2, max: 9 }), (range, most) => {
        const step = roundStep(range, most);
        const found = ticks(range, step);
        expect(found.length).toBeLessThanOrEqual(most);
        expect(found.length).toBeGreaterThanOrEqual(1);
        // Twelve digits are kept, so a tick may lie that far outside.
        const slack = 1e-9 * Math.max(step, Math.abs(range.from), Math.abs(range.to));
        for (const tick of found) {
          expect(tick).toBeGreaterThanOrEqual(range.from - slack);
          expect(tick).toBeLessThanOrEqual(range.to + slack);
        }
      }),
      seed,
    );
  });

  it('are labelled with a true minus, the digits of their step and no sign on zero', () => {
    expect(ticks({ from: -0.35, to: 0.35 }, 0.1).map((tick) => tickLabel(tick, 0.1))).toEqual([
      '−0.3',
      '−0.2',
      '−0.1',
      '0.0',
      '0.1',
      '0.2',
      '0.3',
    ]);
    expect(tickLabel(-0.04, 1)).toBe('0');
    expect(tickLabel(-120, 40)).toBe('−120');
  });
});

describe('thinning', () => {
  it('keeps the extremes of whatever lies in view, however long the trace', () => {
    const values = fc.array(fc.double({ min: -1e3, max: 1e3, noNaN: true }), { minLength: 400, maxLength: 3000 });
    fc.assert(
      fc.property(values, (y) => {
        const series = line(Float64Array.from(y));
        const shown = thinned(series, { from: 0, to: (y.length - 1) * 0.1 }, 60).map((point) => point.y);
        expect(Math.min(...shown)).toBe(Math.min(...y));
        expect(Math.max(...shown)).toBe(Math.max(...y));
        expect(shown.length).toBeLessThanOrEqual(2 * 60 + 2 + 60);
      }),
      { seed: 11, numRuns: 60 },
    );
  });

  it('keeps one point beyond each edge of the view, and the order of time', () => {
    const shown = thinned(line([0, 1, 2, 3, 4, 5, 6]), { from: 0.25, to: 0.35 }, 100);
    expect(shown.map((point) => point.y)).toEqual([2, 3, 4]);
  });

  it('keeps a gap as a gap', () => {
    const y = Float64Array.from({ length: 1000 }, (_, i) => (i === 500 ? NaN : i));
    expect(thinned(line(y), { from: 0, to: 100 }, 50).some((point) => Number.isNaN(point.y))).toBe(true);
  });
});

describe('the crosshair', () => {
  it('reads a straight line exactly, on and between its points, and nothing outside it', () => {
    const y = Float64Array.from({ length: 50 }, (_, i) => 3 - 2 * (i * 0.1));
    fc.assert(
      fc.property(fc.double({ min: 0, max: 4.9, noNaN: true }), (x) => {
        expect(valueAt(line(y), x)).toBeCloseTo(3 - 2 * x, 9);
      }),
      seed,
    );
    expect(valueAt(line(y), 5.01)).toBeNull();
    expect(valueAt(line(y), -0.01)).toBeNull();
    expect(valueAt(line([1, NaN, 3]), 0.15)).toBeNull();
  });

  it('reads the level after a jump drawn as two points at one time', () => {
    const step = line([-80, -80, 0, 0], { x: [0, 10, 10, 30] });
    expect(valueAt(step, 9.9)).toBeCloseTo(-80, 9);
    expect(valueAt(step, 10.1)).toBeCloseTo(0, 9);
  });

  it('a click finds a line where it runs, not only at its points', () => {
    const scale = { x: (v: number) => v, y: (v: number) => v };
    const long = line([0, 0], { x: [0, 1000], key: 'long' });
    const far = line([40, 40], { x: [0, 1000], key: 'far' });
    expect(nearest([far, long], 500, 3, scale)?.series.key).toBe('long');
    expect(nearest([far, long], 500, 3, scale)?.away).toBeCloseTo(3, 9);
    expect(nearest([line([NaN, NaN])], 0, 0, scale)).toBeNull();
  });
});

describe('the view', () => {
  it('stays within the whole, whatever is zoomed and moved, and keeps the point zoomed about where it is', () => {
    const whole = { from: -10, to: 90 };
    const moves = fc.array(
      fc.record({
        about: fc.double({ min: 0, max: 1, noNaN: true }),
        factor: fc.constantFrom(0.5, 0.8, 1.25),
        by: fc.double({ min: -200, max: 200, noNaN: true }),
      }),
      { maxLength: 12 },
    );
    fc.assert(
      fc.property(moves, (steps) => {
        let view = whole;
        for (const { about, factor, by } of steps) {
          view = zoomed(view, whole, view.from + about * (view.to - view.from), factor) ?? whole;
          view = panned(view, whole, by);
          expect(view.from).toBeGreaterThanOrEqual(whole.from - 1e-9);
          expect(view.to).toBeLessThanOrEqual(whole.to + 1e-9);
          expect(view.to).toBeGreaterThan(view.from);
        }
      }),
      seed,
    );
    expect(zoomed({ from: 20, to: 40 }, whole, 25, 0.5)).toEqual({ from: 22.5, to: 32.5 });
    expect(following({ from: 20, to: 40 }, whole, 45)).toEqual({ from: 25, to: 45 });
  });

  it('holds every number, and tolerance and marks with them', () => {
    const y = yExtent([line([0, 1])], [{ axis: 'y', from: -5, to: 5, label: '', token: '--ok' }], []);
    expect(y.from).toBeLessThan(-5);
    expect(y.to).toBeGreaterThan(5);
    expect(xExtent([])).toEqual({ from: 0, to: 1 });
    expect(yExtent([line([NaN])], [], [])).toEqual({ from: -0.05, to: 1.05 });
  });

  it('a legend goes where it covers least', () => {
    const plot = { left: 0, top: 0, width: 100, height: 100 };
    const crowd = [
      { x: 95, y: 5 },
      { x: 95, y: 95 },
      { x: 5, y: 5 },
    ];
    expect(emptiestCorner(crowd, plot, 30, 20)).toMatchObject({ left: 4, top: 80 });
    expect(covered(crowd, { left: 90, top: 0, width: 10, height: 100 })).toBe(2);
    expect(covered(crowd, { left: 40, top: 0, width: 10, height: 100 })).toBe(0);
  });
});

describe('colours of sweeps', () => {
  it('run along the ladder from the first token through the second to the third', () => {
    const read = (token: string): string =>
      ({ '--sweep-a-0': '#000000', '--sweep-a-1': '#808080', '--sweep-a-2': '#ffffff' })[token] ?? '';
    const at = (sweep: number): string => paintColour({ sweeps: 'a', at: ladderPlace(sweep, 5) }, read);
    expect([0, 1, 2, 3, 4].map(at)).toEqual(['#000000', '#404040', '#808080', '#c0c0c0', '#ffffff']);
    expect(ladderPlace(0, 1)).toBe(0.5);
    expect(mixed('teal', '#000000', 0.2)).toBe('teal');
  });
});

describe('what a chart gives away', () => {
  const axes = [
    { words: 'time', unit: 'ms' },
    { words: 'current', unit: 'pA' },
  ] as const;

  it('numbers: series of one abscissa share its column, others bring their own; gaps are empty, quotes are doubled', () => {
    const text = chartNumbers(
      [line([1, 2]), line([3, NaN], { label: 'true, "ideal"' }), line([5], { x: [7], label: 'late' })],
      ...axes,
    );
    expect(text).toBe(
      'time (ms),"recorded, current (pA)","true, ""ideal"", current (pA)",time (ms),"late, current (pA)"\r\n' +
        '0,1,3,7,5\r\n0.1,2,,,\r\n',
    );
  });

  it('vector: holds every series once, the words of both axes and no raw float', () => {
    const svg = chartVector(
      {
        series: [line([-1, 0, 1]), line([1, 0, -1], { stroke: 'dotted', label: 'true <B>' })],
        shadings: [{ axis: 'x', from: 0, to: 0.1, label: 'clamp window', token: '--accent' }],
        marks: [],
        x: axes[0],
        y: axes[1],
        xView: { from: 0, to: 0.3 },
        yView: { from: -1, to: 1 },
        legend: true,
      },
      { width: 400, height: 300 },
      () => '#123456',
    );
    expect(svg.match(/stroke-dasharray="1.5 3"/g)).toHaveLength(2); // the line and its legend
    expect(svg).toContain('time (ms)');
    expect(svg).toContain('current (pA)');
    expect(svg).toContain('true &lt;B&gt;');
    expect(svg).not.toMatch(/\d\.\d{3,}/);
    expect(svg).toContain('>−1.0<');
  });

  it('words: the extremes of each series and where they lie', () => {
    expect(extremes([line([3, -2, NaN, 8])])).toEqual([
      { label: 'recorded', lowest: -2, lowestAt: 0.1, highest: 8, highestAt: 0.30000000000000004 },
    ]);
    expect(extremes([line([NaN])])).toEqual([]);
  });
});
