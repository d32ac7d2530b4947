import type { ClampForecast, Forecast } from '../contract/results.ts';

/**
 * Numerical uncertainty: |figure − the same figure with compartment length, step and spacing of the gate tables halved|.
 * Clamp error: the larger move of the access error and, sweep by sweep, of the largest steady error anywhere on the cell,
 * mV. Reach: a share, 0 to 1. Both null where there is no clamp to compare.
 * @source grid refinement as an estimate of discretisation error: Richardson LF (1911), Phil Trans R Soc A 210:307
 *         (from memory), without the extrapolation.
 */
export function numericalUncertainty(
  nominal: Forecast,
  finer: Forecast,
): { readonly clampError_mV: number | null; readonly reach: number | null } {
  const [a, b] = [nominal.clamp, finer.clamp];
  if (a === null || b === null) return { clampError_mV: null, reach: null };
  const finerErrors = largestErrors(b);
  const moves = [...largestErrors(a)].map(([sweep, error]) => Math.abs(error - (finerErrors.get(sweep) ?? NaN)));
  return {
    clampError_mV: Math.max(Math.abs(a.accessError_mV - b.accessError_mV), ...moves),
    reach: Math.abs(a.reach - b.reach),
  };
}

function largestErrors(clamp: ClampForecast): Map<number, number> {
  return new Map(
    clamp.sweeps.map(({ sweep, steady_mV }) => [
      sweep,
      steady_mV.reduce((most, error) => Math.max(most, Math.abs(error)), 0),
    ]),
  );
}
