// Numbers on show and numbers as typed. The one place that formats, the one place that reads.
import { plainUnit, unitOf, type UnitEntry } from './units.ts';

/** Between a number and its unit; never broken. */
export const thinSpace = '\u2009';
export const minus = '−';

/** The number as it was given: as many digits as it has, no more than fifteen. */
export function givenNumber(value: number): string {
  if (!Number.isFinite(value)) return '–';
  // Beyond these a plain decimal would be longer than the field.
  const plain = Math.abs(value) < 1e15 && (value === 0 || Math.abs(value) >= 1e-6);
  const text = plain ? decimal(value) : String(value).replace('e+', 'e');
  return text.replaceAll('-', minus);
}

function decimal(value: number): string {
  const text = String(value);
  return text.includes('e') ? value.toFixed(20).replace(/\.?0+$/, '') : text;
}

/** A given number with its unit: "12 MΩ". */
export function given(value: number, unit: string): string {
  return withUnit(givenNumber(value), unit);
}

/**
 * A computed number to three significant digits (more when `digits` says so): "0.412", "−34.1", "605".
 * Whole numbers above the digits keep their figures: 1234 stays 1234, for a rounded 1230 would look measured.
 */
export function figureNumber(value: number, digits = 3): string {
  if (Number.isNaN(value)) return '–';
  if (!Number.isFinite(value)) return value > 0 ? '∞' : `${minus}∞`;
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e6 || size < 1e-4) return power(value, digits);
  // Of the rounded size: 0.09999 to three digits is 0.100, not 0.1000.
  const rounded = Number(size.toPrecision(digits));
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(rounded)));
  const text = value.toFixed(decimals);
  return (Number(text) === 0 ? '0' : text).replace('-', minus);
}

function power(value: number, digits: number): string {
  const [mantissa = '0', exponent = '0'] = value.toExponential(digits - 1).split('e');
  const raised = exponent
    .replace('+', '')
    .replace('-', '⁻')
    .replace(/\d/g, (d) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(d)] ?? d);
  return `${mantissa.replace('-', minus)}${thinSpace}×${thinSpace}10${raised}`;
}

/** A computed number with its unit. */
export function figure(value: number, unit: string, digits = 3): string {
  return withUnit(figureNumber(value, digits), unit);
}

/** With a plus where it is above zero: for errors and levels beside other levels. */
export function signedFigure(value: number, unit: string, digits = 3): string {
  return (value > 0 ? '+' : '') + figure(value, unit, digits);
}

/** A share of 1 as per cent. */
export function percent(share: number): string {
  if (!Number.isFinite(share)) return `–${thinSpace}%`;
  const value = 100 * share;
  // 99.96 % must not read as 100 %: something is outside.
  const text =
    share < 1 && value > 99.95 ? '>99.9' : value >= 99.5 && share < 1 ? value.toFixed(1) : figureNumber(value, 2);
  return `${text}${thinSpace}%`;
}

/** A computed number in the prefix that keeps it between 1 and 1000: 1390 pA is "1.39 nA". */
export function scaled(value: number, unit: string, digits = 3): string {
  const ladder = ladders.find((l) => l.includes(unit));
  if (ladder === undefined || value === 0 || !Number.isFinite(value)) return figure(value, unit, digits);
  let at = ladder.indexOf(unit);
  let number = value;
  while (Math.abs(number) >= 1000 && at < ladder.length - 1) {
    number /= 1000;
    at++;
  }
  while (Math.abs(number) < 1 && at > 0) {
    number *= 1000;
    at--;
  }
  return figure(number, ladder[at] ?? unit, digits);
}

const ladders: readonly (readonly string[])[] = [
  ['fA', 'pA', 'nA', 'µA'],
  ['µV', 'mV', 'V'],
  ['Ω', 'kΩ', 'MΩ', 'GΩ'],
  ['fF', 'pF', 'nF', 'µF'],
  ['fC', 'pC', 'nC'],
  ['Hz', 'kHz', 'MHz'],
  ['pS', 'nS', 'µS', 'mS'],
];

/** Seconds as people say them: "3 s", "1 min 30 s", "2 h 5 min". */
export function timeLeft(seconds: number): string {
  const s = Math.max(1, Math.round(seconds));
  const pair = (big: number, bigUnit: string, small: number, smallUnit: string): string =>
    small === 0 ? `${big}${thinSpace}${bigUnit}` : `${big}${thinSpace}${bigUnit} ${small}${thinSpace}${smallUnit}`;
  if (s < 60) return `${s}${thinSpace}s`;
  if (s < 3600) return pair(Math.floor(s / 60), 'min', s % 60, 's');
  return pair(Math.floor(s / 3600), 'h', Math.floor((s % 3600) / 60), 'min');
}

function withUnit(number: string, unit: string): string {
  return unit === '' ? number : `${number}${thinSpace}${unit}`;
}

export type Parsed = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly words: string };

const quantityForm = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)\s*(.*)$/i;

/** The least and the most that a field takes. */
export interface Room {
  readonly least: number;
  readonly most: number;
}
const anywhere: Room = { least: -Infinity, most: Infinity };

/**
 * Reads what a person typed into a field of the given unit. Without a unit the number is in the field's own; with
 * another of the same kind it is converted ("0.2 nA" into pA is 200); anything else is refused in words.
 */
export function parseQuantity(text: string, unit: string, room: Room = anywhere): Parsed {
  const plain = text
    .replaceAll(minus, '-')
    .replaceAll('–', '-')
    .replaceAll(/[\u2009\u00a0\u202f]/g, ' ')
    .trim();
  if (plain === '') return { ok: false, words: unit === '' ? 'Type a number.' : `Type a number, such as 12 ${unit}.` };
  if (/^[+-]?\d+,\d+/.test(plain)) return { ok: false, words: 'Write the decimal with a point, as in 12.5.' };
  const parts = quantityForm.exec(plain);
  if (parts?.[1] === undefined) return { ok: false, words: `“${text.trim()}” is not a number.` };
  const number = parts[1];
  const typed = parts[2]?.trim() ?? '';
  // "0x10", "1/3", "12-14": what follows the number is no unit, and the number alone would be another one.
  if (/^[x/*^,:-]|\d/i.test(typed.replace(/(?:\^?[23])(?=\/|$)/g, ''))) {
    return { ok: false, words: `“${text.trim()}” is not a number. Write it out, as in 12.5.` };
  }
  if (!Number.isFinite(Number(number))) return { ok: false, words: `${number} is too large.` };
  if (typed === '' || plainUnit(typed) === unit) return { ok: true, value: Number(number) };
  return convert(number, typed, unit, room);
}

function convert(number: string, typed: string, unit: string, room: Room): Parsed {
  const from = unitOf(typed);
  const to = unitOf(unit);
  const example = unit === '' ? number : `${number} ${unit}`;
  if (from === null && typed === 'K' && to?.kind === 'temperature') {
    const celsius = Number((Number(number) - 273.15).toFixed(2));
    return { ok: false, words: `Temperatures are in °C here: ${number} K is ${givenNumber(celsius)} °C.` };
  }
  if (from === null) {
    // No number is offered that the field would refuse next.
    const fits = Number(number) >= room.least && Number(number) <= room.most;
    return { ok: false, words: `${typed} is not a unit. ${fits ? `Try ${example}` : `This is in ${unit}`}.` };
  }
  if (to?.kind !== from.kind) {
    const asked = unit === '' ? 'a plain number' : `a ${to?.kind ?? 'quantity'} in ${unit}`;
    return { ok: false, words: `${from.symbol} is a unit of ${from.kind}; this is ${asked}.` };
  }
  return { ok: true, value: converted(number, from, to) };
}

/** By moving the decimal point in the text, so that 0.07 nA is 70 pA and not 70.00000000000001. */
function converted(number: string, from: UnitEntry, to: UnitEntry): number {
  const [mantissa = '0', exponent = '0'] = number.toLowerCase().split('e');
  const moved = Number(`${mantissa}e${Number(exponent) + from.power - to.power}`);
  return (moved * (from.factor ?? 1)) / (to.factor ?? 1);
}
