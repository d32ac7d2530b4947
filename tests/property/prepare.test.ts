import { describe, expect, it } from 'vitest';
import type { RigDocument } from '../../src-main/contract/documents.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import { chosenStep, dividesSampling } from '../../src-main/protocol/time-step.ts';
import { ticksOfUs } from '../../src-main/protocol/ticks.ts';
import { clampBandwidth, isPerfect, pipettesOf, rigFaults } from '../../src-main/rig/pipette.ts';
import { ballAndStick, planOf, sketch, soma } from '../support/plans.ts';
import { hold, ramp, step } from '../support/protocols.ts';

const cell = ballAndStick({ soma_um: 20, stick_um: 2, length_um: 300 }, { Rm: 1e4, Ri: 100, Cm: 1 });
const clamp = { letter: 'A', site: soma, mode: 'voltage clamp', accessResistance_MOhm: 10 } as const;

describe('the step chosen unasked', () => {
  it.each([
    [20, 20],
    [25, 25],
    [26, 13],
    [50, 25],
    [100, 25],
    [33.3, 16.65],
    [10_000, 25],
  ])('sampling every %d µs: %d µs', (sampling, chosen) => {
    expect(chosenStep(ticksOfUs(sampling)) * 1e6).toBeCloseTo(chosen, 9);
  });

  it('always divides the sampling interval and is at most 25 µs', () => {
    for (let sampling = 1; sampling < 3000; sampling += 1.7) {
      const us = chosenStep(ticksOfUs(sampling)) * 1e6;
      expect(us).toBeLessThanOrEqual(25 + 1e-9);
      expect(dividesSampling(us, sampling)).toBe(true);
    }
  });
});

describe('the clamp window unasked', () => {
  const windowOf = (
    blocks: Parameters<typeof planOf>[0]['lanes'][0]['blocks'],
    protocol: Record<string, unknown> = {},
  ) => preparePlan(planOf({ cell, pipettes: [clamp], lanes: [{ holding: -70, blocks }], protocol })).clampWindow;

  it('is the whole first block a ladder changes', () => {
    const ladders = [{ lane: 'A', block: 'b', number: 'level', rungs: { list: [0, 1] } }];
    expect(windowOf([step('a', 50, 0), step('b', 5, 0)], { ladders })).toEqual({
      lane: 'A',
      from: { block: 'b', edge: 'start', offset_ms: 0 },
      to: { block: 'b', edge: 'end', offset_ms: 0 },
    });
  });

  it('without a ladder, the longest that is not a hold', () => {
    expect(windowOf([hold('h', 90), step('a', 5, 0), ramp('r', 8, 0, 1), hold('t', 50)])?.from.block).toBe('r');
  });

  it('of holds only, the longest; of equals, the first', () => {
    expect(windowOf([hold('a', 5), hold('b', 9), hold('c', 9)])?.from.block).toBe('b');
  });

  it('none without a voltage clamp', () => {
    const plan = planOf({
      cell,
      pipettes: [{ letter: 'A', site: soma, mode: 'current clamp' }],
      lanes: [{ holding: 0, blocks: [hold('a', 5)] }],
    });
    expect(preparePlan(plan).clampWindow).toBeNull();
  });
});

describe('a prepared plan', () => {
  it('has a compartment centre at every pipette and probe', () => {
    const plan = planOf({
      cell,
      pipettes: [{ ...clamp, site: { branch: 1, at_um: 123.4 } }],
      lanes: [{ holding: -70, blocks: [hold('h', 1)] }],
      plan: { probes: [{ name: 'p', site: { branch: 1, at_um: 217.3 } }] },
    });
    const { grid, pipettes, probes } = preparePlan(plan);
    expect(grid.at[pipettes[0]!.compartment]! * 1e6).toBeCloseTo(123.4, 9);
    expect(grid.at[probes[0]!.compartment]! * 1e6).toBeCloseTo(217.3, 9);
  });

  it('halves compartments and steps when asked, sites staying where they are', () => {
    const plan = planOf({ cell, pipettes: [clamp], lanes: [{ holding: -70, blocks: [hold('h', 1)] }] });
    const nominal = preparePlan(plan);
    const finer = preparePlan(plan, { fineness: 0.5, stepDivisor: 2 });
    expect(finer.grid.count).toBeGreaterThan(1.7 * nominal.grid.count);
    expect(finer.step).toBe(nominal.step / 2);
    expect(finer.input(0).tableSpacing).toBe(0.5e-4);
    const areaOf = ({ grid }: typeof nominal): number => grid.area.reduce((sum, A) => sum + A, 0);
    expect(areaOf(finer) / areaOf(nominal)).toBeCloseTo(1, 12);
  });

  it('lets a channel of the cell’s own stand before a stored one of the same name', () => {
    const own = { name: 'k-hodgkin-huxley-1952', reversal_mV: -33, gates: [] };
    const plan = planOf({
      cell: sketch([{ name: 'ball', area_um2: 100, channels: { [own.name]: 1 } }], [], [own]),
      pipettes: [{ ...clamp, site: { compartment: 'ball' } }],
      lanes: [{ holding: -70, blocks: [hold('h', 1)] }],
    });
    const { kinetics, grid } = preparePlan(plan);
    expect(kinetics.size).toBe(0);
    expect(grid.conductances[0]!.reversal[0]).toBe(-0.033);
  });

  it('gives a stored channel its own reversal potential where the make-up gives none', () => {
    const plan = planOf({
      cell: sketch([{ name: 'ball', area_um2: 100, channels: { 'k-hodgkin-huxley-1952': 1 } }], [], []),
      pipettes: [{ ...clamp, site: { compartment: 'ball' } }],
      lanes: [{ holding: -70, blocks: [hold('h', 1)] }],
    });
    const { kinetics, grid } = preparePlan(plan);
    const own = kinetics.get('k-hodgkin-huxley-1952')!.reversal;
    expect(grid.conductances[0]!.reversal[0]).toBeCloseTo(own / 1000, 12);
  });

  it('starts a sketch at initial voltages in the order the document names its compartments', () => {
    const list = ['c', 'a', 'b'].map((name) => ({ name, area_um2: 100, channels: { passive: 1 } }));
    const plan = planOf({
      cell: sketch(list, [
        ['a', 'b', 1],
        ['c', 'b', 1],
      ]),
      pipettes: [{ ...clamp, site: { compartment: 'a' } }],
      lanes: [{ holding: -70, blocks: [hold('h', 1)] }],
      plan: { initial: { voltage_mV: [-30, -10, -20] } },
    });
    const { grid, start } = preparePlan(plan);
    const byName = Object.fromEntries(grid.names!.map((name, k) => [name, start().state.V[k]]));
    expect(byName).toEqual({ a: -0.01, b: -0.02, c: -0.03 });
  });

  it('starts a finer grid at the initial voltage of the nearest centre of the nominal one', () => {
    const parts = { cell, pipettes: [clamp], lanes: [{ holding: -70, blocks: [hold('h', 1)] }] };
    const { count } = preparePlan(planOf(parts)).grid;
    const voltage_mV = Array.from({ length: count }, (_, k) => -80 + k);
    const finer = preparePlan(planOf({ ...parts, plan: { initial: { voltage_mV } } }), { fineness: 0.5 });
    const V = finer.start().state.V;
    expect(V[0]).toBe(-0.08);
    expect(V.at(-1)).toBe(voltage_mV.at(-1)! / 1000);
    for (let k = 1; k < V.length; k += 1) expect(V[k]!).toBeGreaterThanOrEqual(V[k - 1]!);
  });

  it('holds the steady state between sweeps: nothing moves until the first step', () => {
    const plan = planOf({ cell, pipettes: [clamp], lanes: [{ holding: -55, blocks: [hold('h', 20)] }] });
    const V = preparePlan(plan).start().state.V;
    // R of the cell 0.43 GΩ against 10 MΩ: the soma stands a little short of −55.
    expect(V[0]).toBeGreaterThan(-0.0555);
    expect(V.at(-1)).toBeLessThan(V[0]!);
  });
});

describe('a pipette', () => {
  const rig = { pipettes: [{ ...clamp, strayCapacitance_pF: 4, bridge_MOhm: 0 }] } as unknown as RigDocument;
  it('is turned into SI', () => {
    expect(pipettesOf(rig)[0]).toMatchObject({ access: 1e7, stray: 4e-12, bridge: 0 });
    expect(rigFaults(rig)).toEqual([]);
  });
  it('has the bandwidth 1/2πRC: 10 MΩ and 100 pF make 159.15 Hz; an ideal one has none', () => {
    expect(clampBandwidth(1e7, 1e-10)).toBeCloseTo(159.155, 3);
    expect(clampBandwidth(0, 1e-10)).toBeNull();
  });
  it('is perfect only without resistance, capacitance and bridge', () => {
    expect(isPerfect({ access: 0, stray: 0, bridge: 0 })).toBe(true);
    for (const one of ['access', 'stray', 'bridge']) {
      expect(isPerfect({ access: 0, stray: 0, bridge: 0, [one]: 1e-12 })).toBe(false);
    }
  });
});
