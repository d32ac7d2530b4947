import type { Range } from './series.ts';

/** The roundest step (1, 2 or 5 times a power of ten) that puts at most `most` ticks on the range. */
export function roundStep(range: Range, most: number): number {
  const width = Math.abs(range.to - range.from);
  if (!(width > 0) || !Number.isFinite(width)) return 1;
  const power = 10 ** (Math.floor(Math.log10(width / most)) - 1);
  for (const factor of [1, 2, 5, 10, 20, 50, 100, 200]) {
    const step = factor * power;
    if (ticks(range, step).length <= most) return step;
  }
  return width;
}

/** The multiples of the step within the range; each is rounded to the step's own digits, so 0.3 is 0.3. */
export function ticks(range: Range, step: number): number[] {
  const low = Math.min(range.from, range.to);
  const high = Math.max(range.from, range.to);
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  const found: number[] = [];
  for (let k = first; k <= last && found.length < 1000; k += 1) found.push(Number((k * step).toPrecision(12)));
  return found;
}

/** How many digits after the point tell neighbours a step apart. */
export function digitsOfStep(step: number): number {
  if (!(step > 0)) return 0;
  return Math.max(0, Math.min(12, -Math.floor(Math.log10(step) + 1e-9)));
}

/** A tick's number: fixed digits, a minus that is a minus, no minus before zero. */
export function tickLabel(value: number, step: number): string {
  const digits = digitsOfStep(step);
  const text = Math.abs(value).toFixed(digits);
  return value < 0 && Number(text) !== 0 ? `−${text}` : text;
}
