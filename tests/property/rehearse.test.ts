import { describe, expect, it } from 'vitest';
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import { passiveEstimate, type EstimateMemory } from '../../src-main/forecast/estimate.ts';
import { gatherForecast } from '../../src-main/forecast/gather.ts';
import { rehearseSweep } from '../../src-main/forecast/rehearse.ts';
import type { RehearsedSweep } from '../../src-main/forecast/sweep-rehearsal.ts';
import { preparePlan, type PreparedPlan } from '../../src-main/solver/prepare.ts';
import type { SweepState } from '../../src-main/solver/run.ts';
import { ballAndStick, planOf, sketch, soma, type PlanParts } from '../support/plans.ts';
import { hold, step } from '../support/protocols.ts';

const passive: PlanParts = {
  cell: ballAndStick({ soma_um: 20, stick_um: 3, length_um: 600 }, { Rm: 1.5e4, Ri: 150, Cm: 1, rest_mV: -63 }),
  pipettes: [
    { letter: 'A', site: soma, mode: 'voltage clamp', accessResistance_MOhm: 15 },
    { letter: 'B', site: { branch: 1, at_um: 400 }, mode: 'current clamp', accessResistance_MOhm: 40, bridge_MOhm: 40 },
  ],
  lanes: [
    { holding: -70, blocks: [hold('before', 5), step('test', 150, -60), hold('after', 5)] },
    { holding: 0, blocks: [hold('rest', 10)] },
  ],
  protocol: { ladders: [{ lane: 'A', block: 'test', number: 'level', rungs: { list: [-90, -70, -40] } }] },
  plan: { probes: [{ name: 'tip', site: { branch: 1, at_um: 600 } }] },
};

const leak = { name: 'passive', reversal_mV: -54.387, gates: [] };
const squid = sketch(
  [
    {
      name: 'patch',
      area_um2: 10_000,
      channels: { 'na-hodgkin-huxley-1952': 120, 'k-hodgkin-huxley-1952': 36, passive: 0.3 },
    },
  ],
  [],
  [leak],
);
const spiking = (protocol: Record<string, unknown>): PlanDocument =>
  planOf({
    cell: squid,
    pipettes: [{ letter: 'A', site: { compartment: 'patch' }, mode: 'current clamp' }],
    lanes: [{ holding: 0, blocks: [hold('before', 2), step('test', 1, 2000), hold('after', 4)] }],
    protocol: { sweepInterval_ms: 7, repeats: 3, ...protocol },
  });

function done(prepared: PreparedPlan, sweep: number, start?: SweepState): RehearsedSweep {
  const rehearsed = rehearseSweep(prepared, sweep, start && { start });
  if (rehearsed.kind !== 'done') throw new Error(rehearsed.kind);
  return rehearsed;
}

describe('the search for where sweeps start', () => {
  it('ends when the rehearsal is cancelled, and begins again with the next', () => {
    // 1 nA makes the patch fire: a second is simulated, of which the cancel spares most.
    const plan = planOf({
      cell: squid,
      pipettes: [{ letter: 'A', site: { compartment: 'patch' }, mode: 'current clamp' }],
      lanes: [{ holding: 1000, blocks: [hold('rest', 5)] }],
    });
    const prepared = preparePlan(plan);
    let polls = 0;
    expect(rehearseSweep(prepared, 0, { cancelled: () => (polls += 1) > 5 })).toEqual({ kind: 'cancelled', sweep: 0 });
    expect(polls).toBe(6);
    expect(done(prepared, 0).kind).toBe('done');
    expect(prepared.start().firesOnItsOwn).toBe(true);
  });
});

describe('the interval between sweeps that carry over', () => {
  it('leaves the cell as a sweep does that is held as long', () => {
    const carried = done(preparePlan(spiking({ carryOver: true, sweepInterval_ms: 20 })), 0).end;
    const held = planOf({
      cell: squid,
      pipettes: [{ letter: 'A', site: { compartment: 'patch' }, mode: 'current clamp' }],
      lanes: [{ holding: 0, blocks: [hold('before', 2), step('test', 1, 2000), hold('after', 17)] }],
      protocol: { sweepInterval_ms: 20 },
    });
    const { V, gates } = done(preparePlan(held), 0).end;
    // The same steps, but for the damped ones where the interval begins: measured 3e-10 V and 2e-8.
    expect(Math.abs(carried.V[0]! - V[0]!)).toBeLessThan(3e-9);
    carried.gates?.flat().forEach((state, g) => {
      expect(Math.abs(state[0]! - (gates?.flat()[g]?.[0] ?? NaN))).toBeLessThan(2e-7);
    });
    expect(carried.gates?.flat()).toHaveLength(3);
  });

  it('takes no memory for its length, and can be cancelled in it', () => {
    // Twelve days at 20 kHz: 2·10¹⁰ samples.
    const prepared = preparePlan(spiking({ carryOver: true, sweepInterval_ms: 1e9 }));
    let polls = 0;
    expect(rehearseSweep(prepared, 0, { cancelled: () => (polls += 1) > 3 })).toEqual({ kind: 'cancelled', sweep: 0 });
  });
});

describe('a rehearsed sweep', () => {
  it('has a recording, command and membrane for each pipette and a membrane for each probe, in trade units', () => {
    const { traces } = done(preparePlan(planOf(passive)), 0);
    expect(traces.map(({ key, unit }) => `${key} ${unit}`)).toEqual([
      'recording:A pA',
      'command:A mV',
      'membrane:A mV',
      'recording:B mV',
      'command:B pA',
      'membrane:B mV',
      'membrane:tip mV',
    ]);
    for (const { values, interval_ms, start_ms, sweep } of traces) {
      expect(values).toHaveLength(8001); // 160 ms by 20 µs, both ends
      expect({ interval_ms, start_ms, sweep }).toEqual({ interval_ms: 0.02, start_ms: 0, sweep: 0 });
    }
    const command = traces[1]!.values;
    expect([command[249], command[250], command[7749], command[7750]]).toEqual([-70, -90, -90, -70]);
  });

  it('survives the way to another thread as it is', () => {
    const rehearsed = rehearseSweep(preparePlan(planOf(passive)), 1);
    expect(structuredClone(rehearsed)).toEqual(rehearsed);
  });

  it('has the same bits when run again, by another preparation, after other sweeps', () => {
    const [one, other] = [preparePlan(planOf(passive)), preparePlan(planOf(passive))];
    rehearseSweep(other, 0);
    expect(rehearseSweep(other, 2)).toEqual(rehearseSweep(one, 2));
  });

  it('stops when told to', () => {
    const prepared = preparePlan(planOf(passive));
    expect(rehearseSweep(prepared, 0, { cancelled: () => true })).toEqual({ kind: 'cancelled', sweep: 0 });
  });

  it('tells its progress, rising from 0 and never past 1', () => {
    const told: number[] = [];
    rehearseSweep(preparePlan(planOf(passive)), 0, { progress: (part) => told.push(part) });
    expect(told[0]).toBe(0);
    expect(told.length).toBeGreaterThan(10);
    expect(told).toEqual(told.toSorted((a, b) => a - b));
    expect(told.at(-1)).toBeLessThanOrEqual(1);
  });
});

describe('sweeps that carry over', () => {
  const peakOf = (sweep: RehearsedSweep): number => Math.max(...sweep.traces[0]!.values);

  it('start where the one before has come, and a cell that has just fired does not fire again', () => {
    const prepared = preparePlan(spiking({ carryOver: true }));
    const first = done(prepared, 0);
    const second = done(prepared, 1, first.end);
    expect(peakOf(first)).toBeGreaterThan(20);
    expect(peakOf(second)).toBeLessThan(0);
    expect(second.traces[0]!.values[0]).toBeCloseTo(first.traces[0]!.values.at(-1)!, 6);
  });

  it('are simulated through the interval: after 60 ms the cell has recovered', () => {
    const prepared = preparePlan(spiking({ carryOver: true, sweepInterval_ms: 60 }));
    const first = done(prepared, 0);
    expect(peakOf(done(prepared, 1, first.end))).toBeCloseTo(peakOf(first), 0);
  });

  it('afresh, each is the first again', () => {
    const prepared = preparePlan(spiking({}));
    const first = done(prepared, 0);
    expect(done(prepared, 1).traces[0]!.values).toEqual(first.traces[0]!.values);
    // The interval is not simulated for nothing: the end is the end of the sweep.
    expect(first.end.V[0]).toBeCloseTo(first.traces[0]!.values.at(-1)! / 1000, 9);
  });
});

describe('the forecast', () => {
  it('does not depend on the order in which sweeps come in', () => {
    const prepared = preparePlan(planOf(passive));
    const sweeps = [0, 1, 2].map((i) => rehearseSweep(prepared, i));
    expect(gatherForecast(prepared, sweeps.toReversed())).toEqual(gatherForecast(prepared, sweeps));
  });

  it('says which sweeps are missing instead of filling them in', () => {
    const reading = { lane: 'A', from: { block: 'test', edge: 'start' }, to: { block: 'test', edge: 'end' } };
    const readings = [{ id: 'r', name: 'r', pipette: 'A', measure: 'mean', window: reading }];
    const prepared = preparePlan(planOf({ ...passive, protocol: { ...passive.protocol, readings } }));
    const forecast = gatherForecast(prepared, [rehearseSweep(prepared, 1), { kind: 'cancelled', sweep: 0 }]);
    expect(forecast.notes[0]).toBe('2 of 3 sweeps did not finish and are left out.');
    expect([...forecast.readings[0]!.recorded].map(Number.isNaN)).toEqual([true, false, true]);
    expect([...forecast.readings[0]!.ladderValue]).toEqual([-90, -70, -40]);
  });

  it('gives the largest current with its sign', () => {
    const prepared = preparePlan(planOf(passive));
    const { pipettes } = gatherForecast(prepared, [rehearseSweep(prepared, 0)]);
    // −20 mV through 15 MΩ at once, less the holding current: near −1333 pA.
    expect(pipettes[0]!.largestCurrent_pA).toBeLessThan(-1300);
    expect(pipettes[1]!.clampBandwidth_Hz).toBeNull();
  });
});

describe('the passive estimate', () => {
  it('is the rehearsal of a membrane without gates, at its largest step', () => {
    const plan = planOf(passive);
    const prepared = preparePlan(plan);
    const { clamp } = gatherForecast(prepared, [rehearseSweep(prepared, 2)]);
    const estimate = passiveEstimate(plan);
    expect(estimate.reach).toBeCloseTo(clamp!.reach, 9);
    // 150 ms are ten membrane time constants and far more of the clamped cell's.
    expect(estimate.accessError_mV).toBeCloseTo(clamp!.accessError_mV, 6);
    expect(estimate.control).toHaveLength(prepared.grid.count);
    expect(estimate.control![0]).toBe(1);
  });

  it('counts a second voltage clamp, which holds its own site', () => {
    const both = planOf({
      ...passive,
      pipettes: passive.pipettes.map((pipette) => ({ ...pipette, mode: 'voltage clamp' as const, bridge_MOhm: 0 })),
      lanes: passive.lanes.map(({ blocks }) => ({ holding: -70, blocks })),
    });
    const prepared = preparePlan(both);
    const { clamp } = gatherForecast(prepared, [rehearseSweep(prepared, 2)]);
    const estimate = passiveEstimate(both);
    expect(estimate.reach).toBeCloseTo(clamp!.reach, 9);
    expect(estimate.accessError_mV).toBeCloseTo(clamp!.accessError_mV, 6);
    const far = prepared.pipettes[1]!.compartment;
    expect(estimate.control![far]!).toBeLessThan(passiveEstimate(planOf(passive)).control![far]!);
  });

  it('has no reach without a voltage clamp, but the cell’s input resistance', () => {
    const free = planOf({ ...passive, pipettes: [passive.pipettes[1]!], lanes: [passive.lanes[1]!], protocol: {} });
    const estimate = passiveEstimate(free);
    expect(estimate).toMatchObject({ reach: null, accessError_mV: null, control: null, clampBandwidth_Hz: null });
    expect(estimate.inputResistance_MOhm).toBeGreaterThan(100);
  });

  it('gives the same answer with a memory, whatever was asked before', () => {
    const memory: EstimateMemory = {};
    const moved = planOf({
      ...passive,
      pipettes: [{ ...passive.pipettes[0]!, site: { branch: 1, at_um: 50 } }, passive.pipettes[1]!],
    });
    for (const plan of [planOf(passive), moved, planOf(passive)]) {
      expect(passiveEstimate(plan, memory)).toEqual(passiveEstimate(plan));
    }
  });
});
