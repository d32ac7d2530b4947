// The main tree of an SWC reading, cut into numbered branches.
import { toSi } from '../units/si.ts';
import type { ShapeBranch } from './shape.ts';
import { samePoint } from './swc-measures.ts';
import type { SwcRead } from './swc-read.ts';
import { gap, kidsAt, type SwcSample } from './swc-sample.ts';

/** A stretch still to be followed. */
interface Start {
  readonly parent: number;
  readonly parentAt: number;
  readonly startDistance: number;
  /** The fork's or root's sample, shared with the parent; null for a stem. */
  readonly shared: number | null;
  /** Its first sample of its own; null for a root that stands alone. */
  readonly first: number | null;
}

/**
 * Branches of the main tree in SI. Parents before children, depth first, children in file order; the soma's first. A
 * branch ends at a fork or a tip, never where only the type changes.
 */
export function branchesOf(reading: SwcRead): ShapeBranch[] {
  const { samples, main } = reading;
  const branches: ShapeBranch[] = [];
  const waiting: Start[] = [];
  const push = (starts: readonly Start[]) => {
    for (const start of starts.toReversed()) waiting.push(start);
  };
  const kidsOfNeurite = (i: number) =>
    [...kidsAt(reading.kids, i)].filter((k) => reading.gone[k] === 0 && !samples[k]!.soma);

  if (main.soma?.sphere) {
    const { x, y, z, radius } = main.soma.sphere;
    branches.push(pointBranch({ x, y, z, radius, type: 1 }));
    push(stemsOf(main.soma.samples, kidsOfNeurite, () => ({ parent: 0, parentAt: 0 })));
  } else if (main.soma) {
    const hung = somaStack(reading, branches);
    push(stemsOf(main.soma.samples, kidsOfNeurite, (i) => hung.get(i)!));
  } else {
    const firsts = kidsOfNeurite(main.root);
    const start = { parent: -1, parentAt: 0, startDistance: 0, shared: main.root };
    push(firsts.map((first, n) => ({ ...start, parent: n === 0 ? -1 : 0, first })));
    if (firsts.length === 0) branches.push(pointBranch(samples[main.root]!));
  }

  for (let start = waiting.pop(); start !== undefined; start = waiting.pop()) {
    const run: number[] = start.shared === null ? [] : [start.shared];
    let kids = start.first === null ? [] : [start.first];
    while (kids.length === 1) {
      run.push(kids[0]!);
      kids = kidsOfNeurite(kids[0]!);
    }
    const branch = runBranch(run, samples, { ...start, branch: branches.length, isSoma: false });
    branches.push(branch);
    const length = branch.at.at(-1)!;
    push(
      kids.map((first) => ({
        parent: branch.branch,
        parentAt: length,
        startDistance: branch.startDistance + length,
        shared: run.at(-1)!,
        first,
      })),
    );
  }
  return branches;
}

function stemsOf(
  soma: readonly number[],
  kidsOfNeurite: (i: number) => number[],
  place: (i: number) => { parent: number; parentAt: number },
): Start[] {
  return soma
    .flatMap((i) => kidsOfNeurite(i).map((first) => ({ ...place(i), startDistance: 0, shared: null, first })))
    .sort((a, b) => a.first - b.first);
}

/**
 * Adds the cones of a stacked soma, from one of its ends, and tells where each soma sample lies. A chain is one branch
 * even when the file starts it in the middle; a soma that forks makes more.
 */
function somaStack(reading: SwcRead, branches: ShapeBranch[]): Map<number, { parent: number; parentAt: number }> {
  const { samples } = reading;
  const group = reading.main.soma!.samples;
  const near = new Map<number, number[]>(group.map((i) => [i, []]));
  for (const i of group) {
    const above = near.get(samples[i]!.parent);
    if (above === undefined) continue;
    above.push(i);
    near.get(i)!.push(samples[i]!.parent);
  }
  const places = new Map<number, { parent: number; parentAt: number }>();
  const top = group.find((i) => near.get(i)!.length <= 1)!;
  const nextOf = (i: number) => near.get(i)!.filter((k) => !places.has(k));
  const waiting: { parent: number; parentAt: number; run: number[] }[] = [{ parent: -1, parentAt: 0, run: [top] }];
  for (let start = waiting.pop(); start !== undefined; start = waiting.pop()) {
    const { run, parent, parentAt } = start;
    const seen = new Set(run);
    const unseen = (i: number) => nextOf(i).filter((k) => !seen.has(k));
    let next = unseen(run.at(-1)!);
    while (next.length === 1) {
      run.push(next[0]!);
      seen.add(next[0]!);
      next = unseen(next[0]!);
    }
    const branch = runBranch(run, samples, {
      parent,
      parentAt,
      startDistance: 0,
      branch: branches.length,
      isSoma: true,
    });
    branches.push(branch);
    run.forEach((i, n) => {
      if (!places.has(i)) places.set(i, { parent: branch.branch, parentAt: branch.at[n]! });
    });
    const end = { parent: branch.branch, parentAt: branch.at.at(-1)! };
    for (const k of next.toReversed()) waiting.push({ ...end, run: [run.at(-1)!, k] });
  }
  return places;
}

type Identity = Pick<ShapeBranch, 'branch' | 'parent' | 'parentAt' | 'startDistance' | 'isSoma'>;

function runBranch(run: readonly number[], samples: readonly SwcSample[], identity: Identity): ShapeBranch {
  const points = run.map((i) => samples[i]!);
  const xyz = new Float64Array(3 * points.length);
  points.forEach((p, n) => {
    xyz[3 * n] = toSi(p.x, 'um');
    xyz[3 * n + 1] = toSi(p.y, 'um');
    xyz[3 * n + 2] = toSi(p.z, 'um');
  });
  const at = new Float64Array(points.length);
  for (let n = 1; n < points.length; n += 1) {
    const step = gap(points[n]!, points[n - 1]!);
    const isPiece = step >= samePoint || identity.isSoma;
    at[n] = at[n - 1]! + (isPiece ? toSi(step, 'um') : 0);
  }
  const { branch, parent, parentAt, startDistance, isSoma } = identity;
  return {
    branch,
    parent,
    parentAt,
    startDistance,
    isSoma,
    xyz,
    radius: Float64Array.from(points, (p) => toSi(p.radius, 'um')),
    at,
    type: Int32Array.from(points, (p, n) => (n === 0 ? (points[1] ?? p).type : p.type)),
  };
}

function pointBranch(p: Pick<SwcSample, 'x' | 'y' | 'z' | 'radius' | 'type'>): ShapeBranch {
  const isSoma = p.type === 1;
  return {
    branch: 0,
    parent: -1,
    parentAt: 0,
    startDistance: 0,
    isSoma,
    xyz: Float64Array.of(toSi(p.x, 'um'), toSi(p.y, 'um'), toSi(p.z, 'um')),
    radius: Float64Array.of(toSi(p.radius, 'um')),
    at: Float64Array.of(0),
    type: Int32Array.of(p.type),
  };
}
