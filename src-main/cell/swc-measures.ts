// Lengths, areas and counts of a read SWC file, over all its trees.
import type { SwcMeasures } from '../contract/results.ts';
import { sideArea } from './frustum.ts';
import type { Findings } from './swc-findings.ts';
import { gap, kidsAt, type Kids, type SwcSample } from './swc-sample.ts';
import type { SwcSoma } from './swc-soma.ts';

/** Nearer than this to its parent, a sample is the same point, µm. Design choice. */
export const samePoint = 1e-3;

export interface SwcTree {
  readonly root: number;
  /** Indices, parents first. */
  readonly order: readonly number[];
  readonly soma: SwcSoma | null;
}

/**
 * Samples that end a neurite at the place of their parent: they are left out of cable and counts. A whole run of them is.
 *
 * @returns one entry per sample, 1 where it is left out.
 */
export function repeatedTips(
  samples: readonly SwcSample[],
  kids: Kids,
  trees: readonly SwcTree[],
  findings: Findings,
): Uint8Array {
  const gone = new Uint8Array(samples.length);
  for (const tree of trees) {
    for (let n = tree.order.length - 1; n >= 0; n -= 1) {
      const i = tree.order[n]!;
      const s = samples[i]!;
      const parent = samples[s.parent];
      if (s.soma || parent === undefined || parent.soma || gap(s, parent) >= samePoint) continue;
      findings.note('W_ZERO_LENGTH', s.line);
      if (kidsAt(kids, i).every((k) => gone[k] === 1)) gone[i] = 1;
    }
  }
  return gone;
}

/** Measures over all trees. Cable between soma and a stem's first sample is not in length or area. */
export function measuresOf(
  samples: readonly SwcSample[],
  kids: Kids,
  trees: readonly SwcTree[],
  gone: Uint8Array,
  findings: Findings,
): Omit<SwcMeasures, 'main_tree_samples'> {
  const sum = { length: 0, area: 0, link: 0, stems: 0, branches: 0, forks: 0, tips: 0 };
  for (const tree of trees) {
    for (const i of tree.order) {
      const s = samples[i]!;
      if (s.soma || gone[i] === 1) continue;
      const parent = samples[s.parent];
      const children = kidsAt(kids, i).reduce((count, k) => count + (gone[k] === 1 ? 0 : 1), 0);
      if (parent === undefined) {
        if (children === 1) sum.branches += 1;
      } else if (parent.soma) {
        sum.stems += 1;
        sum.branches += 1;
        sum.link += gap(s, tree.soma?.sphere ?? parent);
        if (children === 0) findings.note('W_STEM_POINT', s.line);
      } else if (gap(s, parent) >= samePoint) {
        sum.length += gap(s, parent);
        sum.area += sideArea(s.radius, parent.radius, gap(s, parent));
      }
      if (children >= 2) {
        sum.forks += 1;
        sum.branches += children;
      }
      if (children === 0 && parent !== undefined) sum.tips += 1;
    }
  }
  const somata = trees.flatMap((tree) => (tree.soma === null ? [] : [tree.soma]));
  const kinds = new Set(somata.map((soma) => soma.kind));
  return {
    samples: samples.length,
    trees: trees.length,
    soma: kinds.size > 1 ? 'mixed' : (somata[0]?.kind ?? 'none'),
    soma_area_um2: somata.reduce((area, soma) => area + soma.area_um2, 0),
    neurite_length_um: sum.length,
    soma_link_length_um: sum.link,
    neurite_area_um2: sum.area,
    stem_count: sum.stems,
    branch_count: sum.branches,
    branch_point_count: sum.forks,
    tip_count: sum.tips,
  };
}
