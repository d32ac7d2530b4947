// The grid: a tree of compartments in SI, the one form in which a cell reaches the solver and the forecast.
import type { Site } from '../contract/documents.ts';

/** Row k is compartment k: parent[k] < k, parent[0] = -1. All arrays have `count` entries, grid order. */
export interface Grid {
  readonly count: number;
  readonly parent: Int32Array;
  /** Axial conductance to the parent, S; entry 0 is 0. */
  readonly coupling: Float64Array;
  /** Membrane area with spines, m². */
  readonly area: Float64Array;
  /** F. */
  readonly capacitance: Float64Array;
  /** One per channel present anywhere: the conductance of each compartment, S. Leaks are channels without gates. */
  readonly conductances: readonly GridConductance[];
  /** Branch and micrometres from its start, as the drawing numbers them; for a sketch: branch = the compartment's own index. */
  readonly branch: Int32Array;
  readonly at: Float64Array;
  /** Path distance from the soma's surface (no soma: from the root), m; 0 in the soma. */
  readonly distance: Float64Array;
  /** m; three per compartment. */
  readonly position: Float64Array;
  readonly regionNames: readonly string[];
  /** The region that owns most of the compartment's membrane. */
  readonly regionIndex: Int32Array;
  /** Membrane area by region: regionArea[r][k], m². A compartment at a fork or region border counts in several. */
  readonly regionArea: readonly Float64Array[];
  /** By region, the membrane that lies on the way between two centres; null for a sketch, which has no ways. */
  readonly regionStretch: readonly StretchArea[] | null;
  /** Sketched cells only. */
  readonly names: readonly string[] | null;
  /** The compartment whose centre is the site. The sites given when the grid was cut are centres exactly. */
  compartmentAt(site: Site, place: string): number;
}

/**
 * Entry k: membrane between compartment k's centre and its parent's, m². It is part of the area of the compartments it
 * belongs to; what a compartment has beyond its stretches lies at its centre, such as the sphere of a soma.
 */
export interface StretchArea {
  /** The half that belongs to k. */
  readonly own: Float64Array;
  /** The half that belongs to the parent. */
  readonly parents: Float64Array;
}

export interface GridConductance {
  /** A stored channel's id, a channel of the cell's own, or "leak". */
  readonly channel: string;
  /**
   * V; one entry per compartment, since regions may differ. NaN in all entries: the stored channel's own, which this layer
   * does not know; the solver fills it in. Where a cell uses a stored channel both with its own reversal potential
   * and with another, there are two entries of the same name.
   */
  readonly reversal: Float64Array;
  /** S. */
  readonly conductance: Float64Array;
}
