// True of every sweep: bits, times, states carried over, ends before time.
import { describe, expect, it } from 'vitest';
import { runSweep } from '../../src-main/solver/sweep.ts';
import type { SweepInput } from '../../src-main/solver/run.ts';
import { gridOf, randomCompartments } from '../support/random-trees.ts';
import { allAt, finished, largestDifference, pipette, smallGrid, steps, sweepOf } from '../support/small-grids.ts';
import { k, na, squidChannels, squidKinetics, squidPatch } from '../support/squid.ts';

const firing = gridOf(randomCompartments(5, { [na]: 120, [k]: 36 }));
const rig = [
  pipette(
    'current clamp',
    steps('pA', 30, [
      [0, 0],
      [2, 2000],
      [2.5003, 0],
    ]),
    { access: 10e6, stray: 5e-12, bridge: 8e6 },
  ),
  pipette(
    'voltage clamp',
    steps('mV', 30, [
      [0, -70],
      [20, -30],
    ]),
    { letter: 'B', compartment: 3, access: 4e6 },
  ),
];
const sweep = (given: Partial<SweepInput> = {}) =>
  sweepOf({
    ...{ grid: firing, kinetics: squidKinetics, start: allAt(firing, -65), duration: 0.03, probes: [0, 1] },
    pipettes: rig,
    ...given,
  });

describe('a sweep', () => {
  it('gives the same bits again', () => {
    expect(finished(runSweep(sweep()))).toEqual(finished(runSweep(sweep())));
  });

  it('does not change its input', () => {
    const start = allAt(firing, -65);
    runSweep(sweep({ start }));
    expect(start).toEqual(allAt(firing, -65));
  });

  it('has a sample at 0 and at its end, at any length', () => {
    for (const [duration, samples] of [
      [0.03, 1201],
      [0.030001, 1201],
      [0.029999, 1200],
      [0, 1],
    ] as const) {
      const run = finished(runSweep(sweep({ duration })));
      expect(run.samples).toBe(samples);
      expect(run.recorded[0]).toHaveLength(samples);
    }
  });

  it('has at a jump what holds from there on', () => {
    const { current, membrane } = finished(runSweep(sweep({ probes: [3] })));
    // 20 ms, sample 800: (−30 mV − V)/4 MΩ.
    expect(current[1]![800]!).toBeCloseTo((-0.03 - membrane[0]![800]!) / 4e6, 16);
    expect(current[1]![799]!).toBeCloseTo((-0.07 - membrane[0]![799]!) / 4e6, 16);
  });

  it('has at extra times what it has at samples, and they hardly move the rest', () => {
    const plain = finished(runSweep(sweep()));
    const extraTimes = Float64Array.from([0, 0.0010125, 0.005, 0.01234567, 0.02, 0.03]);
    const asked = finished(runSweep(sweep({ extraTimes })));
    expect(asked.extra!.samples).toBe(6);
    for (const [extra, sample] of [
      [0, 0],
      [2, 200],
      [4, 800],
      [5, 1200],
    ] as const) {
      expect(asked.extra!.membrane[0]![extra]).toBe(asked.membrane[0]![sample]);
      expect(asked.extra!.recorded[1]![extra]).toBe(asked.recorded[1]![sample]);
    }
    // Two odd steps instead of one regular, twice: second-order differences, 0.02 mV at a spike's flank.
    expect(largestDifference(plain.membrane[0]!, asked.membrane[0]!)).toBeLessThan(2e-5);
  });

  it('does not drift: a step 100 s in, at an odd time, is where it was ordered', () => {
    const grid = squidPatch();
    const command = steps('mV', 100_000.2, [
      [0, -65],
      [100_000.1003, -60],
    ]);
    const run = sweepOf({
      ...{ grid, kinetics: squidKinetics, start: allAt(grid, -65), duration: 100.0002, probes: [0] },
      pipettes: [pipette('voltage clamp', command)],
      ...{
        sampling: 1e-3,
        step: 1e-3,
        extraTimes: Float64Array.from([100.1003, 100.1002999].map((t) => t - 1e-1 + 1e-1)),
      },
    });
    expect(() => runSweep(run)).toThrow('outside the sweep');
    const inside = { ...run, extraTimes: Float64Array.from([100.0001002, 100.0001004]) };
    expect(finished(runSweep(inside)).extra!.membrane[0]).toEqual(Float64Array.from([-0.065, -0.06]));
  });

  it('carried over at a jump is the same as one long sweep', () => {
    const long = finished(runSweep(sweep({ probes: [0], step: 25e-6 })));
    const cut = 0.02;
    const first = finished(runSweep(sweep({ duration: cut })));
    const second = finished(
      runSweep(
        sweep({
          ...{ duration: 0.01, start: first.end },
          pipettes: [
            pipette('current clamp', steps('pA', 10, [[0, 0]]), { access: 10e6, stray: 5e-12, bridge: 8e6 }),
            pipette('voltage clamp', steps('mV', 10, [[0, -30]]), { letter: 'B', compartment: 3, access: 4e6 }),
          ],
        }),
      ),
    );
    // The jump is a fresh start in both; times are counted from elsewhere, which is rounding, grown by firing.
    expect(largestDifference(second.membrane[0]!, long.membrane[0]!.slice(800))).toBeLessThan(1e-10);
    expect(largestDifference(second.end.V, long.end.V)).toBeLessThan(1e-10);
  });

  it('goes the same with gates written out at the start as with gates left to be steady', () => {
    const V = allAt(firing, -65).V;
    const gates = [na, k].map((name) =>
      squidKinetics.get(name)!.gates.map((gate) => V.map((level) => gate.inf(1e3 * level))),
    );
    expect(finished(runSweep(sweep({ start: { V, gates } })))).toEqual(finished(runSweep(sweep())));
  });

  it('hands out V of all compartments at every sample', () => {
    const seen: number[] = [];
    const run = finished(runSweep(sweep({ onSample: (index, V) => (seen[index] = V[1]!) })));
    expect(Float64Array.from(seen)).toEqual(run.membrane[1]);
  });

  it('comes within 20 µV of finer gate tables', () => {
    const [plain, fine] = [1e-4, 2e-5].map((tableSpacing) => finished(runSweep(sweep({ tableSpacing }))).membrane[0]!);
    // Of a spike of 100 mV: 0.04 µs of shift at 0.1 mV, on a flank of 500 V/s.
    expect(largestDifference(plain!, fine!)).toBeLessThan(2e-5);
  });
});

describe('a sweep that ends before time', () => {
  it('is cancelled when asked, and asks often: at least every 100 000 compartment-steps', () => {
    const wide = smallGrid(
      Array.from({ length: 5000 }, (_, i) => ({
        ...{ parent: i - 1, coupling_nS: 100, area_um2: 100, channels: squidChannels },
      })),
      { leak: -54.387, [na]: 50, [k]: -77 },
    );
    let asked = 0;
    let samples = 0;
    const result = runSweep(
      sweepOf({
        ...{ grid: wide, kinetics: squidKinetics, start: allAt(wide, -65), duration: 1, pipettes: [] },
        onSample: () => {
          samples++;
        },
        cancelled: () => ++asked === 3,
      }),
    );
    expect(result).toEqual({ kind: 'cancelled' });
    expect(asked).toBe(3);
    expect(samples).toBeLessThanOrEqual(61);
  });

  it('diverged, it says when and where', () => {
    const grid = squidPatch();
    const broken = new Map(squidKinetics);
    const channel = squidKinetics.get(na)!;
    const gates = channel.gates.map((gate) => ({ ...gate, tau: (V: number) => (V > -40 ? NaN : gate.tau(V)) }));
    broken.set(na, { ...channel, gates });
    const command = steps('pA', 30, [
      [0, 0],
      [10, 200],
    ]);
    const result = runSweep(
      sweepOf({
        ...{ grid, kinetics: broken, start: allAt(grid, -65), duration: 0.03 },
        pipettes: [pipette('current clamp', command)],
      }),
    );
    expect(result.kind).toBe('diverged');
    if (result.kind !== 'diverged') return;
    expect(result.compartment).toBe(0);
    // −65 to −40 mV at 20 µA/cm²: a little over a millisecond.
    expect(result.time).toBeGreaterThan(0.011);
    expect(result.time).toBeLessThan(0.012);
  });

  it('refuses two ideal voltage clamps in one compartment, and takes any other pair', () => {
    const clamp = (access: number, letter: string) =>
      pipette('voltage clamp', steps('mV', 30, [[0, -65]]), { access, letter });
    const refusal = expect.objectContaining({ data: expect.objectContaining({ place: 'pipette B' }) });
    expect(() => runSweep(sweep({ pipettes: [clamp(0, 'A'), clamp(0, 'B')] }))).toThrow(refusal);
    expect(runSweep(sweep({ pipettes: [clamp(0, 'A'), clamp(5e6, 'B')] })).kind).toBe('done');
  });

  it('throws where the step does not divide the sampling interval', () => {
    expect(() => runSweep(sweep({ step: 20e-6 }))).toThrow('does not divide');
  });
});
