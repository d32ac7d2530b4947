// One way to ask the engine: an expected no becomes a notice, a bug too, and the asker gets the value or null.
import { bridge } from '../bridge.ts';
import type { Answer, Answers, Question, RequestName } from '../../src-main/contract/requests.ts';
import { notices } from './notices.svelte.ts';

/** Asks, and shows every refusal as a notice. @returns the answer, or null after a refusal or a fault. */
export async function askOrSay<N extends RequestName>(name: N, question: Question<N>): Promise<Answers[N] | null> {
  const answer = await ask(name, question);
  if (answer.ok) return answer.value;
  if ('refusals' in answer) notices.refuse(answer.refusals);
  else notices.fault(`The program failed at “${name}”: ${answer.fault}. The notebook is whole.`);
  return null;
}

/** Asks; the caller shows what comes back. A broken connection is a fault, never an exception. */
export async function ask<N extends RequestName>(name: N, question: Question<N>): Promise<Answer<Answers[N]>> {
  try {
    return await bridge.ask(name, question);
  } catch (error) {
    return { ok: false, fault: error instanceof Error ? error.message : String(error) };
  }
}
