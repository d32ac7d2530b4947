import type { PlanCheck } from '../../contract/requests.ts';
import { preparePlan } from '../../solver/prepare.ts';
import { fromSi } from '../../units/si.ts';
import { Refusal } from '../../units/refuse.ts';
import type { WorkQuestion } from '../work.ts';

/** What a plan amounts to, or all that is wrong with it; the figures are 0 then. */
export function checkPlan({ plan }: WorkQuestion<'check'>): PlanCheck {
  try {
    const { grid, laidOut, step } = preparePlan(plan);
    return {
      refusals: [],
      cautions: cautionsOf(plan),
      sweeps: laidOut.count,
      sweepDuration_ms: fromSi(laidOut.longest, 'ms'),
      totalTime_s: laidOut.totalTime,
      compartments: grid.count,
      step_us: fromSi(step, 'us'),
    };
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    const figures = { sweeps: 0, sweepDuration_ms: 0, totalTime_s: 0, compartments: 0, step_us: 0 };
    return { refusals: error.all, cautions: [], ...figures };
  }
}

function cautionsOf({ protocol, rig, question }: WorkQuestion<'check'>['plan']): string[] {
  const cautions: string[] = [];
  if (protocol.readings.length === 0) {
    cautions.push('There is no reading, so nothing recorded is compared with its true value.');
  }
  if (question && !protocol.readings.some(({ id }) => id === question.reading)) {
    cautions.push('The question asks for a reading that the protocol does not have.');
  }
  for (const { letter, mode, accessResistance_MOhm } of rig.pipettes) {
    if (mode === 'voltage clamp' && accessResistance_MOhm === 0) {
      cautions.push(`Pipette ${letter} has no access resistance: no real pipette is so good.`);
    }
  }
  return cautions;
}
