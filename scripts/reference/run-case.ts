import type { ReferenceCase, ReferenceSweep } from '../../src-main/exchange/reference-case.ts';
import { differenceOf, noDifference, storedFigures, worseOf, type Difference } from './compare.ts';
import { figuresOf, type Figures } from './figures.ts';

/** Coarsest and finest step tried, µs. */
const coarsest_us = 25;
const finest_us = 25 / 64;
/** A sweep is fine enough when its own error, as halving the step tells it, is this part of the tolerance. */
const ownError = 0.2;

export interface CaseResult {
  readonly id: string;
  readonly title: string;
  readonly difference: Difference;
  /** The finest step any sweep needed, µs. */
  readonly step_us: number;
  /** What plans cannot express, of sweeps left out. */
  readonly notCovered: readonly string[];
  readonly passed: boolean;
}

/** Computes a case and compares all traces and measures. A case with a sweep left out has not passed. */
export function runCase(given: ReferenceCase): CaseResult {
  let difference = noDifference;
  let step_us = coarsest_us;
  const notCovered: string[] = [];
  for (const sweep of given.sweeps) {
    if (sweep.kind === 'not covered') {
      if (!notCovered.includes(sweep.what)) notCovered.push(sweep.what);
      continue;
    }
    const figures = fineEnough(sweep, given.gated);
    difference = worseOf(difference, differenceOf(sweep, given.gated, figures, storedFigures(sweep)));
    step_us = Math.min(step_us, figures.step_us);
  }
  const passed = notCovered.length === 0 && difference.worst <= 1;
  return { id: given.id, title: given.title, difference, step_us, notCovered, passed };
}

/**
 * The sweep at a step that its own results call fine enough; the stored answers have no say. The scheme is of second
 * order, so what is left at half the step is a third of the change.
 */
function fineEnough(sweep: ReferenceSweep, gated: boolean): Figures {
  let coarse = figuresOf(sweep, coarsest_us);
  for (let step = coarsest_us / 2; ; step /= 2) {
    const fine = figuresOf(sweep, step);
    const left = differenceOf(sweep, gated, coarse, fine).worst / 3;
    if (left <= ownError || step <= finest_us) return fine;
    coarse = fine;
  }
}
