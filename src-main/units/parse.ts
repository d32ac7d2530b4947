import { refuse } from './refuse.ts';

/** Multiples of each dimension's SI unit, by the spellings a person types. */
const dimensions = {
  voltage: { V: 1, mV: 1e-3, µV: 1e-6, uV: 1e-6 },
  current: { A: 1, mA: 1e-3, µA: 1e-6, uA: 1e-6, nA: 1e-9, pA: 1e-12 },
  resistance: { Ω: 1, Ohm: 1, kΩ: 1e3, kOhm: 1e3, MΩ: 1e6, MOhm: 1e6, GΩ: 1e9, GOhm: 1e9 },
  capacitance: { F: 1, µF: 1e-6, uF: 1e-6, nF: 1e-9, pF: 1e-12, fF: 1e-15 },
  conductance: { S: 1, mS: 1e-3, µS: 1e-6, uS: 1e-6, nS: 1e-9, pS: 1e-12 },
  time: { s: 1, min: 60, ms: 1e-3, µs: 1e-6, us: 1e-6, ns: 1e-9 },
  length: { m: 1, cm: 1e-2, mm: 1e-3, µm: 1e-6, um: 1e-6, nm: 1e-9 },
  frequency: { Hz: 1, kHz: 1e3, MHz: 1e6 },
  share: { '1': 1, '%': 1e-2 },
} as const;

export type Dimension = keyof typeof dimensions;

const pattern = /^([+\-−]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?)\s*([^\d\s].*)?$/u;

/**
 * A quantity as typed ("-70 mV", "0.2 nA", "12MΩ"), in SI. A bare number takes `bareUnit`.
 * Accepts the minus sign U+2212, any white space before the unit, and both micro signs.
 * @throws Refusal `text-not-a-quantity` when there is no number, `unit-unknown` when the unit is not one of the dimension.
 */
export function quantity(
  text: string,
  of: { dimension: Dimension; bareUnit: string; thing: string; place: string },
): number {
  const found = pattern.exec(text.trim().replaceAll('\u03bc', 'µ'));
  const { thing, place } = of;
  if (!found?.[1])
    return refuse('text-not-a-quantity', {
      thing,
      place,
      value: `"${text}"`,
      remedy: `give a number with a unit, such as 1 ${of.bareUnit}`,
    });
  const units: Readonly<Record<string, number>> = dimensions[of.dimension];
  const unit = found[2] ?? of.bareUnit;
  const factor = Object.hasOwn(units, unit) ? units[unit] : undefined;
  if (factor === undefined) {
    return refuse('unit-unknown', {
      thing,
      place,
      value: `"${text}"`,
      remedy: `give one of ${Object.keys(units).join(', ')}`,
    });
  }
  const value = Number(found[1].replace('−', '-'));
  if (!Number.isFinite(value))
    return refuse('quantity-out-of-range', { thing, place, value: `"${text}"`, remedy: 'give a finite value' });
  // 12 × 1e-3 is not 0.012 in binary; 12 ÷ 1e3 is.
  return factor < 1 ? value / Math.round(1 / factor) : value * factor;
}
