import type { Forecast } from '../../contract/results.ts';
import { gatherForecast } from '../../forecast/gather.ts';
import type { WorkQuestion } from '../work.ts';
import { prepared } from './prepared.ts';

/** The forecast from a job's sweeps; their traces and ends are not needed for it and did not travel. */
export function gather({ sent, sweeps }: WorkQuestion<'gather'>): Forecast {
  const none = { V: new Float64Array() };
  return gatherForecast(
    prepared(sent),
    sweeps.map((sweep) => ({ ...sweep, traces: [], end: none })),
  );
}
