import type { RefusalData } from '../../contract/refusal.ts';
import { rehearseSweep } from '../../forecast/rehearse.ts';
import type { PreparedPlan } from '../../solver/prepare.ts';
import type { SweepState } from '../../solver/run.ts';
import { plain } from '../../units/format.ts';
import type { WorkAnswer, WorkHooks, WorkQuestion } from '../work.ts';
import { prepared } from './prepared.ts';

/** Sweeps in the order given; each is handed over as it ends. Where sweeps carry over, all of them from the first. */
export function sweeps(
  { sent, sweeps: wanted }: WorkQuestion<'sweeps'>,
  hooks: WorkHooks<'sweeps'>,
): WorkAnswer<'sweeps'> {
  // One that waited its turn while its job was cancelled: to make the plan ready may take seconds.
  if (hooks.cancelled()) return { kind: 'cancelled' };
  const plan = prepared(sent);
  const { carryOver } = sent.plan.protocol;
  let before: SweepState | undefined;
  for (const [turn, sweep] of wanted.entries()) {
    const rehearsed = rehearseSweep(plan, sweep, {
      cancelled: hooks.cancelled,
      progress: (done) => hooks.progress((turn + done) / wanted.length),
      ...(carryOver && before && { start: before }),
    });
    if (rehearsed.kind === 'cancelled') return { kind: 'cancelled' };
    if (rehearsed.kind === 'diverged') return { kind: 'stopped', refusal: divergence(plan, rehearsed) };
    const { end, ...rest } = rehearsed;
    before = end;
    hooks.part(rest);
    if (hooks.cancelled()) return { kind: 'cancelled' };
  }
  return { kind: 'done' };
}

/** What a person can do about a run that left the finite numbers. Sweeps and compartments as the screens number them. */
export function divergence(
  plan: PreparedPlan,
  at: { readonly sweep: number; readonly time_ms: number; readonly compartment: number },
): RefusalData {
  const name = plan.grid.names?.[at.compartment];
  const where = name === undefined ? `compartment ${at.compartment}` : `compartment "${name}"`;
  return {
    code: 'run-diverged',
    thing: 'membrane potential',
    place: `sweep ${at.sweep + 1}, t = ${plain(at.time_ms, 4)} ms, ${where}`,
    value: 'not a finite number',
    remedy: "check the channels' formulas and densities near there, or set a smaller time step",
  };
}
