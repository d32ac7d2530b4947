// The radius column, and hints that it or the z column was not measured.
import { SwcFault, type Findings } from './swc-findings.ts';
import { gap, type Kids, type SwcDraft } from './swc-sample.ts';

/** More bad radii than this and a cable would be invented. Design choice. */
const mostBadShare = 0.5;
/** Fewer neurite samples than this say nothing about how a cell was measured. Design choice. */
const enoughToJudge = 10;

/**
 * Replaces neurite radii of 0 and below by the parent's; at the start of a neurite by the first good one down the first
 * child.
 *
 * @param order parents before children.
 * @throws SwcFault `E_SOMA_RADIUS`; `E_RADIUS` when more than half are bad, or none can be taken over.
 */
export function repairRadii(
  samples: readonly SwcDraft[],
  kids: Kids,
  order: readonly number[],
  findings: Findings,
): void {
  for (const s of samples) if (s.soma && s.radius <= 0) throw new SwcFault('E_SOMA_RADIUS', s.line);
  const neurites = samples.filter((s) => !s.soma);
  const bad = neurites.filter((s) => s.radius <= 0);
  if (bad.length > mostBadShare * neurites.length) throw new SwcFault('E_RADIUS', bad[0]!.line);
  for (const s of bad) findings.note(s.radius === 0 ? 'W_RADIUS_ZERO' : 'W_RADIUS_NEGATIVE', s.line);
  for (const i of order) {
    const s = samples[i]!;
    if (s.soma || s.radius > 0) continue;
    const parent = samples[s.parent];
    s.radius = parent !== undefined && !parent.soma ? parent.radius : firstGoodBelow(samples, kids, i);
  }
  if (neurites.length < enoughToJudge) return;
  if (neurites.every((s) => s.radius === neurites[0]!.radius)) findings.note('W_RADIUS_CONSTANT');
  if (neurites.every((s) => s.z === neurites[0]!.z)) findings.note('W_FLAT');
}

function firstGoodBelow(samples: readonly SwcDraft[], kids: Kids, from: number): number {
  let i = from;
  while (samples[i]!.radius <= 0) {
    if (kids.start[i] === kids.start[i + 1]) throw new SwcFault('E_RADIUS', samples[from]!.line);
    i = kids.list[kids.start[i]!]!;
  }
  return samples[i]!.radius;
}

/** Reports sizes that no cell has in micrometres: box diagonal, middle neurite radius, soma radius. Design choices. */
export function judgeUnits(samples: readonly SwcDraft[], findings: Findings): void {
  const low = { x: Infinity, y: Infinity, z: Infinity };
  const high = { x: -Infinity, y: -Infinity, z: -Infinity };
  for (const s of samples) {
    for (const axis of ['x', 'y', 'z'] as const) {
      low[axis] = Math.min(low[axis], s[axis]);
      high[axis] = Math.max(high[axis], s[axis]);
    }
  }
  const box = gap(low, high);
  const radii = Float64Array.from(samples.filter((s) => !s.soma).map((s) => s.radius)).sort();
  const middle = radii[Math.floor(radii.length / 2)] ?? 0;
  const isSmall = samples.length >= 5 && box < 1;
  if (box > 20_000 || isSmall || middle > 25 || samples.some((s) => s.soma && s.radius > 100)) {
    const size = `${Number(box.toPrecision(3))} µm across, middle neurite radius ${Number(middle.toPrecision(3))} µm`;
    findings.note('W_UNITS', 0, `The size is unusual for micrometres (${size}); nothing was rescaled.`);
  }
}
