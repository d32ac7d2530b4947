// What one line of an SWC file says, and the tree that the lines make.

/** One sample, in the file's micrometres. Order of samples is the file's. */
export interface SwcSample {
  /** As written, without sign and leading zeros: ids of electron microscopy do not fit a number. */
  readonly id: string;
  /** From 1. */
  readonly line: number;
  readonly type: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly radius: number;
  /** Index of the parent sample; -1 for a root. */
  readonly parent: number;
  /** Belongs to the soma of its tree. */
  readonly soma: boolean;
}

/** A sample while it is being repaired. */
export type SwcDraft = { -readonly [K in keyof SwcSample]: SwcSample[K] };

/** Children of sample i, in file order: list[start[i] .. start[i + 1]). Flat, because a file may hold millions. */
export interface Kids {
  readonly start: Int32Array;
  readonly list: Int32Array;
}

/** Children of every sample, in file order. */
export function kidsOf(samples: readonly SwcSample[]): Kids {
  const start = new Int32Array(samples.length + 1);
  for (const s of samples) if (s.parent >= 0) start[s.parent + 1]! += 1;
  for (let i = 0; i < samples.length; i += 1) start[i + 1]! += start[i]!;
  const next = start.slice();
  const list = new Int32Array(start[samples.length]!);
  samples.forEach((s, i) => {
    if (s.parent >= 0) {
      list[next[s.parent]!] = i;
      next[s.parent]! += 1;
    }
  });
  return { start, list };
}

/** The children of one sample. */
export function kidsAt(kids: Kids, i: number): Int32Array {
  return kids.list.subarray(kids.start[i], kids.start[i + 1]);
}

/** The tree below `root`, parents first, first child first. Without recursion: chains may be as long as the file. */
export function preorder(kids: Kids, root: number): number[] {
  const order: number[] = [];
  const waiting = [root];
  for (let i = waiting.pop(); i !== undefined; i = waiting.pop()) {
    order.push(i);
    for (let k = kids.start[i + 1]! - 1; k >= kids.start[i]!; k -= 1) waiting.push(kids.list[k]!);
  }
  return order;
}

/** Distance of two samples, µm. */
export function gap(a: Pick<SwcSample, 'x' | 'y' | 'z'>, b: Pick<SwcSample, 'x' | 'y' | 'z'>): number {
  return Math.hypot(a.x - b.x, a.y - b.y, a.z - b.z);
}
