// How far a reading is from the truth, in words about its size: a signed per cent of a negative current misleads.
import { figure } from './quantity.ts';
import { familyScale, orZero } from './rounding.ts';

/** A ratio above this says no more than that it is large. */
const mostPercent = 10_000;

export type BiasUnit = 'pA' | 'mV' | 'fC' | 'mV·ms';

/**
 * "29 % too small": the recorded value beside the true one, by size. Where the two differ in sign, and for voltages,
 * whose size means nothing, by direction: "12 % too positive". "–" where the truth is 0, or rounding beside `scale`.
 *
 * @param scale the largest value of the family; 100 of the unit when not given.
 */
export function biasWords(recorded: number, truth: number, unit: BiasUnit = 'pA', scale = familyScale()): string {
  const reads = orZero(recorded, scale);
  const is = orZero(truth, scale);
  if (Number.isNaN(reads) || Number.isNaN(is) || is === 0) return '–';
  const share = orZero((reads - is) / is, 1);
  if (share === 0) return 'no bias';
  const percent = 100 * Math.abs(share);
  const amount = percent > mostPercent ? `over ${figure(mostPercent, '%')}` : figure(percent, '%', 2);
  return `${amount} ${directionWords(reads, is, unit)}`;
}

function directionWords(reads: number, is: number, unit: BiasUnit): string {
  if (unit === 'mV' || unit === 'mV·ms' || reads * is < 0) return reads > is ? 'too positive' : 'too negative';
  return Math.abs(reads) > Math.abs(is) ? 'too large' : 'too small';
}

/** What a difference above zero means for this family: "too small" where all true values are negative. */
export function aboveZeroWords(truth: ArrayLike<number>, unit: BiasUnit): string {
  if (unit === 'mV' || unit === 'mV·ms') return 'too positive';
  const scale = familyScale(truth);
  const values = Array.from(truth, (value) => orZero(value, scale));
  if (values.every((value) => !(value < 0))) return 'too large';
  return values.every((value) => !(value > 0)) ? 'too small' : 'too positive';
}
