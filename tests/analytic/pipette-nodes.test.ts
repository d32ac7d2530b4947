// Current clamp through access resistance and stray capacitance: two nodes, solved by hand.
//   C·V' = −G·V + (Vp − V)/Rs     Cp·Vp' = I − (Vp − V)/Rs
import { describe, expect, it } from 'vitest';
import { runSweep } from '../../src-main/solver/sweep.ts';
import type { SolverPipette } from '../../src-main/solver/run.ts';
import { allAt, finished, pipette, smallGrid, steps, sweepOf } from '../support/small-grids.ts';

const [C, G, Rs, Cp, I] = [100e-12, 5e-9, 20e6, 4e-12, 100e-12];
const grid = smallGrid([{ parent: -1, area_um2: 10000, channels: { leak: 0.05 } }], { leak: 0 });
const command = steps('pA', 60, [
  [0, 0],
  [1, 100],
]);

function injected(given: Partial<SolverPipette>) {
  return finished(
    runSweep(
      sweepOf({
        ...{ grid, start: allAt(grid, 0), duration: 0.06, probes: [0] },
        pipettes: [pipette('current clamp', command, given)],
      }),
    ),
  );
}

/** Deviations from the steady state are sums of two exponentials; a and b are the matrix of the two equations. */
function exact(t: number): { V: number; Vp: number } {
  const a = [-(G + 1 / Rs) / C, 1 / (Rs * C), 1 / (Rs * Cp), -1 / (Rs * Cp)] as const;
  const half = (a[0] + a[3]) / 2;
  const root = Math.sqrt(half * half - (a[0] * a[3] - a[1] * a[2]));
  const [fast, slow] = [half - root, half + root];
  const steady = { V: I / G, Vp: I / G + I * Rs };
  // d(t) = e^(λ₁t)·(A − λ₂)d₀/(λ₁ − λ₂) + e^(λ₂t)·(A − λ₁)d₀/(λ₂ − λ₁), d₀ = −steady.
  const part = (own: number, other: number): [number, number] => {
    const [x, y] = [-steady.V, -steady.Vp];
    const share = Math.exp(own * t) / (own - other);
    return [share * ((a[0] - other) * x + a[1] * y), share * (a[2] * x + (a[3] - other) * y)];
  };
  const [f, s] = [part(fast, slow), part(slow, fast)];
  return { V: steady.V + f[0] + s[0], Vp: steady.Vp + f[1] + s[1] };
}

describe('current clamp', () => {
  it('charges cell and pipette with both time constants, 20.8 and 0.077 ms', () => {
    const { membrane, recorded, current } = injected({ access: Rs, stray: Cp });
    for (const sample of [41, 42, 44, 48, 60, 100, 400, 1600, 2400]) {
      const t = sample * 25e-6 - 1e-3;
      const { V, Vp } = exact(t);
      // Of the steady 20 mV. 25 µs is a third of the faster time constant.
      expect(Math.abs(membrane[0]![sample]! - V) / 0.02, `membrane, ${t} s`).toBeLessThan(2e-5);
      expect(Math.abs(recorded[0]![sample]! - Vp) / 0.02, `pipette, ${t} s`).toBeLessThan(5e-4);
      expect(current[0]![sample]!).toBeCloseTo((recorded[0]![sample]! - membrane[0]![sample]!) / Rs, 20);
    }
  });

  it('records less by current × bridge, and nothing of the cell changes', () => {
    const plain = injected({ access: Rs, stray: Cp });
    const balanced = injected({ access: Rs, stray: Cp, bridge: 20e6 });
    expect(balanced.membrane[0]).toEqual(plain.membrane[0]);
    for (const sample of [0, 39, 40, 41, 2000]) {
      const level = sample < 40 ? 0 : I;
      const apart = plain.recorded[0]![sample]! - balanced.recorded[0]![sample]!;
      expect(apart).toBeCloseTo(level * 20e6, 15);
    }
  });

  it('without stray capacitance adds I·(Rs − bridge) at once; without access puts the stray on the cell', () => {
    const resistive = injected({ access: Rs, bridge: 12e6 });
    expect(resistive.recorded[0]![40]! - resistive.membrane[0]![40]!).toBeCloseTo(I * 8e6, 15);
    expect(resistive.recorded[0]![39]! - resistive.membrane[0]![39]!).toBe(0);
    const direct = injected({ stray: Cp });
    // One time constant of (C + Cp)/G, 20.8 ms; trapezoidal error 1e-7.
    const t = 832 * 25e-6;
    expect(direct.membrane[0]![40 + 832]!).toBeCloseTo((I / G) * (1 - Math.exp((-t * G) / (C + Cp))), 8);
  });
});

describe('voltage clamp', () => {
  it('also charges its stray capacitance on a ramp, and only the recording shows it', () => {
    const ramp = [
      { start: 0, end: 0.01, v0: 0, v1: 0 },
      { start: 0.01, end: 0.03, v0: 0, v1: 0.04 },
      { start: 0.03, end: 0.06, v0: 0.04, v1: 0.04 },
    ];
    const run = (access: number) =>
      finished(
        runSweep(
          sweepOf({
            ...{ grid, start: allAt(grid, 0), duration: 0.05, probes: [0] },
            pipettes: [pipette('voltage clamp', ramp, { access, stray: Cp })],
          }),
        ),
      );
    // 2 V/s: 8 pA on 4 pF.
    for (const { recorded, current } of [run(0), run(10e6)]) {
      const apart = recorded[0]!.map((value, i) => value - current[0]![i]!);
      expect([399, 400, 800, 1199, 1200].map((i) => Math.round(apart[i]! * 1e14) / 100)).toEqual([0, 8, 8, 8, 0]);
    }
    // The ideal clamp: C·dV/dt + G·V, to rounding.
    const ideal = run(0);
    expect(ideal.current[0]![800]!).toBeCloseTo(C * 2 + G * 0.02, 17);
    expect(ideal.membrane[0]![800]!).toBeCloseTo(0.02, 15);
  });

  it('holds the cell against a current clamp in the same compartment', () => {
    const both = finished(
      runSweep(
        sweepOf({
          ...{ grid, start: allAt(grid, 0), duration: 0.06, probes: [0] },
          pipettes: [
            pipette('voltage clamp', steps('mV', 60, [[0, 10]])),
            pipette('current clamp', command, { letter: 'B', access: Rs, stray: Cp }),
          ],
        }),
      ),
    );
    // The clamp takes back what the other pipette brings: G·V − I.
    expect(both.current[0]!.at(-1)!).toBeCloseTo(G * 0.01 - I, 16);
    expect(both.membrane[0]!.every((V) => V === 0.01)).toBe(true);
  });
});
