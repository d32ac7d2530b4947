import { tracesToCsv, tracesToOneCsv } from '../../exchange/csv.ts';
import { figureSvg } from '../../exchange/figure-svg.ts';
import type { WorkAnswer, WorkQuestion } from '../work.ts';

/** Millions of numbers become text here, away from the thread that answers. */
export function traceTables({ plan, traces, asOne }: WorkQuestion<'trace tables'>): WorkAnswer<'trace tables'> {
  return asOne ? tracesToOneCsv(plan, traces) : tracesToCsv(plan, traces);
}

/** The figure of a rehearsal; its traces are thinned already. */
export function figure({ stored, traces }: WorkQuestion<'figure'>): WorkAnswer<'figure'> {
  return figureSvg(stored, traces);
}
