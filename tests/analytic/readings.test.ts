// Closed forms: integrals and extremes of known courses, sampled.
import { describe, expect, it } from 'vitest';
import { chargeOf } from '../../src-main/protocol/readings/charge.ts';
import { meanOf } from '../../src-main/protocol/readings/mean.ts';
import { peakOf } from '../../src-main/protocol/readings/peak.ts';
import type { Sampled } from '../../src-main/protocol/readings/sampled.ts';

const interval = 20e-6;

function sampled(course: (t: number) => number, samples = 5001, breaks: readonly number[] = []): Sampled {
  return { values: Float64Array.from({ length: samples }, (_, i) => course(i * interval)), interval, breaks };
}

describe('mean', () => {
  it('of a straight line is its value at the middle, whatever part of a sample the edges cut', () => {
    const line = sampled((t) => 3 - 40 * t);
    for (const [from, to] of [
      [0, 0.1],
      [0.0100037, 0.0617311],
      [0.05, 0.050001],
      [0.020005, 0.020015],
    ] as const) {
      expect(meanOf(line, { from, to })).toBeCloseTo(3 - 20 * (from + to), 12);
    }
  });

  it('less a baseline leaves an offset out', () => {
    const course = sampled((t) => (t < 0.05 ? 7 : 7 + 3 * Math.sin(2 * Math.PI * 100 * t)));
    // Ten whole periods: the trapezoid is exact on them.
    expect(meanOf(course, { from: 0.06, to: 0.1 }, { from: 0, to: 0.04 })).toBeCloseTo(0, 12);
  });
});

describe('charge', () => {
  it('of a decaying exponential is τ·(e^(−a/τ) − e^(−b/τ)) to the trapezoid’s h²/12τ²', () => {
    const tau = 2e-3;
    const decay = sampled((t) => -1e-9 * Math.exp(-t / tau));
    const exact = -1e-9 * tau * (Math.exp(-0.5) - Math.exp(-5));
    // h²/12τ² = 8.3e-6.
    expect(chargeOf(decay, { from: 1e-3, to: 10e-3 }) / exact - 1).toBeCloseTo(8.3e-6, 6);
  });

  it('less a baseline counts from the baseline', () => {
    const course = sampled((t) => (t < 0.01 ? 5 : 8), 5001, [0.01]);
    expect(chargeOf(course, { from: 0.01, to: 0.03 }, { from: 0, to: 0.01 })).toBeCloseTo(3 * 0.02, 12);
  });

  it('is the sum over parts', () => {
    const course = sampled((t) => Math.sin(900 * t) + t);
    const [a, b, c] = [0.0123456, 0.03456789, 0.0987];
    const parts = chargeOf(course, { from: a, to: b }) + chargeOf(course, { from: b, to: c });
    expect(parts).toBeCloseTo(chargeOf(course, { from: a, to: c }), 14);
  });

  it('keeps its digits over ten million samples', () => {
    const long: Sampled = { values: new Float64Array(10_000_001).fill(0.1), interval: 1e-5, breaks: [] };
    expect(chargeOf(long, { from: 0, to: 100 })).toBeCloseTo(10, 13);
  });
});

describe('where a command jumps', () => {
  // What an amplifier shows through an access resistance: a jump in current at each edge of the step.
  const tau = 1e-3;
  const course = (t: number): number => {
    if (t < 0.01 - 1e-12) return 0;
    return t < 0.02 - 1e-12 ? 1 + 9 * Math.exp(-(t - 0.01) / tau) : -9 * Math.exp(-(t - 0.02) / tau);
  };
  const jumps = sampled(course, 2001, [0.01, 0.02]);

  it('a window that ends on the jump does not see what comes after it', () => {
    const window = { from: 0.015, to: 0.02 };
    expect(peakOf(jumps, 'negative', window)).toBeGreaterThan(1);
    expect(peakOf(jumps, 'positive', window)).toBeCloseTo(1 + 9 * Math.exp(-5), 12);
    const exact = 1 + (9 * tau * (Math.exp(-5) - Math.exp(-10))) / 0.005;
    // The chord's error at τ = 50 samples; joining the two sides of the jump would be off by 0.018.
    expect(Math.abs(meanOf(jumps, window) - exact)).toBeLessThan(1e-6);
  });

  it('a window that starts on the jump sees it from its first moment', () => {
    expect(peakOf(jumps, 'positive', { from: 0.01, to: 0.02 })).toBe(10);
  });

  it('a jump between two samples is not smeared over them', () => {
    const at = 0.010_013;
    const step = sampled((t) => (t < at ? 2 : 5), 1001, [at]);
    expect(chargeOf(step, { from: 0.01, to: 0.0101 })).toBeCloseTo(2 * 0.013e-3 + 5 * 0.087e-3, 15);
  });
});

describe('peak', () => {
  const course = sampled((t) => 10 + 3 * Math.sin(2 * Math.PI * 25 * t) - 5 * Math.exp(-(((t - 0.07) / 1e-3) ** 2)));
  const all = { from: 0, to: 0.1 };

  it('takes the direction asked for, from the baseline', () => {
    const base = { from: 0, to: 0.04 }; // one period: mean 10
    expect(peakOf(course, 'positive', all, base)).toBeCloseTo(3, 6);
    expect(peakOf(course, 'negative', all, base)).toBeCloseTo(-8, 6);
    expect(peakOf(course, 'largest', all, base)).toBe(peakOf(course, 'negative', all, base));
  });

  it('counts the value interpolated at an edge between two samples', () => {
    const line = sampled((t) => t);
    expect(peakOf(line, 'positive', { from: 0, to: 0.010_007 })).toBeCloseTo(0.010_007, 15);
    expect(peakOf(line, 'negative', { from: 0.010_007, to: 0.02 })).toBeCloseTo(0.010_007, 15);
  });
});

describe('a window off the trace', () => {
  it('gives no number instead of a wrong one', () => {
    const short = sampled(() => 1, 101);
    expect(meanOf(short, { from: 0.001, to: 0.01 })).toBeNaN();
    expect(meanOf(short, { from: -0.001, to: 0.001 })).toBeNaN();
    expect(peakOf(short, 'largest', { from: 0.003, to: 0.004 })).toBeNaN();
  });

  it('goes on in a straight line for less than a sample after the last', () => {
    const line = sampled((t) => 100 * t, 101); // last sample at 2 ms
    expect(meanOf(line, { from: 0.001, to: 0.002_01 })).toBeCloseTo(100 * 0.001_505, 12);
  });
});
