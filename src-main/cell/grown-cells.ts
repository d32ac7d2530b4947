// Four kinds of invented cell. Proportions are common practice for the kind named; no traced cell stands behind them.
import { Growth, growArbor, type Tip, type Vector } from './growth.ts';
import type { Stream } from './seeded.ts';

const axon = 2;
const dendrite = 3;
const apical = 4;
const goldenAngle = Math.PI * (3 - Math.sqrt(5));

/**
 * 8 to 12 mm of dendrites. Soma 20 µm; apical trunk 650 to 750 µm from 4 to 2 µm across, with obliques and a tuft; six to eight basal trees; the
 * first 200 µm of an axon.
 */
export function pyramidal(stream: Stream): Growth {
  return grownWithin(() => growPyramidal(stream), [8000, 12_000]);
}

function growPyramidal(stream: Stream): Growth {
  const growth = new Growth(stream, 10);
  growTrunk(growth);
  const trees = 6 + Math.floor(stream.unit() * 3);
  const turn = stream.between(0, 2 * Math.PI);
  for (let n = 0; n < trees; n += 1) {
    const azimuth = turn + n * goldenAngle;
    const down = -0.15 - 0.75 * ((n + 0.5) / trees);
    const direction: Vector = [Math.cos(azimuth), down * stream.between(0.8, 1.2), Math.sin(azimuth)];
    growArbor(growth, growth.stem(dendrite, direction, stream.between(0.85, 1.15)), {
      type: dendrite,
      lengths: [
        [15, 35],
        [25, 60],
        [40, 80],
        [90, 150],
      ],
      early: 0.3,
      angle: 0.95,
      wander: 0.09,
      pull: [0.02 * direction[0], -0.008, 0.02 * direction[2]],
    });
  }
  growAxon(growth, [0.15, -1, 0.05], 200);
  return growth;
}

function growTrunk(growth: Growth): void {
  const { stream } = growth;
  const length = stream.between(650, 750);
  const obliques = 7 + Math.floor(stream.unit() * 3);
  const places = Array.from({ length: obliques }, () => stream.between(90, 0.6 * length)).sort((a, b) => a - b);
  const radiusAt = (x: number) => 2 - x / length;
  let tip = growth.stem(apical, [0.04, 1, 0.02], radiusAt(0));
  let x = 0;
  const upwards: Vector = [0, 0.04, 0];
  const turn = stream.between(0, 2 * Math.PI);
  for (const [n, place] of [...places, length].entries()) {
    const piece = {
      type: apical,
      length: place - x,
      from: radiusAt(x),
      to: radiusAt(place),
      wander: 0.035,
      pull: upwards,
    };
    if (piece.length > 2) {
      tip = growth.run(tip, piece);
      x = place;
    }
    if (n === places.length) break;
    const oblique = growth.side(tip, stream.between(1.0, 1.4), turn + n * goldenAngle, stream.between(0.5, 0.65));
    growArbor(growth, oblique, {
      type: apical,
      lengths: [
        [25, 60],
        [90, 150],
      ],
      early: 0,
      angle: 0.8,
      wander: 0.09,
      pull: [0, 0.012, 0],
    });
  }
  growArbor(growth, tip, {
    type: apical,
    lengths: [
      [8, 16],
      [30, 70],
      [50, 90],
      [80, 140],
    ],
    early: 0.15,
    angle: 1.1,
    wander: 0.09,
    pull: [0, 0.02, 0],
  });
}

/** 3 to 5 mm of dendrites. Soma 15 µm, five or six smooth dendrites to all sides, the first 150 µm of an axon. */
export function interneuron(stream: Stream): Growth {
  return grownWithin(() => growInterneuron(stream), [3000, 5000]);
}

function growInterneuron(stream: Stream): Growth {
  const growth = new Growth(stream, 7.5);
  const trees = 5 + Math.floor(stream.unit() * 2);
  const turn = stream.between(0, 2 * Math.PI);
  for (let n = 0; n < trees; n += 1) {
    // Even on the sphere, drawn out along y.
    const y = 1 - (2 * n + 1) / trees;
    const flat = Math.sqrt(1 - y * y);
    const azimuth = turn + n * goldenAngle;
    const direction: Vector = [flat * Math.cos(azimuth), 1.3 * y, flat * Math.sin(azimuth)];
    growArbor(growth, growth.stem(dendrite, direction, stream.between(0.75, 1.0)), {
      type: dendrite,
      lengths: [
        [20, 60],
        [60, 110],
        [100, 190],
      ],
      early: 0.2,
      angle: 0.8,
      wander: 0.12,
      pull: [0, 0.015 * Math.sign(y), 0],
    });
  }
  growAxon(growth, [-0.8, -0.5, 0.2], 150);
  return growth;
}

/** 1.5 to 4 mm of dendrites. Soma 10 µm, a cone of spiny dendrites 250 to 350 µm high on one side, the first 120 µm of an axon on the other. */
export function granule(stream: Stream): Growth {
  return grownWithin(() => growGranule(stream), [1500, 4000]);
}

function growGranule(stream: Stream): Growth {
  const growth = new Growth(stream, 5);
  const trees = 2 + Math.floor(stream.unit() * 2);
  const turn = stream.between(0, 2 * Math.PI);
  for (let n = 0; n < trees; n += 1) {
    const azimuth = turn + (2 * Math.PI * n) / trees;
    const direction: Vector = [0.55 * Math.cos(azimuth), 1, 0.35 * Math.sin(azimuth)];
    growArbor(growth, growth.stem(dendrite, direction, stream.between(0.7, 0.85)), {
      type: dendrite,
      lengths: [
        [20, 40],
        [40, 70],
        [60, 90],
        [120, 160],
      ],
      early: 0.25,
      angle: 0.55,
      wander: 0.08,
      pull: [0, 0.035, 0],
    });
  }
  growAxon(growth, [0.1, -1, -0.1], 120);
  return growth;
}

/** A sphere of 13 µm. */
export function round(stream: Stream): Growth {
  return new Growth(stream, 6.5);
}

function growAxon(growth: Growth, direction: Vector, length: number): Tip {
  const stem = growth.stem(axon, direction, 0.6);
  return growth.run(stem, { type: axon, length, from: 0.6, to: 0.4, wander: 0.07, pull: [0, -0.03, 0] });
}

/** Grows again, on with the same stream, until the dendrites' length, µm, lies within the range the kind claims. */
function grownWithin(grow: () => Growth, [least, most]: readonly [number, number]): Growth {
  for (;;) {
    const growth = grow();
    const length = growth.lengthOf(dendrite) + growth.lengthOf(apical);
    if (length >= least && length <= most) return growth;
  }
}
