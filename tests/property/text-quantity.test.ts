// Numbers on show and numbers as typed: always true, whatever the numbers.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  figure,
  figureNumber,
  given,
  parseQuantity,
  percent,
  scaled,
  timeLeft,
} from '../../src-renderer/text/quantity.ts';
import { units } from '../../src-renderer/text/units.ts';

const symbols = units.map((u) => u.symbol);
const finite = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 });

describe('a quantity written and read again', () => {
  it('is the same number to the last bit, in every unit', () => {
    fc.assert(
      fc.property(finite, fc.constantFrom('', ...symbols), (value, unit) => {
        const read = parseQuantity(given(value, unit), unit);
        expect(read).toEqual({ ok: true, value: value + 0 === 0 ? expect.closeTo(0, 12) : value });
      }),
      { numRuns: 2000 },
    );
  });

  it('as a computed figure differs by less than half a unit of its third digit', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, min: 1e-3, max: 1e5 }), (value) => {
        const read = parseQuantity(figure(value, 'mV'), 'mV');
        if (!read.ok) throw new Error(read.words);
        // Three significant digits: half of 1 in the third; the last factor is binary rounding.
        expect(Math.abs(read.value / value - 1)).toBeLessThan(0.5e-2 * (1 + 1e-9));
      }),
    );
  });
});

describe('units as people type them', () => {
  it.each([
    ['12 MΩ', 'MΩ', 12],
    ['12MOhm', 'MΩ', 12],
    ['12 Mohm', 'MΩ', 12],
    ['0.012 GΩ', 'MΩ', 12],
    ['0.2 nA', 'pA', 200],
    ['0.07 nA', 'pA', 70],
    ['200', 'pA', 200],
    ['−70 mV', 'mV', -70],
    ['-0.07 V', 'mV', -70],
    ['+40 mV', 'mV', 40],
    ['10 us', 'ms', 0.01],
    ['2 min', 's', 120],
    ['1 Ω·m', 'Ω·cm', 100],
    ['0.1 ohm*m', 'Ω·cm', 10],
    ['500 pS/um2', 'mS/cm²', 50],
    ['1 uF/cm2', 'µF/cm²', 1],
    ['22 C', '°C', 22],
    ['22 deg C', '°C', 22],
    ['70%', '%', 70],
    ['1e3 pA', 'nA', 1],
    ['.5 mV', 'mV', 0.5],
    ['\u03bcV', 'mV', null],
    ['5 \u03bcV', 'mV', 0.005],
  ])('%s into %s is %s', (typed, unit, value) => {
    const read = parseQuantity(typed, unit);
    expect(read.ok ? read.value : null).toBe(value);
  });

  it.each([
    ['12 MOhmm', 'MΩ', 'MOhmm is not a unit. Try 12 MΩ.'],
    ['12 mV', 'MΩ', 'mV is a unit of voltage; this is a resistance in MΩ.'],
    ['12,5', 'mV', 'Write the decimal with a point, as in 12.5.'],
    ['', 'MΩ', 'Type a number, such as 12 MΩ.'],
    ['many', 'mV', '“many” is not a number.'],
    ['0x10', 'MΩ', '“0x10” is not a number. Write it out, as in 12.5.'],
    ['1/3', 'mV', '“1/3” is not a number. Write it out, as in 12.5.'],
    ['10-20', 'ms', '“10-20” is not a number. Write it out, as in 12.5.'],
    ['295 K', '°C', 'Temperatures are in °C here: 295 K is 21.85 °C.'],
    ['5 mV', '', 'mV is a unit of voltage; this is a plain number.'],
    ['1e999', 'mV', '1e999 is too large.'],
  ])('“%s” into %s is refused in words that lead on', (typed, unit, words) => {
    expect(parseQuantity(typed, unit)).toEqual({ ok: false, words });
  });

  it('keeps m and M apart: a milliohm is not a megohm', () => {
    expect(parseQuantity('12 mΩ', 'MΩ')).toEqual({ ok: false, words: expect.stringContaining('not a unit') });
  });
});

describe('figures on show', () => {
  it.each([
    [12, '12.0'],
    [-34.123, '−34.1'],
    [0.41234, '0.412'],
    [605, '605'],
    [0.09999, '0.100'],
    [9.999, '10.0'],
    [1234.5, '1235'],
    [0, '0'],
    [-0.00001, '−1.00\u2009×\u200910⁻⁵'],
    [NaN, '–'],
    [Infinity, '∞'],
  ])('%s reads %s', (value, words) => {
    expect(figureNumber(value)).toBe(words);
  });

  it('has a thin space before the unit and never a hyphen for a minus', () => {
    fc.assert(
      fc.property(finite, fc.constantFrom(...symbols), (value, unit) => {
        const words = figure(value, unit);
        expect(words.endsWith(`\u2009${unit}`)).toBe(true);
        expect(words.slice(0, -unit.length)).not.toContain('-');
      }),
    );
  });

  it('picks the prefix that keeps one to three digits before the point', () => {
    expect(scaled(1390, 'pA')).toBe('1.39\u2009nA');
    expect(scaled(0.0123, 'mV')).toBe('12.3\u2009µV');
    expect(scaled(96.1, 'Hz')).toBe('96.1\u2009Hz');
  });

  it('does not call a share complete that is not', () => {
    expect(percent(1)).toBe('100\u2009%');
    expect(percent(0.9999)).toBe('>99.9\u2009%');
    expect(percent(0.4123)).toBe('41\u2009%');
    expect(percent(0)).toBe('0\u2009%');
  });

  it('says time left as people do', () => {
    expect([3, 90, 7500].map(timeLeft)).toEqual(['3\u2009s', '1\u2009min 30\u2009s', '2\u2009h 5\u2009min']);
  });
});
