import type { PlanDocument } from '../../contract/documents.ts';
import type { TextFile } from '../../contract/requests.ts';
import { readPlanFile, wholePlan } from '../../exchange/documents.ts';
import { refuse } from '../../units/refuse.ts';
import { fileName } from '../file-name.ts';
import type { Handlers } from '../handlers.ts';

export const exchangeHandlers = {
  'export plan': ({ plan }) => planFile(plan),
  'import plan': ({ name, text }) => ({ plan: wholePlan(readPlanFile(text, name), refuseFile) }),
} satisfies Partial<Handlers>;

function planFile(plan: PlanDocument): TextFile {
  return { name: `${fileName(plan.name)}.plan.json`, text: `${JSON.stringify(plan, null, 2)}\n` };
}

/** A window hands over one text: what lies beside it cannot be reached, and must not be. */
function refuseFile(path: string): never {
  return refuse('file-outside-folder', {
    thing: 'part of the plan',
    place: path,
    value: 'a file of its own',
    remedy: 'import a plan with everything in it, as exports write it',
  });
}
