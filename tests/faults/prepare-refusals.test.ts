// Plans that cannot be run: each fault with its code and place, and all of them at once.
import { describe, expect, it } from 'vitest';
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import { Refusal } from '../../src-main/units/refuse.ts';
import { ballAndStick, planOf, sketch, soma, type PlanParts } from '../support/plans.ts';
import { hold, step } from '../support/protocols.ts';

function faultsOf(plan: PlanDocument): string[] {
  try {
    preparePlan(plan);
  } catch (error) {
    if (error instanceof Refusal) return error.all.map(({ code, place }) => `${code} ${place}`);
    throw error;
  }
  return [];
}

const stick = ballAndStick({ soma_um: 20, stick_um: 2, length_um: 300 }, { Rm: 1e4, Ri: 100, Cm: 1 });
const sound: PlanParts = {
  cell: stick,
  pipettes: [{ letter: 'A', site: soma, mode: 'voltage clamp', accessResistance_MOhm: 10 }],
  lanes: [{ holding: -70, blocks: [hold('before', 5), step('test', 10, -20)] }],
};
const withPlan = (plan: Record<string, unknown>): PlanDocument => planOf({ ...sound, plan });
const withPipette = (parts: Record<string, unknown>): PlanDocument =>
  planOf({ ...sound, pipettes: [{ ...sound.pipettes[0]!, ...parts }] });
const two = (second: Record<string, unknown>): PlanDocument =>
  planOf({
    ...sound,
    pipettes: [sound.pipettes[0]!, { letter: 'B', site: soma, mode: 'current clamp', ...second }],
    lanes: [sound.lanes[0]!, { holding: 0, blocks: [hold('h', 5)] }],
  });
const relaned = (lanes: unknown): PlanDocument => planOf({ ...sound, protocol: { lanes } });
const lane = (pipette: string, unit: string): unknown => ({ pipette, unit, holding: 0, blocks: [hold('h', 5)] });
const ownGate = (gate: Record<string, unknown>): PlanDocument => {
  const channel = { name: 'mine', reversal_mV: 0, gates: [{ name: 'x', power: 1, ...gate }] };
  const site = { compartment: 'ball' };
  const cell = sketch([{ name: 'ball', area_um2: 100, channels: { mine: 1 } }], [], [channel]);
  return planOf({ ...sound, cell, pipettes: [{ ...sound.pipettes[0]!, site }] });
};
const flat = { kind: 'const', value: 1 };

describe('a plan that can be run', () => {
  it('is prepared', () => expect(faultsOf(planOf(sound))).toEqual([]));
  it('may have its clamp window, probes, initial voltage and step', () => {
    const plan = withPlan({
      clampWindow: {
        lane: 'A',
        from: { block: 'test', edge: 'end', offset_ms: -2 },
        to: { block: 'test', edge: 'end' },
      },
      probes: [{ name: 'tip', site: { branch: 1, at_um: 300 } }],
      initial: { voltage_mV: -65 },
      step_us: 6.666666666666667,
    });
    expect(faultsOf(plan)).toEqual([]);
    expect(preparePlan(plan).step).toBeCloseTo(20e-6 / 3, 18);
  });
});

describe('is refused with its place', () => {
  const cases: [string, PlanDocument, string][] = [
    ['a bridge in voltage clamp', withPipette({ bridge_MOhm: 5 }), 'quantity-out-of-range rig.pipettes[0].bridge_MOhm'],
    [
      'a site past the branch',
      withPipette({ site: { branch: 1, at_um: 301 } }),
      'site-off-the-cell rig.pipettes[0].site.at_um',
    ],
    [
      'a site on no branch',
      withPipette({ site: { branch: 7, at_um: 0 } }),
      'site-off-the-cell rig.pipettes[0].site.branch',
    ],
    [
      'a probe off the cell',
      withPlan({ probes: [{ name: 'far', site: { branch: 1, at_um: 999 } }] }),
      'site-off-the-cell plan.probes[0].site.at_um',
    ],
    ['a probe named as a pipette', withPlan({ probes: [{ name: 'A', site: soma }] }), 'name-twice plan.probes[0].name'],
    [
      'two probes of one name',
      withPlan({ probes: [10, 20].map((at_um) => ({ name: 'p', site: { branch: 1, at_um } })) }),
      'name-twice plan.probes[1].name',
    ],
    [
      'a step that does not divide the sampling interval',
      withPlan({ step_us: 7 }),
      'quantity-out-of-range plan.step_us',
    ],
    ['a step longer than the sampling interval', withPlan({ step_us: 40 }), 'quantity-out-of-range plan.step_us'],
    [
      'a question about no reading',
      withPlan({ question: { reading: 'gone', bias_percent: 5 } }),
      'name-unknown plan.question.reading',
    ],
    [
      'initial voltages for another grid',
      withPlan({ initial: { voltage_mV: [-70, -70] } }),
      'quantity-out-of-range plan.initial.voltage_mV',
    ],
    [
      'a clamp window on no block',
      withPlan({
        clampWindow: { lane: 'A', from: { block: 'gone', edge: 'start' }, to: { block: 'test', edge: 'end' } },
      }),
      'name-unknown plan.clampWindow.from.block',
    ],
    [
      'a clamp window past the sweep',
      withPlan({
        clampWindow: {
          lane: 'A',
          from: { block: 'test', edge: 'start' },
          to: { block: 'test', edge: 'end', offset_ms: 1 },
        },
      }),
      'window-outside-sweep plan.clampWindow',
    ],
    ['a lane in the wrong unit', relaned([lane('A', 'pA')]), 'unit-unknown protocol.lanes[0].unit'],
    ['a lane of no pipette', relaned([lane('A', 'mV'), lane('B', 'mV')]), 'name-unknown protocol.lanes[1].pipette'],
    [
      'a pipette without a lane',
      planOf({ ...sound, pipettes: [sound.pipettes[0]!, { letter: 'B', site: soma, mode: 'current clamp' }] }),
      'document-field-missing protocol.lanes',
    ],
    [
      'a channel nobody knows',
      planOf({
        ...sound,
        cell: sketch([{ name: 'ball', area_um2: 100, channels: { nobody: 1 } }]),
        pipettes: [{ ...sound.pipettes[0]!, site: { compartment: 'ball' } }],
      }),
      'name-unknown cell.compartments[0].channels.nobody',
    ],
    [
      'a steady state above 1',
      ownGate({ inf: { kind: 'const', value: 1.2 }, tau: flat }),
      'quantity-out-of-range cell.channels[0].gates[0]',
    ],
    [
      'a time constant that turns negative at −140 mV',
      ownGate({
        inf: { kind: 'const', value: 0.5 },
        tau: { kind: 'sum', of: [flat, { kind: 'exp', A: -1, V0: -140, k: -2 }] },
      }),
      'quantity-out-of-range cell.channels[0].gates[0]',
    ],
  ];
  it.each(cases)('%s', (_, plan, fault) => expect(faultsOf(plan)).toEqual([fault]));

  it('two ideal clamps on one spot', () => {
    const plan = two({ mode: 'voltage clamp', accessResistance_MOhm: 0 });
    const both = planOf({
      ...sound,
      pipettes: plan.rig.pipettes.map((pipette) => ({ ...pipette, accessResistance_MOhm: 0 })),
      lanes: plan.protocol.lanes,
    });
    expect(faultsOf(both)).toEqual(['quantity-out-of-range rig.pipettes[1].accessResistance_MOhm']);
  });
});

describe('refusals of a plan', () => {
  it('tell the faults of every part at once', () => {
    const plan = planOf({
      cell: stick,
      pipettes: [
        { letter: 'A', site: { branch: 1, at_um: 999 }, mode: 'voltage clamp', bridge_MOhm: 1 },
        { letter: 'A', site: { branch: 9, at_um: 0 }, mode: 'current clamp' },
      ],
      lanes: [{ holding: 0, blocks: [hold('h', 0)] }],
      plan: { step_us: 7, question: { reading: 'r', bias_percent: 1 } },
      protocol: {},
    });
    expect(faultsOf(plan)).toEqual([
      'quantity-out-of-range rig.pipettes[0].bridge_MOhm',
      'name-twice rig.pipettes[1].letter',
      'quantity-out-of-range plan.step_us',
      'protocol-empty protocol.lanes',
      'site-off-the-cell rig.pipettes[0].site.at_um',
      'site-off-the-cell rig.pipettes[1].site.branch',
    ]);
  });

  it('list the channels there are', () => {
    const cell = sketch([{ name: 'ball', area_um2: 100, channels: { nobody: 1 } }]);
    const plan = planOf({ ...sound, cell, pipettes: [{ ...sound.pipettes[0]!, site: { compartment: 'ball' } }] });
    const remedy = expect.stringContaining('passive, na-hodgkin-huxley-1952');
    expect(() => preparePlan(plan)).toThrow(expect.objectContaining({ data: expect.objectContaining({ remedy }) }));
  });

  it('name the voltage at which a gate fails', () => {
    const tau = { kind: 'sum', of: [flat, { kind: 'exp', A: -1, V0: -140, k: -2 }] };
    const value = expect.stringMatching(/^time constant -\d+\.\d+ ms at -150 mV$/);
    expect(() => preparePlan(ownGate({ inf: { kind: 'const', value: 0.5 }, tau }))).toThrow(
      expect.objectContaining({ data: expect.objectContaining({ value }) }),
    );
  });
});
