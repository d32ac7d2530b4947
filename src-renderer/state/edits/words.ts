// What undo will say it takes back.
import type { PlanDocument } from '../../../src-main/contract/documents.ts';
import { givenNumber, thinSpace } from '../../text/quantity.ts';

/** What undo will say, known at once or only from the plans before and after. */
export type ChangeWords = string | ((before: PlanDocument, after: PlanDocument) => string);

/** "access resistance 12 → 15 MΩ". */
export function changeWords(what: string, before: number, after: number, unit: string): string {
  const withUnit = unit === '' ? '' : `${thinSpace}${unit}`;
  return `${what} ${givenNumber(before)} → ${givenNumber(after)}${withUnit}`;
}

/** For plan.change: compares what the two plans hold at the same place. */
export function numberWords<P>(what: string, unit: string, read: (plan: P) => number): (before: P, after: P) => string {
  return (before, after) => changeWords(what, read(before), read(after), unit);
}
