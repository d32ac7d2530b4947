// The truth of a voltage clamp. Gates under a step: Hodgkin & Huxley (1952), J Physiol 117:500–544, eqs 7–26 (from
// memory), here with rest at −65 mV and 6.3 °C.
import { describe, expect, it } from 'vitest';
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import { rehearseSweep } from '../../src-main/forecast/rehearse.ts';
import { perfectClamp } from '../../src-main/forecast/perfect-clamp.ts';
import { gatherForecast } from '../../src-main/forecast/gather.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import { planOf, sketch } from '../support/plans.ts';
import { hold, ramp, step } from '../support/protocols.ts';

const leak = { name: 'passive', reversal_mV: -54.387, gates: [] };
const channels = { 'na-hodgkin-huxley-1952': 120, 'k-hodgkin-huxley-1952': 36, passive: 0.3 };
const squid = sketch([{ name: 'patch', area_um2: 10_000, channels }], [], [leak]);

const window = (from: string, to: string): unknown => ({
  lane: 'A',
  from: { block: from, edge: 'start', offset_ms: 0 },
  to: { block: to, edge: 'end', offset_ms: 0 },
});

function familyOf(
  cell: unknown,
  access: number,
  blocks = [hold('before', 2), step('test', 10, 0), hold('after', 5)],
): PlanDocument {
  const site = { compartment: 'patch' };
  return planOf({
    cell,
    pipettes: [{ letter: 'A', site, mode: 'voltage clamp', accessResistance_MOhm: access }],
    lanes: [{ holding: -65, blocks }],
    protocol: {
      sampling_us: 10,
      ladders: [{ lane: 'A', block: 'test', number: 'level', rungs: { list: [-40, -10, 20] } }],
      readings: [
        {
          id: 'inward',
          name: 'inward peak',
          pipette: 'A',
          measure: 'peak',
          direction: 'negative',
          window: window('test', 'test'),
        },
        { id: 'outward', name: 'outward mean', pipette: 'A', measure: 'mean', window: window('test', 'test') },
        { id: 'tail', name: 'tail charge', pipette: 'A', measure: 'charge', window: window('after', 'after') },
      ],
    },
    plan: { step_us: 5 },
  });
}

describe('one compartment under an ideal clamp is a perfect clamp', () => {
  it('recorded and true readings agree for a squid patch, the capacity transient being in no sample', () => {
    const prepared = preparePlan(familyOf(squid, 0));
    const sweeps = [0, 1, 2].map((i) => rehearseSweep(prepared, i));
    const { readings } = gatherForecast(prepared, sweeps);
    expect(readings.map(({ unit }) => unit)).toEqual(['pA', 'pA', 'fC']);
    for (const { recorded, truth, name } of readings) {
      // Gate tables every 0.1 mV, interpolated, are good to 1e-5; the truth takes the formulas themselves.
      truth!.forEach((value, i) => expect(recorded[i]! / value, `${name}, sweep ${i}`).toBeCloseTo(1, 4));
    }
    // Not an empty agreement: the peak at −10 mV is inward and large.
    expect(readings[0]!.truth![1]).toBeLessThan(-5e4);
  });

  it('through an access resistance the recorded peak differs and the true one does not move', () => {
    const peaks = [0, 2].map((access) => {
      const prepared = preparePlan(familyOf(squid, access));
      return gatherForecast(prepared, [rehearseSweep(prepared, 1)]).readings[0]!;
    });
    expect(peaks[1]!.truth![1]).toBe(peaks[0]!.truth![1]);
    expect(Math.abs(peaks[1]!.recorded[1]! / peaks[0]!.recorded[1]! - 1)).toBeGreaterThan(0.02);
  });

  it('cutting the membrane in two loosely coupled halves leaves the truth as it is', () => {
    const halves = ['patch', 'far'].map((name) => ({ name, area_um2: 5000, channels }));
    const cut = preparePlan(familyOf(sketch(halves, [['patch', 'far', 1]], [leak]), 0));
    const whole = preparePlan(familyOf(squid, 0));
    const truthOf = (prepared: typeof cut): number =>
      gatherForecast(prepared, [rehearseSweep(prepared, 1)]).readings[0]!.truth![1]!;
    expect(truthOf(cut) / truthOf(whole)).toBeCloseTo(1, 12);
  });
});

describe('gates under a command', () => {
  // One gate, ∞ = 1/(1 + e^(−(V+30)/10)), τ = 3 ms: x(t) = ∞ + (x0 − ∞)·e^(−t/τ).
  const inf = (V: number): number => 1 / (1 + Math.exp(-(V + 30) / 10));
  const kinetics = new Map([
    [
      'slow',
      {
        name: 'slow',
        reversal: -80,
        source: 'ours',
        gates: [{ name: 'n', power: 2, inf, tau: () => 3, q10: 3, q10Reference: 12 }],
      },
    ],
  ]);
  const grid = {
    count: 2,
    conductances: [
      { channel: 'slow', conductance: Float64Array.of(2e-9, 3e-9), reversal: Float64Array.of(-0.08, -0.09) },
      { channel: 'leak', conductance: Float64Array.of(1e-9, 0), reversal: Float64Array.of(-0.07, -0.07) },
    ],
  };
  const start = Float64Array.of(-0.07, -0.07);
  const timing = { step: 20e-6, sampling: 100e-6, samples: 201 };

  it('follow the exponential exactly on a step, temperature included', () => {
    const command = [
      { start: 0, end: 5e-3, v0: -0.07, v1: -0.07 },
      { start: 5e-3, end: 20e-3, v0: 0, v1: 0 },
    ];
    // 22 °C, q10 3 from 12 °C: three times as fast.
    const I = perfectClamp({ grid, kinetics, temperature: 22, start }).play(command, timing);
    for (const i of [50, 51, 77, 200]) {
      const x = inf(0) + (inf(-70) - inf(0)) * Math.exp(-(i * 0.1 - 5) / 1);
      const exact = x ** 2 * (2e-9 * 0.08 + 3e-9 * 0.09) + 1e-9 * 0.07;
      expect(I[i]! / exact, `sample ${i}`).toBeCloseTo(1, 12);
    }
    const before = inf(-70) ** 2 * (2e-9 * 0.01 + 3e-9 * 0.02);
    expect(I[49]! / before).toBeCloseTo(1, 12);
  });

  it('converge at second order on a ramp', () => {
    const command = [{ start: 0, end: 20e-3, v0: -0.08, v1: 0.04 }];
    const at = (step: number): number =>
      perfectClamp({ grid, kinetics, temperature: 12, start }).play(command, { ...timing, step })[150]!;
    const fine = at(100e-6 / 64);
    const errors = [100e-6, 50e-6, 25e-6].map((step) => Math.abs(at(step) - fine));
    expect(Math.log2(errors[0]! / errors[1]!)).toBeCloseTo(2, 1);
    expect(Math.log2(errors[1]! / errors[2]!)).toBeCloseTo(2, 1);
  });

  it('carry over from command to command', () => {
    const pieces = [
      { start: 0, end: 4e-3, v0: -0.02, v1: -0.02 },
      { start: 4e-3, end: 20e-3, v0: -0.06, v1: -0.01 },
    ];
    const whole = perfectClamp({ grid, kinetics, temperature: 12, start });
    const split = perfectClamp({ grid, kinetics, temperature: 12, start });
    split.pass([pieces[0]!], 20e-6);
    const later = split.play([{ start: 0, end: 16e-3, v0: -0.06, v1: -0.01 }], { ...timing, samples: 161 });
    const all = whole.play(pieces, timing);
    for (const i of [0, 80, 160]) expect(later[i]! / all[i + 40]!).toBeCloseTo(1, 9);
  });

  it('start apart where the plan starts compartments at different voltages', () => {
    const mixed = Float64Array.of(-0.07, -0.03);
    const command = [{ start: 0, end: 20e-3, v0: -0.05, v1: -0.05 }];
    const I = perfectClamp({ grid, kinetics, temperature: 12, start: mixed }).play(command, timing);
    const exact = inf(-70) ** 2 * 2e-9 * 0.03 + inf(-30) ** 2 * 3e-9 * 0.04 + 1e-9 * 0.02;
    expect(I[0]! / exact).toBeCloseTo(1, 12);
  });
});

describe('current clamp', () => {
  const cell = sketch([{ name: 'ball', area_um2: 1000, channels: { passive: 0.1 } }]); // 1 nS, 10 pF, −70 mV
  const plan = (pipette: Record<string, number>): PlanDocument =>
    planOf({
      cell,
      pipettes: [{ letter: 'A', site: { compartment: 'ball' }, mode: 'current clamp', ...pipette }],
      lanes: [{ holding: 0, blocks: [hold('before', 5), step('test', 100, 20), hold('after', 5)] }],
      protocol: {
        readings: [
          {
            id: 'end',
            name: 'end',
            pipette: 'A',
            measure: 'mean',
            window: {
              lane: 'A',
              from: { block: 'test', edge: 'end', offset_ms: -5 },
              to: { block: 'test', edge: 'end' },
            },
          },
        ],
      },
    });
  const readingOf = (document: PlanDocument): { recorded: number; truth: number | null } => {
    const rehearsed = rehearseSweep(preparePlan(document), 0);
    if (rehearsed.kind !== 'done') throw new Error(rehearsed.kind);
    expect(rehearsed.clamp).toBeNull();
    return rehearsed.readings[0]!;
  };
  // −70 + 20·(1 − e^(−t/10 ms)) at 97.5 ms: −50.0012 mV.
  const exact = -70 + 20 * (1 - (10 / 5) * (Math.exp(-9.5) - Math.exp(-10)));

  it('an unbalanced access resistance adds I·Rs to the reading, and the truth is without it', () => {
    const { recorded, truth } = readingOf(plan({ accessResistance_MOhm: 100 }));
    expect(truth).toBeCloseTo(exact, 3);
    expect(recorded - truth!).toBeCloseTo(2, 9);
  });

  it('stray capacitance slows the recording, and the truth is without it too', () => {
    const { recorded, truth } = readingOf(
      plan({ accessResistance_MOhm: 100, bridge_MOhm: 100, strayCapacitance_pF: 3 }),
    );
    expect(truth).toBeCloseTo(exact, 3);
    // 13 pF instead of 10 behind 1 GΩ: what is missing is 20·e^(−t/13 ms), about 0.012 mV; the node's own 0.3 ms adds 2 %.
    const missing = 20 * ((13 / 5) * (Math.exp(-95 / 13) - Math.exp(-100 / 13)));
    expect((exact - recorded) / missing).toBeCloseTo(1, 0);
    expect(recorded).toBeLessThan(truth!);
  });

  it('a balanced bridge takes it off again, one set too high takes off too much', () => {
    const balanced = readingOf(plan({ accessResistance_MOhm: 100, bridge_MOhm: 100 }));
    expect(balanced.recorded).toBeCloseTo(balanced.truth!, 9);
    const over = readingOf(plan({ accessResistance_MOhm: 100, bridge_MOhm: 150 }));
    expect(over.recorded - over.truth!).toBeCloseTo(-1, 9);
  });

  it('a perfect pipette is its own truth', () => {
    const { recorded, truth } = readingOf(plan({}));
    expect(recorded).toBe(truth);
  });
});

describe('a ramp', () => {
  it('the truth leaves the capacity current out, which the recording has', () => {
    const cell = sketch([{ name: 'patch', area_um2: 1000, channels: { passive: 0.1 } }]);
    const document = familyOf(cell, 0, [hold('before', 2), ramp('test', 10, -65, -45), hold('after', 5)]);
    const plan = { ...document, protocol: { ...document.protocol, ladders: [] } };
    const rehearsed = rehearseSweep(preparePlan(plan), 0);
    if (rehearsed.kind !== 'done') throw new Error(rehearsed.kind);
    const { recorded, truth } = rehearsed.readings[1]!;
    // 10 pF · 2 V/s = 20 pA; the ionic mean is 1 nS·(−55 + 70) = 15 pA.
    expect(truth).toBeCloseTo(15, 2);
    expect(recorded - truth!).toBeCloseTo(20, 2);
  });
});
