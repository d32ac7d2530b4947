// Where a cell comes to at its holding levels, whatever the cell.
import { describe, expect, it } from 'vitest';
import { kineticsOf } from '../../src-main/channels/own.ts';
import { operatingPoint } from '../../src-main/solver/operating-point.ts';
import { runSweep } from '../../src-main/solver/sweep.ts';
import { allAt, finished, pipette, smallGrid, steps, sweepOf } from '../support/small-grids.ts';
import { squidKinetics, squidPatch } from '../support/squid.ts';

const squid = { grid: squidPatch(), kinetics: squidKinetics, temperature: 6.3 };
const currentClamp = (holding_pA: number) => ({
  ...pipette('current clamp', [], { access: 20e6, stray: 4e-12 }),
  holding: holding_pA * 1e-12,
});
const voltageClamp = (holding_mV: number, access: number) => ({
  ...pipette('voltage clamp', [], { access }),
  holding: holding_mV / 1e3,
});

/** A leak to −70 mV and a persistent inward current that can hold the membrane near 0: two stable states. */
const persistent = kineticsOf({
  name: 'persistent',
  reversal_mV: 20,
  gates: [
    {
      ...{ name: 'p', power: 1, q10: 1, q10Reference_C: 22 },
      inf: { kind: 'logistic', A: 1, V0: -35, k: -4 },
      tau: { kind: 'const', value: 2 },
    },
  ],
});
const bistable = {
  grid: smallGrid([{ parent: -1, area_um2: 1000, channels: { leak: 0.1, persistent: 0.4 } }], {
    leak: -70,
    persistent: 20,
  }),
  kinetics: new Map([['persistent', persistent]]),
  temperature: 22,
};

describe('operating point', () => {
  it('is the holding level itself under an ideal clamp, and between level and rest through a resistance', () => {
    const ideal = operatingPoint({ ...squid, pipettes: [voltageClamp(-80, 0)] });
    expect(ideal.state.V[0]).toBe(-0.08);
    const held = operatingPoint({ ...squid, pipettes: [voltageClamp(-80, 10e6)] }).state.V[0]!;
    expect(held).toBeGreaterThan(-0.08);
    expect(held).toBeLessThan(-0.079);
  });

  it('puts a current clamp’s own node above the membrane by I·Rs', () => {
    const { state } = operatingPoint({ ...squid, pipettes: [currentClamp(30)] });
    expect(state.pipetteV![0]! - state.V[0]!).toBeCloseTo(30e-12 * 20e6, 15);
  });

  it('is the low one of two stable states, the one that a membrane at −70 mV goes to', () => {
    const [low, high] = [-70, 0].map(
      (level) =>
        finished(
          runSweep(
            sweepOf({
              ...{ ...bistable, start: allAt(bistable.grid, level), duration: 1, sampling: 1e-3, step: 1e-3 },
              pipettes: [pipette('current clamp', steps('pA', 1000, [[0, 0]]))],
            }),
          ),
        ).end.V[0]!,
    );
    expect(high! - low!).toBeGreaterThan(0.05);
    const point = operatingPoint({ ...bistable, pipettes: [currentClamp(0)] });
    // The sweep's gates come from tables of 0.1 mV.
    expect(Math.abs(point.state.V[0]! - low!)).toBeLessThan(2e-7);
    expect(point.firesOnItsOwn).toBe(false);
  });

  it('of a cell that fires on its own is a moment of its firing, the same every time', () => {
    const firing = () => operatingPoint({ ...squid, pipettes: [currentClamp(150)] });
    const { state, firesOnItsOwn } = firing();
    expect(firesOnItsOwn).toBe(true);
    expect(firing()).toEqual({ state, firesOnItsOwn });
    const on = finished(
      runSweep(
        sweepOf({
          ...{ ...squid, start: state, duration: 0.1, probes: [0] },
          pipettes: [pipette('current clamp', steps('pA', 100, [[0, 150]]), { access: 20e6, stray: 4e-12 })],
        }),
      ),
    );
    expect(Math.max(...on.membrane[0]!)).toBeGreaterThan(0);
  });

  it('can be cancelled, and refuses two ideal clamps in one compartment', () => {
    const refusal = (code: string): unknown => expect.objectContaining({ data: expect.objectContaining({ code }) });
    const cancelled = { ...squid, pipettes: [currentClamp(150)], cancelled: () => true };
    expect(() => operatingPoint(cancelled)).toThrow(refusal('job-cancelled'));
    const rivals = { ...squid, pipettes: [voltageClamp(-70, 0), voltageClamp(-80, 0)] };
    expect(() => operatingPoint(rivals)).toThrow(refusal('quantity-out-of-range'));
  });
});
