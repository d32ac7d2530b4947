import type { Tolerance } from '../../src-main/contract/documents.ts';
import type { ClampSweep, CompartmentTable } from '../../src-main/contract/results.ts';
import type { Series } from '../charts/series.ts';

export const errorKinds = ['steady', 'worst', 'settling'] as const;
export type ErrorKind = (typeof errorKinds)[number];
export const errorParts = ['whole', 'access', 'cable'] as const;
export type ErrorPart = (typeof errorParts)[number];

/**
 * What one sweep says of every compartment, grid order. The access part is the steady error at the site of the nearest
 * clamp; the cable part is what is left. Only the steady error is split: the worst is reached at another time everywhere.
 */
export function errorValues(sweep: ClampSweep, kind: ErrorKind, part: ErrorPart): Float64Array {
  if (kind === 'settling') return sweep.settling_ms;
  if (kind === 'worst') return sweep.worst_mV;
  if (part === 'whole') return sweep.steady_mV;
  const access = accessPart(sweep);
  return part === 'access' ? access : sweep.steady_mV.map((error, k) => error - (access[k] ?? NaN));
}

/** Rehearsals of earlier engines know the part at one clamp alone, and were told by it everywhere. */
function accessPart(sweep: Omit<ClampSweep, 'access_mV'> & Partial<Pick<ClampSweep, 'access_mV'>>): Float64Array {
  return sweep.access_mV ?? sweep.steady_mV.map(() => sweep.accessPart_mV);
}

/** The tolerance of one sweep in mV: as given, or its share of |level − holding|. Null where that step is zero or unknown. */
export function toleranceIn(tolerance: Tolerance, level_mV: number | null, holding_mV: number | null): number | null {
  if (tolerance.unit === 'mV') return tolerance.value;
  if (level_mV === null || holding_mV === null || level_mV === holding_mV) return null;
  return (tolerance.value / 100) * Math.abs(level_mV - holding_mV);
}

// Regions differ by shape and by lightness: hues belong to the pipettes, amber and brick to cautions and refusals.
const looks = [
  { token: '--seq-1', shape: 'circle' },
  { token: '--seq-4', shape: 'triangle' },
  { token: '--seq-2', shape: 'rect' },
  { token: '--seq-5', shape: 'rectRot' },
  { token: '--seq-0', shape: 'cross' },
  { token: '--seq-3', shape: 'circle' },
] as const;

/** The look of the i-th region, the same in chart and table. */
export function regionLook(i: number): (typeof looks)[number] {
  return looks[i % looks.length] ?? looks[0];
}

/** One point per compartment, a series per region; a value that is not a number draws no point. */
export function regionPoints(table: CompartmentTable, values: Float64Array, selectedRegion: string | null): Series[] {
  return table.regionNames.flatMap((region, r): Series[] => {
    const members: number[] = [];
    for (let k = 0; k < table.count; k += 1) if (table.regionIndex[k] === r) members.push(k);
    if (members.length === 0) return [];
    const look = regionLook(r);
    return [
      {
        key: region,
        label: region,
        x: members.map((k) => table.distance_um[k] ?? NaN),
        y: members.map((k) => values[k] ?? NaN),
        paint: { token: look.token },
        shape: look.shape,
        stroke: 'solid',
        drawn: 'points',
        selected: region === selectedRegion,
      },
    ];
  });
}

/** The compartment behind the index-th point of a region's series; −1 when there is none. */
export function compartmentOf(table: CompartmentTable, region: string, index: number): number {
  const r = table.regionNames.indexOf(region);
  let seen = 0;
  for (let k = 0; k < table.count; k += 1) {
    if (table.regionIndex[k] !== r) continue;
    if (seen === index) return k;
    seen += 1;
  }
  return -1;
}
