// Rate descriptions as functions of V. Formulas keep their papers' units: V in mV, rates in 1/ms.
import type { Rate } from '../contract/documents.ts';

/**
 * x / (1 − exp(−x)), with its limit 1 at x = 0. Never loses digits near the singular point: below |x| = 1e-5 the
 * series 1 + x/2 + x²/12 (next term x⁴/720, far below rounding), else `expm1`.
 */
export function quotient(x: number): number {
  return Math.abs(x) < 1e-5 ? 1 + x / 2 + (x * x) / 12 : x / -Math.expm1(-x);
}

/**
 * The function of V that a rate description stands for.
 *
 *     exp       A·exp((V − V0)/k)
 *     logistic  A / (1 + exp((V − V0)/k)); falls with V for k > 0
 *     linexp    A·(V − V0) / (1 − exp(−(V − V0)/k)); A·k at V = V0
 *
 * with const, sum, product, reciprocal and power of those. V in mV; the result has the unit of the description.
 *
 * @source The forms of Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544, eqs 12–13, 15–16, 20–21 (from memory).
 */
export function rateOf(rate: Rate): (V: number) => number {
  switch (rate.kind) {
    case 'const': {
      const { value } = rate;
      return () => value;
    }
    case 'exp': {
      const { A, V0, k } = rate;
      return (V) => A * Math.exp((V - V0) / k);
    }
    case 'logistic': {
      const { A, V0, k } = rate;
      return (V) => A / (1 + Math.exp((V - V0) / k));
    }
    case 'linexp': {
      const { A, V0, k } = rate;
      return (V) => A * k * quotient((V - V0) / k);
    }
    case 'sum': {
      const parts = rate.of.map(rateOf);
      return (V) => parts.reduce((total, part) => total + part(V), 0);
    }
    case 'product': {
      const parts = rate.of.map(rateOf);
      return (V) => parts.reduce((total, part) => total * part(V), 1);
    }
    case 'reciprocal': {
      const part = rateOf(rate.of);
      return (V) => 1 / part(V);
    }
    case 'power': {
      const part = rateOf(rate.of);
      const { exponent } = rate;
      return (V) => part(V) ** exponent;
    }
    default:
      return rate satisfies never;
  }
}
