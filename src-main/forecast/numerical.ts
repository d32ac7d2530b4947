// How far a forecast's figures would move on a finer grid, with smaller steps and tables.
import type { ClampForecast, Forecast } from '../contract/results.ts';

/**
 * Numerical uncertainty: |figure − the same figure with compartment length, step and table spacing halved|.
 *
 * Clamp error: the larger move of the access error and of the largest steady |error| anywhere, mV. Reach: a share, 0 to 1.
 * Null where there is no clamp to compare.
 */
export function numericalUncertainty(nominal: Forecast, finer: Forecast): Forecast['numerical'] {
  const [a, b] = [nominal.clamp, finer.clamp];
  if (a === null || b === null) return { state: 'computed', clampError_mV: null, reach: null };
  return {
    state: 'computed',
    clampError_mV: Math.max(Math.abs(a.accessError_mV - b.accessError_mV), Math.abs(largestError(a) - largestError(b))),
    reach: Math.abs(a.reach - b.reach),
  };
}

function largestError({ sweeps }: ClampForecast): number {
  return sweeps.reduce(
    (largest, { steady_mV }) => steady_mV.reduce((most, error) => Math.max(most, Math.abs(error)), largest),
    0,
  );
}
