import { readRehearsal, rehearsalsOfPlan } from '../../notebook/rehearsals.ts';
import { readTraces } from '../../notebook/traces.ts';
import type { Desk } from '../desk.ts';
import type { Handlers } from '../handlers.ts';
import { rehearse } from '../rehearse.ts';
import { storedRehearsal } from '../stored-rehearsal.ts';
import { slice, thinned } from '../thin.ts';
import { engineVersion } from '../version.ts';

/** A rehearsal whose finer run was cut off, by the end of the program say, gets it when it is looked at again. */
function takeUpFinerRun(desk: Desk, rehearsalId: number): void {
  const { notebook } = desk;
  const { plan, summary, forecast } = readRehearsal(notebook, rehearsalId);
  // Another version of the engine would tell its own difference along with the grid's.
  if (
    forecast.numerical.state !== 'pending' ||
    notebook.readOnlyReason !== null ||
    summary.engineVersion !== engineVersion
  )
    return;
  const sent = { key: summary.hashes.plan, plan, finer: false };
  desk.finer.add({ notebook, rehearsalId, sent, sweeps: summary.sweeps, forecast });
}

export const rehearsalHandlers = {
  'rehearsal start': (question, desk) => rehearse(desk, question),
  'rehearsal list': ({ planId }, desk) => rehearsalsOfPlan(desk.notebook, planId),
  'rehearsal read': ({ rehearsalId }, desk) => {
    const stored = storedRehearsal(desk.notebook, rehearsalId);
    takeUpFinerRun(desk, rehearsalId);
    return stored;
  },
  'rehearsal traces': ({ rehearsalId, sweeps, from_ms, to_ms, mostPoints }, desk) => {
    readRehearsal(desk.notebook, rehearsalId);
    return readTraces(desk.notebook, rehearsalId, sweeps).map((trace) =>
      thinned(slice(trace, from_ms, to_ms), mostPoints),
    );
  },
  'rehearsal membrane': ({ rehearsalId, compartment, sweep }, desk) => {
    const { plan, summary } = readRehearsal(desk.notebook, rehearsalId);
    const sent = { key: summary.hashes.plan, plan, finer: false };
    return desk.pool.run('short', 'membrane', { sent, compartment, sweep });
  },
  'job cancel': ({ jobId }, desk) => ({ wasRunning: desk.cancel(jobId) }),
} satisfies Partial<Handlers>;
