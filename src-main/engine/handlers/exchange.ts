import { fileStem } from '../../exchange/csv.ts';
import { readPlanFile, wholePlan } from '../../exchange/documents.ts';
import { forecastToJson } from '../../exchange/forecast-json.ts';
import { readTraces } from '../../notebook/traces.ts';
import { refuse } from '../../units/refuse.ts';
import type { Handlers } from '../handlers.ts';
import { storedRehearsal } from '../stored-rehearsal.ts';
import { thinned } from '../thin.ts';

/** Points of a curve on paper: twice what a printed column of a page can show. */
const pointsOnPaper = 4000;

export const exchangeHandlers = {
  'export plan': ({ plan }) => ({
    name: `${fileStem(plan.name)}.plan.json`,
    text: `${JSON.stringify(plan, null, 2)}\n`,
  }),
  'export traces': ({ rehearsalId, asOne }, desk) => {
    const { summary } = storedRehearsal(desk.notebook, rehearsalId);
    const traces = readTraces(desk.notebook, rehearsalId);
    return desk.pool.run('short', 'trace tables', { plan: { name: summary.planName }, traces, asOne });
  },
  'export forecast': ({ rehearsalId }, desk) => forecastToJson(storedRehearsal(desk.notebook, rehearsalId)),
  'export figure': ({ rehearsalId }, desk) => {
    const stored = storedRehearsal(desk.notebook, rehearsalId);
    const traces = readTraces(desk.notebook, rehearsalId).map((trace) => thinned(trace, pointsOnPaper));
    return desk.pool.run('short', 'figure', { stored, traces });
  },
  'import plan': ({ name, text }) => ({ plan: wholePlan(readPlanFile(text, name), refuseFile) }),
} satisfies Partial<Handlers>;

/** A window hands over one text: what lies beside it cannot be reached, and must not be. */
function refuseFile(path: string): never {
  return refuse('file-outside-folder', {
    thing: 'part of the plan',
    place: path,
    value: 'a file of its own',
    remedy: 'import a plan with everything in it, as exports write it',
  });
}
