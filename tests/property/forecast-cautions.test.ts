// What a forecast warns of. A spike is an upward crossing of 0 mV (common practice).
import { describe, expect, it } from 'vitest';
import { firingCautions } from '../../src-main/forecast/cautions.ts';

const grid = {
  regionNames: ['soma', 'axon'],
  regionIndex: Int32Array.of(0, 1),
  distance: Float64Array.of(0, 120e-6),
};
const sweep = (index: number, level_mV: number | null, worst: readonly number[]) => ({
  sweep: index,
  level_mV,
  windowStart_ms: 10,
  windowEnd_ms: 60,
  reach: 0,
  steady_mV: new Float64Array(2),
  worst_mV: Float64Array.from(worst),
  settling_ms: new Float64Array(2),
  accessPart_mV: 0,
  access_mV: new Float64Array(2),
});

describe('membrane that fires under the clamp', () => {
  it('is named with sweep, place, level and voltage reached', () => {
    const [words, ...more] = firingCautions(grid, [sweep(0, -80, [3, 8]), sweep(4, -60, [12, 85])]);
    expect(more).toEqual([]);
    expect(words).toMatch(/^Sweep 5 fires.*−60\.0\u2009mV, the axon 120\u2009µm from the soma reaches 25\.0 mV/);
    expect(words).not.toMatch(/So do/);
  });

  it('counts further sweeps', () => {
    const sweeps = [sweep(0, -60, [0, 85]), sweep(1, -50, [0, 85]), sweep(2, -40, [0, 85])];
    expect(firingCautions(grid, sweeps).join()).toMatch(/So do 2 other sweeps/);
  });

  it.each([
    ['that only lags behind a step down', -100, [30, 30]],
    ['told to go near or above the spike level', 0, [40, 40]],
    ['without one level', null, [90, 90]],
    ['that stays behind a step up', -30, [-40, -40]],
  ])('is not seen in membrane %s', (_what, level, worst) => {
    expect(firingCautions(grid, [sweep(0, level, worst)])).toEqual([]);
  });
});
