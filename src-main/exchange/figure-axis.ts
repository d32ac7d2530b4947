/** A range with round ticks. */
export interface Axis {
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
}

/**
 * An axis over a range of values: the finest ticks at 1, 2 or 5 times a power of ten of which at most five fit, the ends
 * padded by 6 %. A range of no width is opened to ±1.
 */
export function axisOver(low: number, high: number, padding = 0.06): Axis {
  const width = high - low;
  if (!(width > 0)) return axisOver(low - 1, low + 1, 0);
  const from = low - padding * width;
  const to = high + padding * width;
  let exponent = Math.floor(Math.log10(to - from)) - 1;
  for (;;) {
    for (const part of [1, 2, 5]) {
      const ticks = ticksEvery(part, exponent, from, to);
      if (ticks.length <= mostTicks) return { low: from, high: to, ticks };
    }
    exponent += 1;
  }
}

const mostTicks = 5;

/** Multiples of part·10^exponent within a range: one product and one rounding to its decimals, so that 0.1·3 reads 0.3. */
function ticksEvery(part: number, exponent: number, from: number, to: number): number[] {
  const step = part * 10 ** exponent;
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, i) =>
    Number(((first + i) * step).toFixed(Math.max(0, -exponent))),
  );
}
