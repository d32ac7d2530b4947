// Bias in words about size, and what is too small to be told from rounding.
import { describe, expect, it } from 'vitest';
import { aboveZeroWords, biasWords } from '../../src-renderer/text/bias.ts';
import { familyScale, orZero } from '../../src-renderer/text/rounding.ts';
import { readingRows } from '../../src-renderer/rehearse/reading-rows.ts';
import { familySeries } from '../../src-renderer/forecast/reading-family.ts';
import type { ReadingForecast } from '../../src-main/contract/results.ts';

/** Thin spaces as plain ones, so that the expectations can be typed. */
const plain = (text: string): string => text.replaceAll('\u2009', ' ');

describe('bias in words', () => {
  it.each([
    [-666, -941, '29 % too small'],
    [666, 941, '29 % too small'],
    [-315, -100, '215 % too large'],
    [315, 100, '215 % too large'],
    [0, -100, '100 % too small'],
    [-20, 100, '120 % too negative'],
    [20, -100, '120 % too positive'],
    [100, 100, 'no bias'],
    [100 + 5e-5, 100, 'no bias'],
    [200, 0, '–'],
    [200, 5e-5, '–'],
    [NaN, 100, '–'],
    [100, NaN, '–'],
    [50_000, 1, 'over 10000 % too large'],
  ])('reads %d, is %d pA: %s', (recorded, truth, words) => {
    expect(plain(biasWords(recorded, truth))).toBe(words);
  });

  it('a voltage is too positive or too negative: its size is no measure', () => {
    expect(plain(biasWords(-60, -75, 'mV'))).toBe('20 % too positive');
    expect(plain(biasWords(-90, -75, 'mV'))).toBe('20 % too negative');
  });

  it('a truth that is rounding beside the rest of its family has no bias', () => {
    expect(plain(biasWords(200, 0.01))).toMatch(/too large$/);
    expect(biasWords(200, 0.01, 'pA', 20_000)).toBe('–');
  });

  it('says what a difference above zero means for the family', () => {
    expect(aboveZeroWords([-900, -20, 1e-9], 'pA')).toBe('too small');
    expect(aboveZeroWords([900, 20, -1e-9], 'pA')).toBe('too large');
    expect(aboveZeroWords([900, -20], 'pA')).toBe('too positive');
    expect(aboveZeroWords([-70], 'mV')).toBe('too positive');
  });
});

describe('what is rounding', () => {
  it('is a millionth of the family’s largest value, and at least a ten-thousandth of the unit', () => {
    expect(familyScale([1, -2, NaN], null)).toBe(100);
    expect(familyScale([1, -2000], [Infinity * 0])).toBe(2000);
    expect(orZero(-1.03e-13, 100)).toBe(0);
    expect(orZero(1e-3, 2000)).toBe(0);
    expect(orZero(3e-3, 2000)).toBe(3e-3);
    expect(orZero(NaN, 100)).toBeNaN();
  });

  const reading: ReadingForecast = {
    reading: 'peak',
    name: 'peak',
    unit: 'pA',
    recorded: Float64Array.of(1.26e-5, 30, -666),
    truth: Float64Array.of(-1.03e-13, 0, -941),
    ladderValue: Float64Array.of(0, 1, 2),
  };
  it('reads 0 in the tables and the chart, and has no bias in per cent', () => {
    expect(readingRows([reading], 0)[0]).toMatchObject({ recorded: 0, truth: 0, bias: 0, words: '–' });
    expect(readingRows([reading], 1)[0]).toMatchObject({ recorded: 30, truth: 0, bias: 30, words: '–' });
    expect(plain(readingRows([reading], 2)[0]?.words ?? '')).toBe('29 % too small');
    expect(familySeries(reading, 'A', true)[0]?.y).toEqual([0, 30, 275]);
    expect(familySeries(reading, 'A', false)[0]?.y).toEqual([0, 30, -666]);
  });
});
