import type { Forecast } from '../../src-main/contract/results.ts';
import { figure, given } from '../text/quantity.ts';

/** What puts a forecast's figures in doubt: what its engine says, and arithmetic that is worse than the tolerance. */
export function cautionsOf({
  clamp,
  numerical,
  ...forecast
}: Pick<Forecast, 'clamp' | 'numerical'> & Partial<Pick<Forecast, 'cautions'>>): string[] {
  // Rehearsals of earlier engines were stored without any.
  const own = forecast.cautions ?? [];
  const off = Math.abs(numerical.clampError_mV ?? 0);
  if (clamp?.tolerance.unit !== 'mV' || off <= clamp.tolerance.value) return [...own];
  if (own.some((words) => /numerical/i.test(words))) return [...own];
  const tolerance = given(clamp.tolerance.value, 'mV');
  return [
    ...own,
    `The numerical uncertainty of the clamp error, ${figure(off, 'mV', 2)}, is above the tolerance of ${tolerance}: halving compartments and step changes the figures by more than is asked of them. Do not rely on them.`,
  ];
}
