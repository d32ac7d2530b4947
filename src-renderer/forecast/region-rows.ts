import type { ClampForecast, ClampSweep, CompartmentTable } from '../../src-main/contract/results.ts';

/** How one sweep fares in one region. */
export interface RegionRow {
  readonly region: string;
  readonly area_um2: number;
  /** 0 to 1; NaN where it was not told for this sweep. */
  readonly reach: number;
  /** The largest steady and worst |error|, signed; NaN where the grid is not at hand. */
  readonly steady_mV: number;
  readonly worst_mV: number;
  /** The last compartment to settle; null: some membrane does not settle in the window. */
  readonly settles_ms: number | null;
  /** Share of the region's membrane that does not settle in the window, 0 to 1. */
  readonly unsettled: number;
}

/** The largest in size, with its sign; NaN for nothing. */
function largest(values: Float64Array, members: readonly number[]): number {
  let best = NaN;
  for (const k of members) {
    const value = values[k] ?? NaN;
    if (Number.isFinite(value) && !(Math.abs(value) <= Math.abs(best))) best = value;
  }
  return best;
}

/** Every region in one sweep. */
export function regionRows(clamp: ClampForecast, sweep: ClampSweep, table: CompartmentTable | null): RegionRow[] {
  return clamp.reachByRegion.map(({ region, area_um2, reach }) => {
    const members: number[] = [];
    const r = table ? table.regionNames.indexOf(region) : -1;
    if (table) for (let k = 0; k < table.count; k += 1) if (table.regionIndex[k] === r) members.push(k);
    let unsettled = 0;
    let whole = 0;
    let last = NaN;
    for (const k of members) {
      const area = table?.area_um2[k] ?? 0;
      const settles = sweep.settling_ms[k] ?? NaN;
      whole += area;
      if (Number.isNaN(settles)) unsettled += area;
      else if (!(settles <= last)) last = settles;
    }
    const own = sweep.reachByRegion?.find((one) => one.region === region)?.reach;
    return {
      region,
      area_um2,
      // Older rehearsals tell it by region for their worst sweep alone.
      reach: own ?? (sweep.sweep === clamp.worstSweep ? reach : NaN),
      steady_mV: largest(sweep.steady_mV, members),
      worst_mV: largest(sweep.worst_mV, members),
      settles_ms: unsettled > 0 || members.length === 0 ? null : last,
      unsettled: whole > 0 ? unsettled / whole : NaN,
    };
  });
}

/** Whose reach it is: "sweep 3", and whether that is the worst there is. */
export function sweepWords(clamp: ClampForecast, sweep: ClampSweep): string {
  const at = `sweep ${sweep.sweep + 1}`;
  if (clamp.sweeps.length === 1) return at;
  return sweep.sweep === clamp.worstSweep ? `${at}, the worst of all` : at;
}
