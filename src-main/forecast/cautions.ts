// What a forecast warns of: things a user would want to know before believing its figures.
import type { ClampSweep } from '../contract/results.ts';
import type { Grid } from '../cell/grid.ts';
import { plain, withUnit } from '../units/format.ts';
import { fromSi } from '../units/si.ts';

/** A membrane that passes this while it is told to stay well below fires, mV (common practice for counting spikes). */
const spikeLevel_mV = 0;
/** Commands from here up may carry the membrane past the spike level by themselves. */
const wellBelow_mV = -20;

/**
 * Sweeps in which some membrane fires although the clamp tells it to stay below −20 mV: the largest error in the window
 * carries it past 0 mV. A spike smaller than the lag behind the step itself is missed. Steady figures of such a sweep are those of one moment of a spike train.
 */
export function firingCautions(
  grid: Pick<Grid, 'regionNames' | 'regionIndex' | 'distance'>,
  sweeps: readonly ClampSweep[],
): string[] {
  const firing = sweeps.flatMap((sweep) => {
    const level = sweep.level_mV;
    if (level === null || level >= wellBelow_mV) return [];
    const at = sweep.worst_mV.reduce((most, error, k) => (error > (sweep.worst_mV[most] ?? 0) ? k : most), 0);
    const reached = level + (sweep.worst_mV[at] ?? 0);
    return reached > spikeLevel_mV ? [{ sweep: sweep.sweep, level, at, reached }] : [];
  });
  const [first, ...others] = firing;
  if (first === undefined) return [];
  const region = grid.regionNames[grid.regionIndex[first.at] ?? -1] ?? 'cell';
  const distance = withUnit(fromSi(grid.distance[first.at] ?? 0, 'um'), 'µm');
  const more = others.length === 0 ? '' : ` So do ${others.length} other ${others.length === 1 ? 'sweep' : 'sweeps'}.`;
  return [
    `Sweep ${first.sweep + 1} fires under the clamp: told to stay at ${withUnit(first.level, 'mV')}, the ${region} ${distance} from ` +
      `the soma reaches ${plain(first.reached)} mV. A mean or a window's end is one moment of a spike train.${more}`,
  ];
}
