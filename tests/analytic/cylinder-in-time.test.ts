// Closed forms of the sealed cylinder in time: Rall W (1969), Biophys J 9:1483–1508 (from memory). X = x/λ, T = t/τ.
// The cable is cut at 0.1 length constants at 100 Hz, 32 µm, and stepped at 25 µs: what a plan gets without asking.
import { describe, expect, it } from 'vitest';
import { runSweep } from '../../src-main/solver/sweep.ts';
import { allAt, cylinder, finished, pipette, steps, sweepOf } from '../support/small-grids.ts';

const cable = { d_um: 2, length_um: 1000, Rm_ohm_cm2: 20000, Ri_ohm_cm: 150, Cm_uF_cm2: 1, rest_mV: -70 };
const pieces = 31;
const L = 1000 / Math.sqrt((1e8 * 20000 * 2e-4) / (4 * 150)); // 1.2247 of λ = 816.5 µm
const GInf = 2.56509966e-9; // (π/2)·d^1.5/√(Rm·Ri), S
const tau = 0.02;

/** V/(I/G∞) at X for a current step into X = 0. */
function chargedBy(X: number, T: number): number {
  let sum = Math.cosh(L - X) / Math.sinh(L) - Math.exp(-T) / L;
  for (let n = 1; n <= 400; n++) {
    const b = 1 + ((n * Math.PI) / L) ** 2;
    sum -= ((2 / L) * Math.cos((n * Math.PI * X) / L) * Math.exp(-b * T)) / b;
  }
  return sum;
}

/** I/(G∞·ΔV) at X = 0 for a voltage step there. */
function clampCurrent(T: number): number {
  let sum = Math.tanh(L);
  for (let n = 1; n <= 4000; n++) {
    const b2 = (((2 * n - 1) * Math.PI) / (2 * L)) ** 2;
    sum += ((2 / L) * b2 * Math.exp(-(1 + b2) * T)) / (1 + b2);
  }
  return sum;
}

describe('sealed cylinder, Rall 1969', () => {
  const grid = cylinder(pieces, cable);

  it('charges under a current step like the series, within 0.5 % from T = 0.05 on', () => {
    const command = steps('pA', 100, [
      [0, 0],
      [1, 50],
    ]);
    const run = sweepOf({
      ...{ grid, start: allAt(grid, -70), duration: 0.101, probes: [0, pieces] },
      pipettes: [pipette('current clamp', command)],
    });
    const [near, far] = finished(runSweep(run)).membrane;
    for (const T of [0.05, 0.2, 0.5, 1, 2, 5]) {
      const sample = Math.round((0.001 + T * tau) / 25e-6);
      const scale = 50e-12 / GInf;
      expect(Math.abs((near![sample]! + 0.07) / (scale * chargedBy(0, T)) - 1), `near, T = ${T}`).toBeLessThan(0.005);
      // The far end is silent before T = 0.2: 0.3 µV, compared with the steady value instead.
      const apart = Math.abs(far![sample]! + 0.07 - scale * chargedBy(L, T));
      expect(apart / (scale * Math.max(chargedBy(L, T), 0.01)), `far, T = ${T}`).toBeLessThan(0.005);
    }
  });

  it('draws the clamp current of the series, within 0.5 % from T = 0.05 on', () => {
    const command = steps('mV', 70, [
      [0, -70],
      [1, -60],
    ]);
    const run = sweepOf({
      ...{ grid, start: allAt(grid, -70), duration: 0.07 },
      pipettes: [pipette('voltage clamp', command)],
    });
    const current = finished(runSweep(run)).recorded[0]!;
    for (const T of [0.05, 0.2, 1, 3]) {
      const sample = Math.round((0.001 + T * tau) / 25e-6);
      expect(Math.abs(current[sample]! / (0.01 * GInf * clampCurrent(T)) - 1), `T = ${T}`).toBeLessThan(0.005);
    }
  });

  it('comes closer at second order when compartments and step are halved together', () => {
    const errors = [1, 2, 4].map((fine) => {
      const cut = cylinder(16 * fine, cable);
      const command = steps('pA', 20, [
        [0, 0],
        [1, 50],
      ]);
      const run = sweepOf({
        ...{ grid: cut, start: allAt(cut, -70), duration: 0.011, probes: [0], sampling: 1e-4, step: 1e-4 / fine },
        pipettes: [pipette('current clamp', command)],
      });
      return Math.abs(finished(runSweep(run)).membrane[0]![110]! + 0.07 - (50e-12 / GInf) * chargedBy(0, 0.5));
    });
    // The two errors together; 1.9 leaves room for the next order.
    for (const order of [Math.log2(errors[0]! / errors[1]!), Math.log2(errors[1]! / errors[2]!)]) {
      expect(order).toBeGreaterThan(1.9);
      expect(order).toBeLessThan(2.3);
    }
  });
});
