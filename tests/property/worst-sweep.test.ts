import { describe, expect, it } from 'vitest';
import { gatherForecast } from '../../src-main/forecast/gather.ts';
import { rehearseSweep } from '../../src-main/forecast/rehearse.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import { planOf, sketch } from '../support/plans.ts';
import { hold, step } from '../support/protocols.ts';

// One passive compartment of 1 nS behind 500 MΩ: a third of every step is lost, far beyond 5 mV.
const cell = sketch(
  [{ name: 'patch', area_um2: 10_000, channels: { passive: 0.01 } }],
  [],
  [{ name: 'passive', reversal_mV: -70, gates: [] }],
);

describe('the worst sweep', () => {
  it.each([
    [[-100, -130, -110], 1],
    [[-20, -60, 80, -40], 2],
  ])('of levels %j, all without any reach, is the one with the largest error', (list, worstSweep) => {
    const prepared = preparePlan(
      planOf({
        cell,
        pipettes: [{ letter: 'A', site: { compartment: 'patch' }, mode: 'voltage clamp', accessResistance_MOhm: 500 }],
        lanes: [{ holding: -70, blocks: [hold('before', 5), step('test', 400, -60), hold('after', 5)] }],
        protocol: { ladders: [{ lane: 'A', block: 'test', number: 'level', rungs: { list } }], sweepInterval_ms: 500 },
      }),
    );
    const sweeps = list.map((_, sweep) => rehearseSweep(prepared, sweep, {}));
    const { clamp } = gatherForecast(prepared, sweeps);
    expect(clamp).toMatchObject({ reach: 0, worstSweep });
  });
});
