import { refuse } from '../units/refuse.ts';
import { pathText } from './field-words.ts';

/** Levels of groups and lists. Design choice: a whole plan takes about 15; schemas and hashes walk documents by recursion. */
const deepest = 100;
/** Steps of the path that a refusal names. */
const told = 12;

interface Step {
  readonly value: object;
  readonly key: string | number;
  readonly above: Step | null;
  readonly level: number;
}

/**
 * Passes a value whose groups and lists lie at most 100 levels deep. Without recursion itself.
 *
 * @throws Refusal `too-large` with the beginning of the path to the first that lies deeper.
 */
export function refuseDeep(value: unknown, place: string): void {
  const waiting: Step[] = [];
  const look = (inner: unknown, key: string | number, above: Step | null): void => {
    if (typeof inner !== 'object' || inner === null || ArrayBuffer.isView(inner)) return;
    const step = { value: inner, key, above, level: (above?.level ?? 0) + 1 };
    if (step.level > deepest) refuseStep(step, place);
    waiting.push(step);
  };
  look(value, '', null);
  for (let step = waiting.pop(); step !== undefined; step = waiting.pop()) {
    if (Array.isArray(step.value)) for (const [i, inner] of step.value.entries()) look(inner, i, step);
    else for (const [key, inner] of Object.entries(step.value)) look(inner, key, step);
  }
}

function refuseStep(deep: Step, place: string): never {
  const path: (string | number)[] = [];
  for (let step: Step = deep; step.above !== null; step = step.above) path.unshift(step.key);
  const inside = `${pathText(path.slice(0, told))} ...`;
  return refuse('too-large', {
    thing: 'nesting of the document',
    place: place === '' ? inside : `${place}: ${inside}`,
    value: `more than ${deepest} levels deep`,
    remedy: 'write the part with fewer levels: a sum or product may have 16 members',
  });
}
