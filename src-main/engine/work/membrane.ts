import type { Trace } from '../../contract/results.ts';
import { rehearseSweep } from '../../forecast/rehearse.ts';
import type { PreparedPlan } from '../../solver/prepare.ts';
import type { SweepState } from '../../solver/run.ts';
import { Refusal, refuse } from '../../units/refuse.ts';
import type { WorkHooks, WorkQuestion } from '../work.ts';
import { prepared } from './prepared.ts';
import { divergence } from './sweeps.ts';

/**
 * The membrane voltage at one more compartment: the sweep run again with that compartment watched; where sweeps carry
 * over, the sweeps before it as well. The same grid and step, so the other traces would come out as stored.
 * @throws Refusal `quantity-out-of-range` for a sweep or compartment that is not there, `job-cancelled`, `run-diverged`.
 */
export function membrane(question: WorkQuestion<'membrane'>, hooks: WorkHooks<'membrane'>): Trace {
  const { sent, sweep, compartment } = question;
  const key = `compartment ${compartment}`;
  const plan = watching(prepared(sent), key, compartment);
  mustBeBelow(sweep, plan.laidOut.count, 'sweep');
  mustBeBelow(compartment, plan.grid.count, 'compartment');
  let start: SweepState | undefined;
  for (let index = sent.plan.protocol.carryOver ? 0 : sweep; ; index += 1) {
    const rehearsed = rehearseSweep(plan, index, { cancelled: hooks.cancelled, ...(start && { start }) });
    if (rehearsed.kind === 'diverged') throw new Refusal(divergence(plan, rehearsed));
    if (rehearsed.kind === 'cancelled') {
      const remedy = 'ask again';
      return refuse('job-cancelled', { thing: 'membrane trace', place: key, value: 'cancelled', remedy });
    }
    start = rehearsed.end;
    if (index < sweep) continue;
    const trace = rehearsed.traces.find((each) => each.key === `membrane:${key}`);
    if (!trace) throw new Error(`sweep ${sweep} kept no trace of ${key}`);
    return trace;
  }
}

function watching(plan: PreparedPlan, name: string, compartment: number): PreparedPlan {
  return {
    ...plan,
    probes: [...plan.probes, { name, compartment }],
    input: (sweep, from) => {
      const input = plan.input(sweep, from);
      return { ...input, probes: [...input.probes, compartment] };
    },
  };
}

function mustBeBelow(value: number, count: number, thing: string): void {
  if (value < count) return;
  const remedy = `give a whole number from 0 to ${count - 1}`;
  refuse('quantity-out-of-range', { thing, place: `question.${thing}`, value: String(value), remedy });
}
