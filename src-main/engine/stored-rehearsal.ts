import type { StoredRehearsal } from '../contract/results.ts';
import type { Notebook } from '../notebook/open.ts';
import { readRehearsal } from '../notebook/rehearsals.ts';

/** A rehearsal as a window sees it, with the very plan it was run on. @throws Refusal `notebook-record-missing`. */
export function storedRehearsal(notebook: Notebook, rehearsalId: number): StoredRehearsal {
  const { summary, forecast, plan } = readRehearsal(notebook, rehearsalId);
  return { summary, forecast, protocol: plan.protocol, plan };
}
