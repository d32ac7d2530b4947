// The shape of a cell in SI: a soma and numbered branches, each a polyline of cut cones.
import type { ShapeSource } from '../contract/documents.ts';
import type { SwcReport } from '../contract/results.ts';
import { refuse } from '../units/refuse.ts';
import { toSi, type Metre } from '../units/si.ts';
import { generatedSwc } from './generators.ts';
import { branchesOf } from './shape-branches.ts';
import { readSwc, type SwcRead } from './swc-read.ts';

/** A sphere is one place; of a stack the cones are branch 0, and more when the soma itself forks. */
export interface ShapeSoma {
  readonly kind: 'sphere' | 'stack';
  /** Centre; of a stack the mean of its samples. m. */
  readonly centre: readonly [Metre, Metre, Metre];
  /** Of a stack: the sphere of the same area. */
  readonly radius: Metre;
}

/**
 * A run of cut cones between points 0..n-1; branch 0 is the soma when there is one (a sphere is a single point). A fork's
 * children start with the fork's own point; a stem starts at its first sample and joins the soma without resistance.
 */
export interface ShapeBranch {
  readonly branch: number;
  /** -1 for branch 0 only. */
  readonly parent: number;
  /** Where on the parent it hangs, m from the parent's start. */
  readonly parentAt: Metre;
  readonly isSoma: boolean;
  /** m; three per point. */
  readonly xyz: Float64Array;
  /** m. */
  readonly radius: Float64Array;
  /** m from the branch's start. Points that repeat a place have the same value: no cable between them. */
  readonly at: Float64Array;
  /** SWC type of the piece that ends at the point; entry 0 is that of the first piece. */
  readonly type: Int32Array;
  /** Path distance from the soma's surface (no soma: the root) to the branch's start, m. */
  readonly startDistance: Metre;
}

export interface Shape {
  readonly soma: ShapeSoma | null;
  /** Parents before children, depth first, in the order of the file. */
  readonly branches: readonly ShapeBranch[];
  readonly report: SwcReport;
}

/**
 * The shape that a cell document asks for: the main tree of an SWC text, or what a generator makes.
 *
 * @throws Refusal `swc-refused` for a text that cannot be read, for one without any cable or soma, and for a `file` that
 *         nobody has read yet.
 */
export function shapeOf(source: ShapeSource, place = 'cell.shape'): Shape {
  if (source.kind === 'generator') return shapeOfText(generatedSwc(source.generator), 'generated', place);
  if ('text' in source) return shapeOfText(source.text, source.fileName ?? 'SWC text', place);
  return refuse('swc-refused', {
    thing: 'SWC file',
    place: `${place}.file`,
    value: source.file,
    remedy: 'read the file and give its text; a shape is made from text only',
  });
}

function shapeOfText(text: string, name: string, place: string): Shape {
  const reading = readSwc(new TextEncoder().encode(text));
  if (reading.kind === 'refused')
    return refuse('swc-refused', {
      thing: reading.code,
      place: `${place}, ${name} line ${reading.line}`,
      value: `"${reading.text.slice(0, 200)}"`,
      remedy: reading.remedy,
    });
  const shape = shapeOfReading(reading);
  if (shape.soma === null && shape.branches.every((branch) => branch.at.at(-1) === 0))
    return refuse('swc-refused', {
      thing: 'cell without cable or soma',
      place: `${place}, ${name}`,
      value: `${reading.samples.length} sample${reading.samples.length === 1 ? '' : 's'}`,
      remedy: 'mark the soma with type 1, or give a neurite of two samples or more',
    });
  return shape;
}

/** The main tree of a read SWC file as a shape. */
export function shapeOfReading(reading: SwcRead): Shape {
  const { soma } = reading.main;
  return {
    soma: soma === null || soma.area_um2 === 0 ? null : somaOf(reading, soma),
    branches: branchesOf(reading),
    report: reading.report,
  };
}

function somaOf(reading: SwcRead, soma: NonNullable<SwcRead['main']['soma']>): ShapeSoma {
  const um = (value: number) => toSi(value, 'um');
  if (soma.sphere !== null) {
    const { x, y, z, radius } = soma.sphere;
    return { kind: 'sphere', centre: [um(x), um(y), um(z)], radius: um(radius) };
  }
  const mean = (axis: 'x' | 'y' | 'z') =>
    um(soma.samples.reduce((sum, i) => sum + reading.samples[i]![axis], 0) / soma.samples.length);
  return {
    kind: 'stack',
    centre: [mean('x'), mean('y'), mean('z')],
    radius: um(Math.sqrt(soma.area_um2 / (4 * Math.PI))),
  };
}

/** Length of a branch, m. */
export function lengthOf(branch: ShapeBranch): Metre {
  return branch.at.at(-1) ?? 0;
}
