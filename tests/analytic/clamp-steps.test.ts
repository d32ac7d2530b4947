// Voltage clamp of one compartment through access resistance: τ = C·Rs·R/(Rs + R), I(0+) = ΔV/Rs, I(∞) = ΔV/(Rs + R).
// Elementary; stated so by Marty A, Neher E (1995), Single-Channel Recording, 2nd ed., p. 31 (from memory).
import { describe, expect, it } from 'vitest';
import { runSweep } from '../../src-main/solver/sweep.ts';
import { observedOrders } from '../support/observed-orders.ts';
import { allAt, cylinder, finished, pipette, smallGrid, steps, sweepOf } from '../support/small-grids.ts';
import { na, k, squidChannels, squidKinetics, squidReversals } from '../support/squid.ts';

/** 100 pF and 200 MΩ. */
const round = () => smallGrid([{ parent: -1, area_um2: 10000, channels: { leak: 0.05 } }], { leak: -70 });
const cable = { d_um: 2, length_um: 500, Rm_ohm_cm2: 20000, Ri_ohm_cm: 150, Cm_uF_cm2: 1, rest_mV: -70 };

describe('clamp step through access resistance', () => {
  const stepAt = (access: number, step: number, sampling: number) => {
    const grid = round();
    const command = steps('mV', 20, [
      [0, -70],
      [5, -60],
    ]);
    return finished(
      runSweep(
        sweepOf({
          ...{ grid, start: allAt(grid, -70), duration: 0.02, probes: [0], step, sampling },
          pipettes: [pipette('voltage clamp', command, { access })],
        }),
      ),
    );
  };

  it('follows the exponential at every sample, 10 MΩ, within 0.03 % of the jump at 25 µs', () => {
    const current = stepAt(10e6, 25e-6, 25e-6).recorded[0]!;
    const tau = (100e-12 * 10e6 * 200e6) / 210e6;
    for (let i = 200; i < current.length; i++) {
      const t = i * 25e-6 - 0.005;
      const exact = 0.01 / 210e6 + (0.01 / 10e6 - 0.01 / 210e6) * Math.exp(-t / tau);
      // The trapezoidal rule errs by (h/τ)²/12·T·e^-T, 2e-5 at T = 1, the damped steps before it by as much.
      expect(Math.abs(current[i]! - exact) / 1e-9, `${t * 1e3} ms after the step`).toBeLessThan(3e-4);
    }
  });

  it.each([
    [1e6, 1e-3],
    [10e6, 2e-3],
    [50e6, 5e-3],
  ])('is of second order across the step, %s Ω, from 12.5 µs on', (access, later) => {
    const tau = (100e-12 * access * 200e6) / (access + 200e6);
    const exact = 0.01 / (access + 200e6) + ((0.01 / access) * 200e6 * Math.exp(-later / tau)) / (access + 200e6);
    // Later than the damped steps, whose own error is of third order and of the other sign.
    const errors = [12.5e-6, 6.25e-6, 3.125e-6].map((step) =>
      Math.abs(stepAt(access, step, 50e-6).recorded[0]![Math.round((0.005 + later) / 50e-6)]! - exact),
    );
    for (const order of observedOrders(errors)) {
      expect(order).toBeGreaterThan(1.8);
      expect(order).toBeLessThan(2.2);
    }
  });
});

describe('clamp steps on squid membrane while its gates move', () => {
  it('are of second order too, through 30 MΩ from 12.5 µs on, in voltage and current, on regular steps and off them', () => {
    const grid = smallGrid([{ parent: -1, area_um2: 1000, channels: squidChannels }], squidReversals);
    // The second jump finds sodium half activated; the third falls between regular steps.
    const command = steps('mV', 12, [
      [0, -70],
      [5, -20],
      [5.4, -45],
      [6.0037, -60],
    ]);
    const courses = [12.5e-6, 6.25e-6, 3.125e-6, 1.5625e-6].map((step) => {
      const run = sweepOf({
        ...{ grid, kinetics: squidKinetics, start: allAt(grid, -70), duration: 0.012, probes: [0] },
        pipettes: [pipette('voltage clamp', command, { access: 30e6 })],
        ...{ sampling: 25e-6, step, tableSpacing: 1e-5 },
      });
      return finished(runSweep(run));
    });
    // After the first jump, and 0.25 ms and later after the last.
    for (const sample of [216, 250, 260, 300, 400]) {
      const changes = (of: (run: (typeof courses)[0]) => number): number[] =>
        courses.slice(1).map((run, i) => Math.abs(of(run) - of(courses[i]!)));
      for (const seen of [
        changes(({ membrane }) => membrane[0]![sample]!),
        changes(({ current }) => current[0]![sample]!),
      ]) {
        for (const order of observedOrders(seen)) expect(order, `sample ${sample}`).toBeGreaterThan(1.8);
      }
    }
  });
});

describe('no ringing after a jump of 100 mV, steps of 25 µs', () => {
  const cells = {
    'a round cell of 20 pF': smallGrid([{ parent: -1, area_um2: 2000, channels: { leak: 0.05 } }], { leak: -70 }),
    'a round cell of 100 pF': round(),
    'the end of a dendrite': cylinder(50, cable),
  };
  const accesses = [0.1e6, 0.3e6, 1e6, 10e6, 50e6];
  const all = Object.keys(cells).flatMap((cell) => accesses.map((access) => [cell, access] as const));

  it.each(all)(
    'in %s through %s Ω: the current only falls, and the voltage never passes the command',
    (cell, access) => {
      const grid = cells[cell as keyof typeof cells];
      // The way back falls between two regular steps.
      const command = steps('mV', 20, [
        [0, -70],
        [5, 30],
        [12.0103, -70],
      ]);
      const { current, membrane } = finished(
        runSweep(
          sweepOf({
            ...{ grid, start: allAt(grid, -70), duration: 0.02, probes: [0] },
            pipettes: [pipette('voltage clamp', command, { access })],
          }),
        ),
      );
      const jump = 0.1 / access;
      // Of the jump: what is left of the fastest ringing mode after the damped steps, measured 1.5e-7 at worst.
      const least = 1e-6;
      const [I, V] = [current[0]!, membrane[0]!];
      for (let i = 200; i < 479; i++) {
        expect((I[i + 1]! - I[i]!) / jump, `sample ${i - 199} after the step`).toBeLessThan(least);
        expect(V[i]! - 0.03).toBeLessThan(least * 0.1);
      }
      for (let i = 481; i < I.length - 1; i++) {
        expect((I[i + 1]! - I[i]!) / jump, `sample ${i - 480} after the way back`).toBeGreaterThan(-least);
        expect(-0.07 - V[i]!).toBeLessThan(least * 0.1);
      }
    },
  );
});

describe('ideal clamp of squid membrane', () => {
  it('draws exactly the current of gates that relax exponentially', () => {
    // At a constant V: x(t) = inf + (x0 − inf)·e^(−t/τ), from the steady state at −70 mV.
    const grid = smallGrid([{ parent: -1, area_um2: 1000, channels: squidChannels }], squidReversals);
    const command = steps('mV', 12, [
      [0, -70],
      [2, -12.34],
    ]);
    const run = sweepOf({
      ...{ grid, kinetics: squidKinetics, start: allAt(grid, -70), duration: 0.012 },
      pipettes: [pipette('voltage clamp', command)],
    });
    const current = finished(runSweep(run)).recorded[0]!;
    const gate = (channel: string, index: number, t: number): number => {
      const { inf, tau } = squidKinetics.get(channel)!.gates[index]!;
      return inf(-12.34) + (inf(-70) - inf(-12.34)) * Math.exp(-t / tau(-12.34));
    };
    for (const sample of [80, 81, 90, 120, 200, 480]) {
      const t = sample * 0.025 - 2;
      // mS/cm² · mV on 1e-5 cm² = 1e-11 A each.
      const exact =
        1e-11 *
        (0.3 * (-12.34 + 54.387) +
          120 * gate(na, 0, t) ** 3 * gate(na, 1, t) * (-12.34 - 50) +
          36 * gate(k, 0, t) ** 4 * (-12.34 + 77));
      // Of the largest current, 10 nA: linear interpolation in the gate tables.
      expect(Math.abs(current[sample]! - exact) / 1e-8, `${t} ms`).toBeLessThan(2e-5);
    }
  });
});
