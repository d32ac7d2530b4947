// One compartment of published channels: where it rests and when it fires under a current density.
import type { Grid } from '../../src-main/cell/grid.ts';
import type { Kinetics } from '../../src-main/channels/kinetics.ts';
import { storedChannels } from '../../src-main/channels/library.ts';
import { operatingPoint } from '../../src-main/solver/operating-point.ts';
import { runSweep } from '../../src-main/solver/sweep.ts';
import { finished, pipette, smallGrid, steps, sweepOf } from './small-grids.ts';
import { upwardCrossings } from './squid.ts';

/** 1 µF/cm². Densities in mS/cm², reversal potentials in mV, °C. */
export interface Patch {
  readonly channels: Readonly<Record<string, number>>;
  readonly reversals: Readonly<Record<string, number>>;
  readonly leak: { readonly conductance: number; readonly reversal: number };
  readonly temperature: number;
  /** Channels that are not stored ones. */
  readonly others?: readonly Kinetics[];
}

interface Model {
  readonly grid: Grid;
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  readonly temperature: number;
}

/** 1000 µm², 10 pF: 1 pA is 0.1 µA/cm². */
function modelOf({ channels, reversals, leak, temperature, others = [] }: Patch): Model {
  const compartment = { parent: -1, area_um2: 1000, channels: { ...channels, leak: leak.conductance } };
  const grid = smallGrid([compartment], { ...reversals, leak: leak.reversal });
  return { grid, temperature, kinetics: new Map([...storedChannels, ...others.map((o) => [o.name, o] as const)]) };
}

/** mV. */
export function restOf(patch: Patch): number {
  return 1e3 * operatingPoint({ ...modelOf(patch), pipettes: [] }).state.V[0]!;
}

/** Upward crossings of 0 mV, ms after the start of a current density (µA/cm², positive depolarises) from rest. */
export function spikesUnder(patch: Patch, density: number, duration_ms: number, step = 12.5e-6): number[] {
  const model = modelOf(patch);
  const { state } = operatingPoint({ ...model, pipettes: [] });
  const sweep = sweepOf({
    ...{ ...model, start: state, duration: duration_ms / 1e3, probes: [0], sampling: step, step },
    pipettes: [pipette('current clamp', steps('pA', duration_ms, [[0, 10 * density]]))],
  });
  return upwardCrossings(finished(runSweep(sweep)).membrane[0]!).map((at) => 1e3 * step * at);
}

/** Reciprocal of the last interval, Hz. */
export function lastRate(spikes: readonly number[]): number {
  return 1e3 / (spikes.at(-1)! - spikes.at(-2)!);
}
