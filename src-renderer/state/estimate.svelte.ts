// The fast passive answer to a plan that was not rehearsed yet, and what is wrong with the plan before any run.
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { PlanCheck } from '../../src-main/contract/requests.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';
import type { PassiveEstimate } from '../../src-main/contract/results.ts';
import { ask } from './ask.ts';
import { newestOnly } from './late.ts';

class EstimateState {
  /** Of the newest plan it could be made for; null when it cannot be made. */
  value = $state.raw<PassiveEstimate | null>(null);
  refusals = $state.raw<readonly RefusalData[]>([]);
  check = $state.raw<PlanCheck | null>(null);
  /** The plan the value belongs to. */
  of = $state.raw<PlanDocument | null>(null);

  // Without waiting for quiet, so that it follows a drag as fast as the engine answers; one is under way at a time.
  readonly follow = newestOnly(0, async (document: PlanDocument, isNewest) => {
    const [estimate, check] = await Promise.all([
      ask('estimate passive', { plan: document }),
      ask('plan check', { plan: document }),
    ]);
    if (!isNewest()) return;
    this.of = document;
    this.value = estimate.ok ? estimate.value : null;
    this.check = check.ok ? check.value : null;
    this.refusals =
      check.ok && check.value.refusals.length > 0
        ? check.value.refusals
        : !estimate.ok && 'refusals' in estimate
          ? estimate.refusals
          : [];
  });
}

export const estimate = new EstimateState();
