// Small parts of the engine by themselves.
import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Forecast, RehearsalSummary, Trace } from '../../src-main/contract/results.ts';
import { forecastText } from '../../src-main/exchange/forecast-text.ts';
import { arraysIn } from '../../src-main/engine/arrays-in.ts';
import { numericalUncertainty } from '../../src-main/engine/numerical.ts';
import { slice, thinned } from '../../src-main/engine/thin.ts';
import { programVersion } from '../../src-main/engine/version.ts';

const trace = (values: readonly number[]): Trace => ({
  sweep: 0,
  key: 'recording:A',
  unit: 'pA',
  start_ms: 10,
  interval_ms: 0.5,
  values: Float64Array.from(values),
});

describe('thinning a trace', () => {
  it('keeps the least and the greatest value, the length of time and at most so many points', () => {
    const many = fc.array(fc.double({ noNaN: true }), { minLength: 17, maxLength: 400 });
    fc.assert(
      fc.property(many, fc.integer({ min: 16, max: 64 }), (values, most) => {
        const kept = thinned(trace(values), most);
        expect(kept.values.length).toBeLessThanOrEqual(most);
        expect(Math.max(...kept.values)).toBe(Math.max(...values));
        expect(Math.min(...kept.values)).toBe(Math.min(...values));
        // Two points stand for a stretch; the last stretch may be short of samples.
        const stretch = (2 * kept.interval_ms) / 0.5;
        const lacking = (kept.values.length * kept.interval_ms) / 0.5 - values.length;
        expect(lacking).toBeGreaterThanOrEqual(values.length > most ? 0 : -1e-9);
        expect(lacking).toBeLessThan(stretch);
      }),
    );
  });

  it('leaves a short trace as it is', () => {
    const short = trace([1, 2, 3]);
    expect(thinned(short, 16)).toBe(short);
  });
});

describe('cutting a trace', () => {
  it('takes the samples from one time to the other, both included', () => {
    const cut = slice(trace([0, 1, 2, 3, 4, 5]), 10.5, 11.5);
    expect([...cut.values]).toEqual([1, 2, 3]);
    expect(cut.start_ms).toBe(10.5);
    expect([...slice(trace([0, 1, 2]), undefined, undefined).values]).toEqual([0, 1, 2]);
    expect([...slice(trace([0, 1, 2]), 50, undefined).values]).toEqual([]);
  });
});

describe('numerical uncertainty', () => {
  const forecast = (errors: readonly (readonly number[])[], reach: number, access: number): Forecast => ({
    clamp: {
      pipette: 'A',
      tolerance: { unit: 'mV', value: 5 },
      sweeps: errors.map((steady, sweep) => ({
        sweep,
        level_mV: 0,
        windowStart_ms: 0,
        windowEnd_ms: 1,
        reach,
        steady_mV: Float64Array.from(steady),
        worst_mV: new Float64Array(),
        settling_ms: new Float64Array(),
        accessPart_mV: access,
        access_mV: new Float64Array(steady.length).fill(access),
      })),
      reach,
      reachByRegion: [{ region: 'soma', area_um2: 1000, reach }],
      worstSweep: 0,
      trustDistance_um: 120,
      accessError_mV: access,
    },
    dualSite: null,
    readings: [],
    pipettes: [],
    cautions: [],
    notes: ['A note.'],
    numerical: { state: 'pending', clampError_mV: null, reach: null },
  });

  it('is how far the figures moved, sweep by sweep, whatever the number of compartments', () => {
    const nominal = forecast([[1, -8], [2]], 0.5, -3);
    const finer = forecast(
      [
        [1, 2, -7.5],
        [2.1, 0],
      ],
      0.53,
      -3.2,
    );
    const found = numericalUncertainty(nominal, finer);
    expect(found.clampError_mV).toBeCloseTo(0.5, 12);
    expect(found.reach).toBeCloseTo(0.03, 12);
    expect(numericalUncertainty(nominal, forecast([[8], [2]], 0.5, -4)).clampError_mV).toBeCloseTo(1, 12);
  });

  it('is nothing in current clamp', () => {
    const none: Forecast = { ...forecast([], 1, 0), clamp: null };
    expect(numericalUncertainty(none, none)).toEqual({ clampError_mV: null, reach: null });
  });

  it('stands beside reach, trust distance and access error in the text of a terminal', () => {
    const summary = {
      rehearsalId: 1,
      planId: 1,
      planName: 'Steps',
      sessionId: null,
      rehearsedAt: '',
      engineVersion: '',
      sweeps: 1,
      step_us: 25,
      compartments: 2,
      wall_s: 1,
      hashes: { plan: '', cell: '', rig: '', protocol: '' },
    };
    const known = { ...forecast([[1]], 0.5, -3), numerical: { state: 'computed', clampError_mV: 0.5, reach: 0.03 } };
    const text = forecastText({ summary, forecast: known as Forecast, protocol: null as never });
    expect(text).toContain('50.0\u2009% of the membrane within 5.00\u2009mV, in sweep 1');
    expect(text).toContain('120\u2009µm from the soma');
    expect(text).toMatch(/Access error +−3\.00\u2009mV/);
    expect(text).toContain('0.50\u2009mV of clamp error, 3.00\u2009% of reach');
    expect(text).toContain('- A note.');
  });

  it('says 0 for what is rounding beside the rest of the family, and no bias where the true value is 0', () => {
    const row = (recorded: number[], truth: number[]): string[] => {
      const reading = {
        reading: 'peak',
        name: 'Peak',
        unit: 'pA',
        recorded: Float64Array.from(recorded),
        truth: Float64Array.from(truth),
        ladderValue: new Float64Array(recorded.length),
      } as const;
      const forecast: Forecast = {
        clamp: null,
        dualSite: null,
        readings: [reading],
        pipettes: [],
        cautions: [],
        notes: [],
        numerical: { state: 'pending', clampError_mV: null, reach: null },
      };
      const summary = { planName: 'P', sweeps: 1, compartments: 1, step_us: 25, wall_s: 1 } as RehearsalSummary;
      return forecastText({ summary, forecast, protocol: null as never })
        .split('\n')
        .slice(4, 4 + recorded.length);
    };
    const cells = (line = ''): string[] => line.trim().split(/\s+/).slice(2);
    const family = row([-500, 7.86e-6, -100.00003, 3e-4], [-400, -9.7e-13, -100, 6e-4]).map(cells);
    expect(family).toEqual([
      ['−500', '−400', '−25'],
      ['0', '0', '–'],
      ['−100', '−100', '0'],
      ['0', '6.00e−4', '−50'],
    ]);
    // A family that is rounding throughout: less than an electron.
    expect(row([7.86e-6], [2e-12]).map(cells)).toEqual([['0', '0', '–']]);
  });
});

describe('giving arrays away', () => {
  it('names every piece of memory once, however deep it lies', () => {
    const shared = new Float64Array(4);
    const found = arraysIn({ a: [shared, shared.subarray(2)], b: { c: new Int32Array(1) }, d: 'x', e: null });
    expect(found).toHaveLength(2);
    expect(found[0]).toBe(shared.buffer);
  });
});

it('the version of the program is that of its package', () => {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  expect((JSON.parse(text) as { version: string }).version).toBe(programVersion);
});
