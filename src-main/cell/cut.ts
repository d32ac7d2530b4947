// Cutting a cell document into the grid that is computed on.
import type { CellDocument, Site } from '../contract/documents.ts';
import { cutShape } from './cut-shape.ts';
import { cutSketch } from './cut-sketch.ts';
import type { Grid } from './grid.ts';

export interface CutOptions {
  /** Multiplies the longest compartment: 0.5 halves every one. A sketch has nothing to halve. */
  readonly fineness?: number;
}

/**
 * The grid of a cell, with a compartment's centre at every site. Compartment 0 is the soma, without one the root; for a
 * sketch the first compartment.
 *
 * @throws Refusal with every fault found: `swc-refused`, `document-field-missing` (cable without a region, region without a
 *         make-up), `name-unknown`, `name-twice`, `site-off-the-cell`, `too-large`, `couplings-form-a-loop`,
 *         `couplings-leave-parts`.
 * @source finite volumes around nodes; cable equation and its compartments: Rall (1964), in Neural Theory and Modeling,
 *         73-97 (from memory).
 */
export function cutGrid(cell: CellDocument, sites: readonly Site[], options: CutOptions = {}): Grid {
  return 'compartments' in cell ? cutSketch(cell, sites) : cutShape(cell, sites, options.fineness ?? 1);
}
