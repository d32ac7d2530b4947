import { questions, type CheckedQuestion, type RequestName } from '../contract/requests.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { refuseDeep } from '../exchange/nesting.ts';
import { schemaRefusals } from '../exchange/schema-refusals.ts';
import { Refusal, refuse } from '../units/refuse.ts';

/**
 * A question as its schema reads it. A fault inside a document keeps its own code and the path a plan check would give;
 * a fault of the question itself is `request-malformed`.
 * @throws Refusal with every fault; `too-large` where it is nested too deep.
 */
export function checkedQuestion<N extends RequestName>(name: N, question: unknown): CheckedQuestion<N> {
  refuseDeep(question, '');
  const outcome = questions[name].safeParse(question);
  if (outcome.success) return outcome.data as CheckedQuestion<N>;
  const refusals = schemaRefusals(outcome.error.issues, question, '').map((each) => asAsked(each, name));
  const [first, ...others] = refusals;
  if (!first) throw new Error('the schema found a fault and named none', { cause: outcome.error });
  throw new Refusal([first, ...others]);
}

function asAsked(refusal: RefusalData, name: RequestName): RefusalData {
  const [top] = refusal.place.split(/[.[]/u);
  if (refusal.place === top || (top !== 'plan' && top !== 'cell')) {
    return { ...refusal, code: 'request-malformed', place: `question of "${name}": ${refusal.place}` };
  }
  return { ...refusal, place: refusal.place.replace(/^plan\.(?=(?:cell|rig|protocol)\b)/u, '') };
}

/** @throws Refusal `request-malformed`. */
export function refuseName(name: unknown): never {
  return refuse('request-malformed', {
    thing: 'request',
    place: 'call',
    value: typeof name === 'string' ? `"${name}"` : typeof name,
    remedy: 'give one of the names in the contract',
  });
}
