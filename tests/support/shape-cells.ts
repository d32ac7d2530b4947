// Small cells given by SWC text, and a steady solve of a grid that is not the program's own.
import type { Grid } from '../../src-main/cell/grid.ts';
import { readSwc, type SwcRead } from '../../src-main/cell/swc-read.ts';
import type { ShapedCellDocument, ShapeSource } from '../../src-main/contract/documents.ts';

export interface PassiveNumbers {
  readonly Rm_kOhm_cm2: number;
  readonly Ri_Ohm_cm: number;
  readonly Cm_uF_cm2: number;
}

/** A passive cell of one make-up, every SWC type in one region. */
export function passiveCell(shape: ShapeSource, numbers: PassiveNumbers): ShapedCellDocument {
  return {
    kind: 'cell',
    format: 1,
    name: 'passive',
    note: '',
    surroundings: { temperature_C: 22 },
    channels: [],
    shape,
    regions: [{ name: 'all', swcTypes: [0, 1, 2, 3, 4, 5, 6, 7], from_um: 0 }],
    makeUp: [
      {
        region: 'all',
        capacitance_uF_cm2: numbers.Cm_uF_cm2,
        axialResistivity_Ohm_cm: numbers.Ri_Ohm_cm,
        spineFactor: 1,
        leak: { conductance_mS_cm2: 1 / numbers.Rm_kOhm_cm2, reversal_mV: -65 },
        channels: [],
      },
    ],
  };
}

/** Rows "id type x y z radius parent" as an SWC shape. */
export function swcShape(rows: string): ShapeSource {
  return { kind: 'swc', text: rows };
}

export function readText(text: string): SwcRead {
  const reading = readSwc(new TextEncoder().encode(text));
  if (reading.kind === 'refused') throw new Error(`${reading.code} in line ${reading.line}`);
  return reading;
}

/**
 * Steady voltages, V, for 1 A into one compartment, with each compartment's conductance the sum of all its channels:
 * Gaussian elimination from the last compartment to the first, which needs parent[k] < k.
 */
export function steadyVoltages(grid: Grid, into: number): Float64Array {
  const diagonal = new Float64Array(grid.count);
  const right = new Float64Array(grid.count);
  for (const { conductance } of grid.conductances) conductance.forEach((g, k) => (diagonal[k]! += g));
  for (let k = 1; k < grid.count; k += 1) {
    diagonal[k]! += grid.coupling[k]!;
    diagonal[grid.parent[k]!]! += grid.coupling[k]!;
  }
  right[into] = 1;
  for (let k = grid.count - 1; k > 0; k -= 1) {
    const parent = grid.parent[k]!;
    const share = grid.coupling[k]! / diagonal[k]!;
    diagonal[parent]! -= share * grid.coupling[k]!;
    right[parent]! += share * right[k]!;
  }
  const V = new Float64Array(grid.count);
  for (let k = 0; k < grid.count; k += 1) {
    const fromParent = k === 0 ? 0 : grid.coupling[k]! * V[grid.parent[k]!]!;
    V[k] = (right[k]! + fromParent) / diagonal[k]!;
  }
  return V;
}

/** Orders seen between errors of which each has half the step of the one before. */
export function ordersOf(errors: readonly number[]): number[] {
  return errors.slice(1).map((error, n) => Math.log2(errors[n]! / error));
}

export function total(values: ArrayLike<number>): number {
  return Array.from(values).reduce((sum, value) => sum + value, 0);
}
