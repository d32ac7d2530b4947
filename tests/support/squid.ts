// Squid-axon membrane of Hodgkin and Huxley (1952) on small grids, modern sign, rest at −65 mV.
import { storedChannels } from '../../src-main/channels/library.ts';
import type { Grid } from '../../src-main/cell/grid.ts';
import { smallGrid } from './small-grids.ts';

export const na = 'na-hodgkin-huxley-1952';
export const k = 'k-hodgkin-huxley-1952';
/** mS/cm² and mV: Table 3 of the paper, E_leak so that the membrane rests at −65 mV. */
export const squidChannels: Readonly<Record<string, number>> = { leak: 0.3, [na]: 120, [k]: 36 };
export const squidReversals: Record<string, number> = { leak: -54.387, [na]: 50, [k]: -77 };
export const squidKinetics = storedChannels;

/** One compartment of 1000 µm², 10 pF: 1 pA is 0.1 µA/cm². */
export function squidPatch(): Grid {
  return smallGrid([{ parent: -1, area_um2: 1000, channels: squidChannels }], squidReversals);
}

/** Times at which a course crosses a level upwards, by its local straight line, in sampling intervals. */
export function upwardCrossings(values: Float64Array, level = 0): number[] {
  const times: number[] = [];
  for (let i = 1; i < values.length; i++) {
    const [before, after] = [values[i - 1]!, values[i]!];
    if (before < level && after >= level) times.push(i - 1 + (level - before) / (after - before));
  }
  return times;
}
