import { describe, expect, it } from 'vitest';
import { gatherForecast } from '../../src-main/forecast/gather.ts';
import { nearestClamp } from '../../src-main/forecast/nearest-clamp.ts';
import { rehearseSweep } from '../../src-main/forecast/rehearse.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import { ballAndStick, planOf, soma } from '../support/plans.ts';
import { hold, step } from '../support/protocols.ts';

//          0 soma ── 1 (100 µm) ── 2 (200 µm) ── 3 (300 µm)
//           └─────── 4 (80 µm) ─── 5 (170 µm)
const fork = {
  count: 6,
  parent: Int32Array.of(-1, 0, 1, 2, 0, 4),
  distance: Float64Array.of(0, 100e-6, 200e-6, 300e-6, 80e-6, 170e-6),
};

describe('the nearest clamp', () => {
  it.each([
    [
      [0, 3],
      [0, 0, 1, 1, 0, 0],
    ],
    [
      [3, 0],
      [1, 1, 0, 0, 1, 1],
    ],
    [
      [2, 5],
      [1, 0, 0, 0, 1, 1],
    ],
    [[4], [0, 0, 0, 0, 0, 0]],
  ])('of clamps at %j is found along the tree, not through the air', (sites, nearest) => {
    expect(Array.from(nearestClamp(fork, sites))).toEqual(nearest);
  });

  it('of a sketch is that with the fewest couplings in between, of equals the first', () => {
    const sketch = { ...fork, distance: new Float64Array(6) };
    expect(Array.from(nearestClamp(sketch, [3, 5]))).toEqual([1, 0, 0, 0, 1, 1]);
  });

  it('gives each side of a cell held at two places its own access part', () => {
    const prepared = preparePlan(
      planOf({
        cell: ballAndStick({ soma_um: 20, stick_um: 2, length_um: 900 }, { Rm: 1e4, Ri: 150, Cm: 1, rest_mV: -70 }),
        pipettes: [
          { letter: 'A', site: soma, mode: 'voltage clamp', accessResistance_MOhm: 30 },
          { letter: 'B', site: { branch: 1, at_um: 900 }, mode: 'voltage clamp', accessResistance_MOhm: 0 },
        ],
        lanes: [
          { holding: -70, blocks: [hold('before', 5), step('test', 150, -40), hold('after', 5)] },
          { holding: -70, blocks: [hold('before', 5), step('test', 150, -40), hold('after', 5)] },
        ],
      }),
    );
    const { clamp } = gatherForecast(prepared, [rehearseSweep(prepared, 0, {})]);
    const { access_mV, steady_mV, accessPart_mV } = clamp!.sweeps[0]!;
    const a = prepared.pipettes[0]!.compartment;
    const b = prepared.pipettes[1]!.compartment;
    expect(access_mV[a]).toBe(accessPart_mV);
    expect(Math.abs(accessPart_mV)).toBeGreaterThan(0.5);
    expect(access_mV[b]).toBe(0);
    expect(steady_mV[b]).toBe(0);
    const { distance, count } = prepared.grid;
    for (let k = 0; k < count; k++) expect(access_mV[k]).toBe(distance[k]! <= 450e-6 ? accessPart_mV : 0);
  });
});
