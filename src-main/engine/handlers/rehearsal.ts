import { readRehearsal, rehearsalsOfPlan } from '../../notebook/rehearsals.ts';
import { readTraces } from '../../notebook/traces.ts';
import type { Handlers } from '../handlers.ts';
import { rehearse } from '../rehearse.ts';
import { storedRehearsal } from '../stored-rehearsal.ts';
import { slice, thinned } from '../thin.ts';

export const rehearsalHandlers = {
  'rehearsal start': (question, desk) => rehearse(desk, question),
  'rehearsal list': ({ planId }, desk) => rehearsalsOfPlan(desk.notebook, planId),
  'rehearsal read': ({ rehearsalId }, desk) => storedRehearsal(desk.notebook, rehearsalId),
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
