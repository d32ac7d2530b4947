// A sketched cell has no geometry: a flat tree to look at.
import { toSi, type SquareMetre } from '../units/si.ts';

/** Between neighbours, m. For the eye only. */
export const sketchSpacing = toSi(60, 'um');

/**
 * Positions of compartments in the plane: each generation one step further out, tips one step apart, parents in the
 * middle of their children. Row k: x, y, z of compartment k, m.
 */
export function placesOfTree(parent: Int32Array, area: ArrayLike<SquareMetre>): Float64Array {
  const count = parent.length;
  const xyz = new Float64Array(3 * count);
  const kids = Array.from({ length: count }, (): number[] => []);
  for (let k = 1; k < count; k += 1) kids[parent[k]!]!.push(k);
  const biggest = Array.from({ length: count }, (_, k) => Math.sqrt(area[k]! / Math.PI)).reduce(
    (a, b) => Math.max(a, b),
    0,
  );
  const step = Math.max(sketchSpacing, biggest * 1.5);
  let tips = 0;
  const waiting = [{ k: 0, isDone: false }];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const { k, isDone } = next;
    const below = kids[k]!;
    if (!isDone && below.length > 0) {
      waiting.push({ k, isDone: true });
      for (const kid of below.toReversed()) waiting.push({ k: kid, isDone: false });
      continue;
    }
    if (below.length === 0) {
      xyz[3 * k] = tips * step;
      tips += 1;
    } else xyz[3 * k] = (xyz[3 * below[0]!]! + xyz[3 * below.at(-1)!]!) / 2;
  }
  for (let k = 1; k < count; k += 1) xyz[3 * k + 1] = xyz[3 * parent[k]! + 1]! + step;
  const root = xyz[0]!;
  for (let k = 0; k < count; k += 1) xyz[3 * k]! -= root;
  return xyz;
}
