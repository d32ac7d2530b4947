// Random SWC rows: a soma and a random tree of neurites.
import fc from 'fast-check';

const coordinate = fc.integer({ min: -4000, max: 4000 }).map((n) => n / 10);

/** Rows with ids 1..n, the soma first, no two connected samples within 1 µm. */
export const randomSwc: fc.Arbitrary<string[]> = fc
  .array(
    fc.record({
      parent: fc.double({ min: 0, max: 0.999, noNaN: true }),
      type: fc.constantFrom(2, 3, 4),
      xyz: fc.tuple(coordinate, coordinate, coordinate),
      radius: fc.integer({ min: 20, max: 300 }).map((n) => n / 100),
    }),
    { minLength: 2, maxLength: 25 },
  )
  .map((samples) => {
    const points: [number, number, number][] = [[0, 0, 0]];
    const rows = ['1 1 0 0 0 8.5 -1'];
    for (const { parent, type, xyz, radius } of samples) {
      const above = Math.floor(parent * points.length);
      const isNear = Math.hypot(...xyz.map((value, axis) => value - points[above]![axis]!)) < 1;
      const point: [number, number, number] = isNear ? [xyz[0] + 3, xyz[1], xyz[2]] : xyz;
      points.push(point);
      rows.push(`${points.length} ${type} ${point.join(' ')} ${radius} ${above + 1}`);
    }
    // A stem of one sample has no cable; one more makes sure of some.
    rows.push(`${rows.length + 1} 3 500 0 0 1 1`, `${rows.length + 2} 3 700 10 5 0.5 ${rows.length + 1}`);
    return rows;
  });

/** The same cell with a sample more in the middle of every cone. */
export function split(rows: readonly string[]): string[] {
  const samples = rows.map((row) => row.split(' ').map(Number));
  let next = samples.length + 1;
  return samples.flatMap((sample) => {
    const [id, type, x, y, z, r, parent] = sample as [number, number, number, number, number, number, number];
    const above = samples[parent - 1] as [number, number, number, number, number, number, number] | undefined;
    if (above === undefined || above[1] === 1) return [sample.join(' ')];
    const middle = [(x + above[2]) / 2, (y + above[3]) / 2, (z + above[4]) / 2, (r + above[5]) / 2];
    const row = [`${next} ${type} ${middle.join(' ')} ${parent}`, `${id} ${type} ${x} ${y} ${z} ${r} ${next}`];
    next += 1;
    return row;
  });
}
