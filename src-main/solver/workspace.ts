import type { Second } from '../units/si.ts';
import { addedCapacitance, electrodesOf, type Electrode } from './electrodes.ts';
import { defaultSpacing } from './gate-rows.ts';
import { gatedChannels, membraneOf, type Membrane } from './membrane.ts';
import type { SweepInput } from './run.ts';
import { treeOf, type Tree } from './tree.ts';

/** Everything a step needs, allocated once. Rows k: compartment k. */
export interface Workspace {
  readonly tree: Tree;
  readonly membrane: Membrane;
  readonly electrodes: readonly Electrode[];
  readonly capacitance: Float64Array;
  /** Conductances that never change: ohmic channels and couplings. */
  readonly fixedD: Float64Array;
  readonly fixedR: Float64Array;
  readonly V: Float64Array;
  readonly D: Float64Array;
  readonly R: Float64Array;
  readonly inverse: Float64Array;
  /** For damped steps: the rows without capacity current, and the solution of the undivided part. */
  readonly openD: Float64Array;
  readonly openR: Float64Array;
  readonly whole: Float64Array;
}

/** Allocates a sweep's workspace and puts the cell and its pipettes at the start. Throws where a compartment is not of the grid. */
export function workspaceOf(input: SweepInput, step: Second): Workspace {
  const { grid, start } = input;
  const { count } = grid;
  for (const c of [...input.pipettes.map(({ compartment }) => compartment), ...input.probes]) {
    if (!(c >= 0 && c < count)) throw new Error(`compartment ${c} is not one of the grid's ${count}`);
  }
  const electrodes = electrodesOf(input.pipettes, start);
  const membrane = membraneOf({ ...input, advances: [step, step / 2], spacing: input.tableSpacing ?? defaultSpacing });
  const fixedD = new Float64Array(count);
  const fixedR = new Float64Array(count);
  const gated = new Set(gatedChannels(grid, input.kinetics).map(({ name }) => name));
  for (const { channel, conductance, reversal } of grid.conductances) {
    if (gated.has(channel)) continue;
    for (let k = 0; k < count; k++) {
      fixedD[k] = fixedD[k]! + conductance[k]!;
      fixedR[k] = fixedR[k]! + conductance[k]! * reversal[k]!;
    }
  }
  for (let k = 1; k < count; k++) {
    const p = grid.parent[k]!;
    fixedD[k] = fixedD[k]! + grid.coupling[k]!;
    fixedD[p] = fixedD[p]! + grid.coupling[k]!;
  }
  const capacitance = Float64Array.from(grid.capacitance);
  for (const electrode of electrodes) {
    capacitance[electrode.compartment] = capacitance[electrode.compartment]! + addedCapacitance(electrode);
  }
  const imposed = electrodes.filter(({ way }) => way === 'imposed').map(({ compartment }) => compartment);
  return {
    tree: treeOf(grid, imposed),
    membrane,
    electrodes,
    capacitance,
    fixedD,
    fixedR,
    V: Float64Array.from(start.V),
    D: new Float64Array(count),
    R: new Float64Array(count),
    inverse: new Float64Array(count),
    openD: new Float64Array(count),
    openR: new Float64Array(count),
    whole: new Float64Array(count),
  };
}
