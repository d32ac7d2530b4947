// The meter alone, fed with made-up voltages of known error.
import { describe, expect, it } from 'vitest';
import { clampMeter, type ClampMeasure, type ClampMeterInput } from '../../src-main/forecast/clamp-error.ts';

const sampling = 1e-4;
// −70 mV to 10 ms, 0 mV to 30 ms, −70 mV to 40 ms.
const ideal = [
  { start: 0, end: 0.01, v0: -0.07, v1: -0.07 },
  { start: 0.01, end: 0.03, v0: 0, v1: 0 },
  { start: 0.03, end: 0.04, v0: -0.07, v1: -0.07 },
];

/** Feeds one compartment per error course (V, of t in s) into a meter over the second block. */
function measure(errors: readonly ((t: number) => number)[], over: Partial<ClampMeterInput> = {}): ClampMeasure {
  const meter = clampMeter({
    compartments: errors.length,
    ideal,
    breaks: [0.01, 0.03],
    sampling,
    samples: 401,
    window: { from: 0.01, to: 0.03 },
    blockStart: 0.01,
    tolerance: 0.005,
    ...over,
  });
  for (let i = 0; i <= 400; i += 1) {
    const level = i >= 100 && i < 300 ? 0 : -0.07;
    meter.onSample(
      i,
      Float64Array.from(errors, (error) => level + error(i * sampling)),
    );
  }
  return meter.measure();
}

describe('clamp meter', () => {
  it('steady is the last sample before a command jump at the window’s end', () => {
    const { steady } = measure([(t) => t]);
    expect(steady[0]).toBeCloseTo(0.0299, 12);
  });

  it('steady is the sample on the window’s end where nothing jumps there, and the one before where none falls on it', () => {
    expect(measure([(t) => t], { window: { from: 0.01, to: 0.02 } }).steady[0]).toBeCloseTo(0.02, 12);
    expect(measure([(t) => t], { window: { from: 0.01, to: 0.020_05 } }).steady[0]).toBeCloseTo(0.02, 12);
  });

  it('worst keeps its sign and looks at the window only', () => {
    const dip = (t: number): number => (t > 0.015 && t < 0.016 ? -0.02 : t < 0.01 ? 0.05 : 0.001);
    expect(measure([dip]).worst[0]).toBe(-0.02);
    expect(measure([dip], { window: { from: 0.02, to: 0.03 } }).worst[0]).toBe(0.001);
  });

  it('settling of a decay is τ·ln(A/tol) from the block’s start, whichever sign', () => {
    const tau = 2e-3;
    const decay =
      (sign: number) =>
      (t: number): number =>
        sign * 0.07 * Math.exp(-(t - 0.01) / tau);
    const { settling } = measure([decay(1), decay(-1)]);
    const exact = tau * Math.log(14);
    // The chord over a sample of 0.05 τ: 0.05²/8 of τ.
    for (const time of settling) expect(Math.abs(time - exact)).toBeLessThan((0.05 ** 2 / 8) * tau);
  });

  it('settling counts from the block’s start even when the window begins later, and sees excursions before it', () => {
    const early = (t: number): number => (t >= 0.01 && t < 0.013 ? 0.02 : 0);
    const { settling, worst } = measure([early], { window: { from: 0.02, to: 0.03 } });
    expect(settling[0]).toBeCloseTo(0.003, 4);
    expect(worst[0]).toBe(0);
  });

  it('does not count as settling what was over before the block began', () => {
    const before = (t: number): number => (t < 0.009_95 ? 0.02 : 0);
    expect(measure([before], { window: { from: 0.008, to: 0.03 } }).settling[0]).toBe(0);
  });

  it('takes the last time the tolerance is exceeded, not the first', () => {
    const twice = (t: number): number => (t < 0.012 || (t > 0.02 && t < 0.0221) ? 0.01 : 0);
    expect(measure([twice]).settling[0]).toBeCloseTo(0.0121 - 0.00005, 4);
  });

  it('0 where the tolerance is never exceeded, NaN where it still is at the end', () => {
    const { settling } = measure([() => 0.004, (t) => (t > 0.025 ? 0.006 : 0)]);
    expect(settling[0]).toBe(0);
    expect(settling[1]).toBeNaN();
  });
});
