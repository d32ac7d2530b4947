// A rehearsal's values on the cell as it stands: its sites, and with them the compartments, may have moved since.
import type { CellDocument } from '../../src-main/contract/documents.ts';
import type { CompartmentTable } from '../../src-main/contract/results.ts';

/** The same geometry, whatever its membrane: only then does a place of the one mean the same place of the other. */
export function isSameShape(a: CellDocument, b: CellDocument): boolean {
  if (a === b) return true;
  return JSON.stringify(geometryOf(a)) === JSON.stringify(geometryOf(b));
}

function geometryOf(cell: CellDocument): unknown {
  return 'shape' in cell ? cell.shape : [cell.compartments.map(({ name }) => name), cell.couplings_nS];
}

/**
 * Values per compartment of one grid, told for the compartments of another of the same shape: each takes the value of
 * the nearest centre on its branch, in a sketch that of the compartment of its name; NaN where there is none.
 */
export function onGrid(values: Float64Array, from: CompartmentTable, to: CompartmentTable): Float64Array {
  if (from === to) return values;
  const { names } = from;
  if (names !== null) {
    return Float64Array.from({ length: to.count }, (_, k) => values[names.indexOf(to.names?.[k] ?? '')] ?? NaN);
  }
  const byBranch = Map.groupBy(
    Array.from({ length: from.count }, (_, j) => j),
    (j) => from.branch[j],
  );
  return Float64Array.from({ length: to.count }, (_, k) => {
    const at = to.at_um[k] ?? NaN;
    let best = NaN;
    let miss = Infinity;
    for (const j of byBranch.get(to.branch[k]) ?? []) {
      const away = Math.abs((from.at_um[j] ?? NaN) - at);
      if (away < miss) {
        miss = away;
        best = values[j] ?? NaN;
      }
    }
    return best;
  });
}
