// The cell laid out flat: path distance across, tips one below the other, no branch over another.
import type { CellDrawing } from '../../src-main/contract/results.ts';

export interface FlatPlaces {
  /** Height of each branch by its number, µm. */
  readonly height: ReadonlyMap<number, number>;
}

/** Width ÷ height of the layout: it stands in an upright panel. */
const proportion = 0.7;

/** Heights: tips evenly spaced in tree order, every other branch midway between its first and last child. */
export function flatPlaces(drawing: CellDrawing): FlatPlaces {
  const children = new Map<number, number[]>();
  let farthest = 1;
  for (const branch of drawing.branches) {
    const siblings = children.get(branch.parent) ?? [];
    siblings.push(branch.branch);
    children.set(branch.parent, siblings);
    farthest = Math.max(farthest, branch.startDistance_um + (branch.at_um.at(-1) ?? 0));
  }
  const numbers = drawing.branches.map((b) => b.branch);
  const tips = numbers.filter((n) => !children.has(n)).length;
  const spacing = farthest / proportion / Math.max(1, tips);
  const height = new Map<number, number>();
  const roots = drawing.branches.filter((b) => b.parent < 0).map((b) => b.branch);
  let next = 0;
  // Deep trees would overflow a recursive walk, so the stack is kept by hand: children first, then their parent.
  const stack = roots.reverse().map((branch) => ({ branch, isSeen: false }));
  for (let top = stack.pop(); top !== undefined; top = stack.pop()) {
    const below = children.get(top.branch) ?? [];
    if (below.length === 0) height.set(top.branch, -spacing * next++);
    else if (top.isSeen) {
      const first = height.get(below[0] ?? -1) ?? 0;
      const last = height.get(below.at(-1) ?? -1) ?? first;
      height.set(top.branch, (first + last) / 2);
    } else {
      stack.push({ branch: top.branch, isSeen: true });
      for (const child of below.toReversed()) stack.push({ branch: child, isSeen: false });
    }
  }
  return { height };
}
