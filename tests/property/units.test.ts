// Units: round trips and refusals. SI prefixes: BIPM, The International System of Units, 9th edition (2019), table 7.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { plain, withUnit } from '../../src-main/units/format.ts';
import { quantity } from '../../src-main/units/parse.ts';
import { fromSi, toSi, type TradeUnit } from '../../src-main/units/si.ts';

const units: TradeUnit[] = [
  'mV',
  'pA',
  'nA',
  'nS',
  'pF',
  'ms',
  'us',
  'um',
  'um2',
  'fC',
  'MOhm',
  'kOhm',
  'uF_cm2',
  'mS_cm2',
  'Ohm_cm',
];
const voltage = { dimension: 'voltage', bareUnit: 'mV', thing: 'holding level', place: 'lane A' } as const;

describe('trade units and SI', () => {
  it('there and back changes nothing beyond two roundings', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...units),
        fc.double({ noNaN: true, min: -1e9, max: 1e9 }).filter((v) => v === 0 || Math.abs(v) > 1e-200),
        (unit, value) => {
          expect(Math.abs(fromSi(toSi(value, unit), unit) - value)).toBeLessThanOrEqual(
            2 * Number.EPSILON * Math.abs(value),
          );
        },
      ),
    );
  });

  it('are the factors of the SI brochure', () => {
    expect(toSi(-70, 'mV')).toBe(-0.07);
    expect(toSi(12, 'MOhm')).toBe(12e6);
    expect(toSi(1, 'uF_cm2')).toBe(0.01);
    expect(toSi(120, 'mS_cm2')).toBe(1200);
    expect(toSi(100, 'Ohm_cm')).toBe(1);
    expect(toSi(3, 'pF')).toBe(3e-12);
  });
});

describe('typed quantities', () => {
  it.each([
    ['-70 mV', -0.07],
    ['−70mV', -0.07],
    ['-0.07 V', -0.07],
    ['-70', -0.07],
    ['1e3 µV', 1e-3],
    ['250 \u03bcV', 250e-6],
  ])('reads %s', (text, value) => {
    expect(quantity(text, voltage)).toBe(value);
  });

  it.each([
    ['12 MOhmm', 'unit-unknown'],
    ['12 pA', 'unit-unknown'],
    ['twelve', 'text-not-a-quantity'],
    ['', 'text-not-a-quantity'],
    ['1,5 mV', 'unit-unknown'],
    ['1e999 mV', 'quantity-out-of-range'],
    ['5 toString', 'unit-unknown'],
  ])('refuses %s', (text, code) => {
    expect(() => quantity(text, voltage)).toThrow(
      expect.objectContaining({ data: expect.objectContaining({ code, place: 'lane A' }) }),
    );
  });
});

describe('numbers on show', () => {
  it.each([
    [-34.125, '−34.1'],
    [0, '0'],
    [999.9, '1000'],
    [0.0123, '0.0123'],
    [12, '12.0'],
    [5650, '5650'],
    [1.5e-9, '1.50e−9'],
    [NaN, '–'],
  ])('%s reads %s', (value, text) => {
    expect(plain(value)).toBe(text);
  });

  it('puts a thin space before the unit', () => {
    expect(withUnit(-70, 'mV')).toBe('−70.0\u2009mV');
  });
});
