import type { Answer, RequestName } from '../../contract/requests.ts';
import type { StartFolder } from './start-folder.ts';

const opens: ReadonlySet<string> = new Set<RequestName>(['notebook open']);
const makes: ReadonlySet<string> = new Set<RequestName>(['notebook create', 'notebook save as']);

/** A question with its notebook path checked and made absolute; questions without one pass as they are. */
export function withRealPaths(folder: StartFolder, name: string, question: unknown): Answer {
  if (!opens.has(name) && !makes.has(name)) return { ok: true, value: question };
  // What is no object, or has no path, or one that is no text, the engine refuses.
  if (typeof question !== 'object' || question === null || !('path' in question)) return { ok: true, value: question };
  if (typeof question.path !== 'string') return { ok: true, value: question };
  const real = opens.has(name) ? folder.existing(question.path) : folder.fresh(question.path);
  return real.ok ? { ok: true, value: { ...question, path: real.value } } : real;
}
