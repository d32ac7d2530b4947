// SWC out: ids 1 to n, parents first, plain decimals, so that any reader of the standard takes it.
import type { Shape, ShapeBranch } from '../cell/shape.ts';
import type { SwcRead } from '../cell/swc-read.ts';
import { fromSi } from '../units/si.ts';

interface Row {
  readonly type: number;
  readonly xyz: readonly number[];
  readonly radius: number;
  /** From 0; -1 for a root. */
  readonly parent: number;
}

/**
 * A read file as clean SWC: all its trees, repaired, with its header kept. Read back, it measures the same.
 *
 * @source INCF SWC specification 1.0.3.
 */
export function swcOfReading(reading: SwcRead, title: string): string {
  const order = reading.trees.flatMap((tree) => tree.order);
  const rowOf = new Int32Array(reading.samples.length);
  order.forEach((i, row) => (rowOf[i] = row));
  const rows = order.map((i): Row => {
    const { type, x, y, z, radius, parent } = reading.samples[i]!;
    return { type, xyz: [x, y, z], radius, parent: parent < 0 ? -1 : rowOf[parent]! };
  });
  return written(title, reading.report.header, rows);
}

/**
 * A shape as SWC: its soma as one sphere or as the stack it is, then its branches. Read back, it measures the same, but for
 * the file's other trees, which a shape leaves out.
 *
 * @source INCF SWC specification 1.0.3.
 */
export function swcOfShape(shape: Shape, title: string): string {
  const rows: Row[] = [];
  /** Row of every point, by branch. */
  const rowsOf: number[][] = [];
  for (const branch of shape.branches) {
    const above = shape.branches[branch.parent];
    const joint = above === undefined ? -1 : rowsOf[branch.parent]![jointOf(above, branch.parentAt)]!;
    const isShared = above !== undefined && above.isSoma === branch.isSoma;
    const own = isShared ? [joint] : [];
    for (let n = own.length; n < branch.at.length; n += 1) {
      const xyz = [0, 1, 2].map((axis) => fromSi(branch.xyz[3 * n + axis]!, 'um'));
      const parent = own[n - 1] ?? joint;
      rows.push({ type: branch.type[n]!, xyz, radius: fromSi(branch.radius[n]!, 'um'), parent });
      own.push(rows.length - 1);
    }
    rowsOf.push(own);
  }
  return written(title, [], rows);
}

/** Index of the point at which a child hangs: the last one for a fork. */
function jointOf(branch: ShapeBranch, at: number): number {
  const last = branch.at.length - 1;
  return branch.at[last] === at ? last : branch.at.indexOf(at);
}

function written(title: string, header: readonly string[], rows: readonly Row[]): string {
  const head = `# ${title.replace(/\s+/g, ' ')}\n# Written by Holdfast: id type x y z radius parent, in micrometres\n`;
  const kept = header.map((line) => `${line.trim()}\n`).join('');
  const samples = rows.map(({ type, xyz, radius, parent }, row) => {
    const numbers = [...xyz, radius].map(plain).join(' ');
    return `${row + 1} ${type} ${numbers} ${parent < 0 ? -1 : parent + 1}\n`;
  });
  return head + kept + samples.join('');
}

/** At most six decimals, no exponent. */
function plain(value: number): string {
  const text = value.toFixed(6).replace(/\.?0+$/, '');
  return text === '-0' ? '0' : text;
}
