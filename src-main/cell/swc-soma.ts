// Finding the soma of a tree, and what solid it stands for.
import { sideArea } from './frustum.ts';
import type { Findings } from './swc-findings.ts';
import { gap, kidsAt, kidsOf, preorder, type Kids, type SwcDraft, type SwcSample } from './swc-sample.ts';

/** A sphere has a centre and a radius; a stack of cut cones ("multi") keeps its samples. µm. */
export interface SwcSoma {
  readonly kind: 'single' | 'three_point' | 'contour' | 'multi';
  /** Indices, in file order. */
  readonly samples: readonly number[];
  readonly sphere: { readonly x: number; readonly y: number; readonly z: number; readonly radius: number } | null;
  readonly area_um2: number;
}

/**
 * Marks the soma samples of every tree, turns a tree round whose root is not among them, and returns the roots.
 * A tree's soma is its largest connected cluster of type-1 samples; other clusters become neurite of type 0.
 */
export function settleSomata(samples: readonly SwcDraft[], findings: Findings): number[] {
  const kids = kidsOf(samples);
  const roots = samples.flatMap((s, i) => (s.parent < 0 ? [i] : []));
  return roots.map((root) => {
    const [soma, ...others] = clustersOf(samples, preorder(kids, root));
    for (const other of others) {
      findings.note('W_SOMA_SPLIT', samples[other[0]!]!.line);
      for (const i of other) samples[i]!.type = 0;
    }
    if (soma === undefined) return root;
    for (const i of soma) samples[i]!.soma = true;
    if (samples[root]!.soma) return root;
    findings.note('W_REROOT', samples[root]!.line);
    turnRound(samples, soma[0]!);
    return soma[0]!;
  });
}

/** Connected type-1 samples of one tree, the largest cluster first, each in file order. */
function clustersOf(samples: readonly SwcSample[], tree: readonly number[]): number[][] {
  const clusterOf = new Map<number, number[]>();
  const clusters: number[][] = [];
  for (const i of tree) {
    if (samples[i]!.type !== 1) continue;
    let cluster = clusterOf.get(samples[i]!.parent);
    if (cluster === undefined) clusters.push((cluster = []));
    cluster.push(i);
    clusterOf.set(i, cluster);
  }
  for (const cluster of clusters) cluster.sort((a, b) => a - b);
  return clusters.sort((a, b) => b.length - a.length || a[0]! - b[0]!);
}

/** Makes `top` the root by turning the parent links between it and the old root. */
function turnRound(samples: readonly SwcDraft[], top: number): void {
  let below = -1;
  for (let i = top; i >= 0;) {
    const above = samples[i]!.parent;
    samples[i]!.parent = below;
    below = i;
    i = above;
  }
}

/**
 * What solid the soma samples of one tree stand for. Three-point test: within 2 % of r. Contour test: six samples or
 * more in one unbranched chain, thin against the ring, nearly closed. Both tests are design choices.
 *
 * @source sphere and stack: INCF SWC specification 1.0.3; the three-point convention from memory.
 */
export function somaSolid(
  samples: readonly SwcSample[],
  kids: Kids,
  group: readonly number[],
  findings: Findings,
): SwcSoma {
  const first = samples[group[0]!]!;
  const sphereAt = (kind: SwcSoma['kind'], centre: { x: number; y: number; z: number }, radius: number): SwcSoma => ({
    kind,
    samples: group,
    sphere: { x: centre.x, y: centre.y, z: centre.z, radius },
    area_um2: 4 * Math.PI * radius ** 2,
  });
  if (group.length === 1) return sphereAt('single', first, first.radius);
  if (isThreePoint(samples, group)) {
    findings.note('W_SOMA_3POINT', first.line);
    return sphereAt('three_point', first, first.radius);
  }
  const ring = ringOf(samples, kids, group);
  if (ring !== null) {
    findings.note('W_SOMA_CONTOUR', first.line);
    return sphereAt('contour', ring, ring.radius);
  }
  let area = 0;
  for (const i of group) {
    const s = samples[i]!;
    const parent = samples[s.parent];
    if (parent?.soma) area += sideArea(s.radius, parent.radius, gap(s, parent));
  }
  return { kind: 'multi', samples: group, sphere: null, area_um2: area };
}

function isThreePoint(samples: readonly SwcSample[], group: readonly number[]): boolean {
  const [first, a, b] = group.map((i) => samples[i]!);
  if (group.length !== 3 || first === undefined || a === undefined || b === undefined) return false;
  const r = first.radius;
  const near = (value: number, wanted: number) => Math.abs(value - wanted) <= 0.02 * r;
  const isStar = a.parent === group[0] && b.parent === group[0];
  return (
    isStar &&
    near(a.radius, r) &&
    near(b.radius, r) &&
    near(gap(a, first), r) &&
    near(gap(b, first), r) &&
    near(gap(a, b), 2 * r)
  );
}

function ringOf(
  samples: readonly SwcSample[],
  kids: Kids,
  group: readonly number[],
): { x: number; y: number; z: number; radius: number } | null {
  if (group.length < 6) return null;
  const members = group.map((i) => samples[i]!);
  const mean = (pick: (s: SwcSample) => number) => members.reduce((sum, s) => sum + pick(s), 0) / members.length;
  const centre = { x: mean((s) => s.x), y: mean((s) => s.y), z: mean((s) => s.z) };
  const radius = mean((s) => gap(s, centre));
  const somaKids = group.map((i) => kidsAt(kids, i).reduce((count, k) => count + (samples[k]!.soma ? 1 : 0), 0));
  const ends = members.filter((_, n) => somaKids[n] === 0);
  const isChain = somaKids.every((count) => count <= 1) && ends.length === 1;
  const steps = members.flatMap((s) => (samples[s.parent]?.soma ? [gap(s, samples[s.parent]!)] : []));
  const meanStep = steps.reduce((sum, step) => sum + step, 0) / steps.length;
  const isThin = members.every((s) => s.radius <= 0.3 * radius);
  const isClosed = ends[0] !== undefined && gap(ends[0], members[0]!) <= 2 * meanStep;
  return isChain && isThin && isClosed ? { ...centre, radius } : null;
}
