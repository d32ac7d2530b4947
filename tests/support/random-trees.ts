// Random trees of compartments for properties that hold whatever the numbers. Seeds are printed by the tests' titles.
import type { Grid } from '../../src-main/cell/grid.ts';
import { smallGrid, type SmallCompartment } from './small-grids.ts';
import { squidReversals } from './squid.ts';

/** A small generator of numbers in [0, 1) from a seed: Marsaglia G (2003), J Stat Softw 8(14), xorshift of 32 bits. */
export function numbersFrom(seed: number): () => number {
  let state = seed >>> 0 || 1;
  const next = (): number => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 4294967296;
  };
  // The first numbers of a small seed are small.
  for (let i = 0; i < 20; i++) next();
  return next;
}

/** A tree of 6 to 60 compartments; channels as given, leaks varied. */
export function randomCompartments(seed: number, channels: Readonly<Record<string, number>>): SmallCompartment[] {
  const next = numbersFrom(seed);
  const count = 6 + Math.floor(55 * next());
  return Array.from({ length: count }, (_, k) => ({
    parent: k === 0 ? -1 : Math.floor(Math.max(0, k - 4) + Math.min(k, 4) * next()),
    coupling_nS: 2 + 60 * next(),
    area_um2: 80 + 800 * next(),
    channels: { ...channels, leak: 0.02 + 0.3 * next() },
  }));
}

/** The same cell numbered otherwise: any order in which parents come first. Also where each compartment went. */
export function renumbered(
  compartments: readonly SmallCompartment[],
  seed: number,
): { compartments: SmallCompartment[]; at: number[] } {
  const next = numbersFrom(seed);
  const at = new Array<number>(compartments.length).fill(-1);
  const order: number[] = [];
  const ready = [0];
  while (ready.length > 0) {
    const k = ready.splice(Math.floor(next() * ready.length), 1)[0]!;
    at[k] = order.length;
    order.push(k);
    compartments.forEach(({ parent }, child) => {
      if (parent === k) ready.push(child);
    });
  }
  const moved = order.map((k) => {
    const compartment = compartments[k]!;
    return { ...compartment, parent: compartment.parent < 0 ? -1 : at[compartment.parent]! };
  });
  return { compartments: moved, at };
}

export function gridOf(compartments: readonly SmallCompartment[]): Grid {
  return smallGrid(compartments, squidReversals);
}
