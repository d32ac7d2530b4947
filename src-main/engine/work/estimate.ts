import type { PassiveEstimate } from '../../contract/results.ts';
import { passiveEstimate, type EstimateMemory } from '../../forecast/estimate.ts';
import type { WorkQuestion } from '../work.ts';

/** Of the plan before: while something is dragged, the next is like it. */
const memory: EstimateMemory = {};

/** @throws Refusal as `passiveEstimate`. */
export function estimate({ plan }: WorkQuestion<'estimate'>): PassiveEstimate {
  return passiveEstimate(plan, memory);
}
