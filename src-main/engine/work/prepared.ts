import { preparePlan, type PreparedPlan } from '../../solver/prepare.ts';
import type { SentPlan } from '../work.ts';

/** Plans this worker has made ready, the latest last. A job and its finer run are two; one more for a look back. */
const known = new Map<string, PreparedPlan>();
const most = 3;

/** The plan made ready, from memory where this worker has met it before. @throws Refusal as `preparePlan`. */
export function prepared({ key, plan, finer }: SentPlan): PreparedPlan {
  const name = finer ? `${key} finer` : key;
  const ready = known.get(name) ?? preparePlan(plan, finer ? { fineness: 0.5, stepDivisor: 2 } : {});
  known.delete(name);
  known.set(name, ready);
  for (const oldest of known.keys()) {
    if (known.size <= most) break;
    known.delete(oldest);
  }
  return ready;
}
