// Growing invented neurites: wandering runs, forks whose radii follow the 3/2 power.
import type { Stream } from './seeded.ts';

export type Vector = readonly [number, number, number];

/** One sample of a growing cell, µm; parent from 0, -1 for the root. */
export interface GrownSample {
  readonly type: number;
  readonly point: Vector;
  readonly radius: number;
  readonly parent: number;
}

export interface Tip {
  readonly sample: number;
  readonly direction: Vector;
  readonly radius: number;
}

export interface Run {
  readonly type: number;
  readonly length: number;
  /** µm at its first own sample and at its end. */
  readonly from: number;
  readonly to: number;
  /** Standard deviation of the turn in each step, radians. */
  readonly wander: number;
  /** Bends the way in each step; its size is the share it has in the new direction. */
  readonly pull: Vector;
}

/** Between samples, µm. */
const step = 8;
/** No neurite gets thinner than 0.4 µm across, about what light microscopy can follow (common practice). */
const thinnest = 0.2;

/** A cell while it grows, in µm, y towards the surface of the brain. */
export class Growth {
  readonly samples: GrownSample[] = [];
  readonly stream: Stream;

  constructor(stream: Stream, somaRadius: number) {
    this.stream = stream;
    this.#add({ type: 1, point: [0, 0, 0], radius: somaRadius, parent: -1 });
  }

  #add(sample: GrownSample): number {
    this.samples.push(sample);
    return this.samples.length - 1;
  }

  /** Length of the neurites of one type, µm. */
  lengthOf(type: number): number {
    return this.samples.reduce((length, { type: own, point, parent }) => {
      const above = this.samples[parent];
      if (own !== type || above === undefined || above.type === 1) return length;
      return length + Math.hypot(...sum(point, scaled(above.point, -1)));
    }, 0);
  }

  /** A stem's first sample, on the soma's surface. */
  stem(type: number, direction: Vector, radius: number): Tip {
    const unit = normalised(direction);
    const point = scaled(unit, this.samples[0]!.radius);
    return { sample: this.#add({ type, point, radius, parent: 0 }), direction: unit, radius };
  }

  /** Grows on from a tip; returns the new one. */
  run(tip: Tip, run: Run): Tip {
    const count = Math.max(2, Math.round(run.length / step));
    let { sample, direction } = tip;
    let point = this.samples[sample]!.point;
    for (let n = 1; n <= count; n += 1) {
      const turn = scaled(this.#anywhere(), run.wander);
      direction = normalised(sum(sum(direction, turn), run.pull));
      point = sum(point, scaled(direction, run.length / count));
      const taper = run.from + ((run.to - run.from) * n) / count;
      const radius = Math.max(thinnest, taper * (1 + 0.04 * this.stream.normal()));
      sample = this.#add({ type: run.type, point, radius, parent: sample });
    }
    return { sample, direction, radius: run.to };
  }

  /**
   * The two ways on from a fork: directions apart by about `angle`, radii with r^1.5 = r1^1.5 + r2^1.5.
   *
   * @source 3/2 power: Rall (1959), Exp. Neurol. 1:491-527 (from memory).
   */
  fork(tip: Tip, angle: number): readonly [Tip, Tip] {
    const side = normalised(cross(tip.direction, this.#anywhere()));
    const share = this.stream.between(0.36, 0.64);
    const half = (way: 1 | -1, part: number): Tip => {
      const turn = way * angle * (1 - part) * this.stream.between(0.8, 1.2);
      const direction = normalised(sum(scaled(tip.direction, Math.cos(turn)), scaled(side, Math.sin(turn))));
      return { sample: tip.sample, direction, radius: Math.max(thinnest, tip.radius * part ** (2 / 3)) };
    };
    return [half(1, share), half(-1, 1 - share)];
  }

  /** A side branch from a tip: at `angle` from the way there, turned round it to `azimuth`. */
  side(tip: Tip, angle: number, azimuth: number, radius: number): Tip {
    const around: Vector = [Math.cos(azimuth), 0, Math.sin(azimuth)];
    const across = normalised(sum(around, scaled(tip.direction, -dot(around, tip.direction))));
    const direction = sum(scaled(tip.direction, Math.cos(angle)), scaled(across, Math.sin(angle)));
    return { sample: tip.sample, direction: normalised(direction), radius };
  }

  #anywhere(): Vector {
    return [this.stream.normal(), this.stream.normal(), this.stream.normal()];
  }
}

export interface Arbor {
  readonly type: number;
  /** Lengths by order, µm: the stem first, the tips last; each drawn between the two. */
  readonly lengths: readonly (readonly [number, number])[];
  /** Share of forks that do not happen after the first. */
  readonly early: number;
  readonly angle: number;
  readonly wander: number;
  readonly pull: Vector;
}

/** Grows a tree of forks from a tip. A run keeps its radius but for a slight taper; forks thin it. */
export function growArbor(growth: Growth, start: Tip, arbor: Arbor): void {
  const waiting = [{ tip: start, order: 0 }];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const { tip, order } = next;
    const last = arbor.lengths.length - 1;
    const endsEarly = order > 0 && order < last && growth.stream.unit() < arbor.early;
    const isTip = order === last || endsEarly;
    const [low, high] = arbor.lengths[isTip ? last : order]!;
    const end = growth.run(tip, {
      type: arbor.type,
      length: growth.stream.between(low, high),
      from: tip.radius,
      to: tip.radius * (isTip ? 0.7 : 0.92),
      wander: arbor.wander,
      pull: arbor.pull,
    });
    if (isTip) continue;
    for (const tipOfFork of growth.fork(end, arbor.angle)) waiting.push({ tip: tipOfFork, order: order + 1 });
  }
}

export function normalised(v: Vector): Vector {
  return scaled(v, 1 / Math.hypot(...v));
}
function scaled(v: Vector, by: number): Vector {
  return [v[0] * by, v[1] * by, v[2] * by];
}
function sum(a: Vector, b: Vector): Vector {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
}
function dot(a: Vector, b: Vector): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}
function cross(a: Vector, b: Vector): Vector {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}
