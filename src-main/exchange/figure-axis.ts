/** A range with round ticks. */
export interface Axis {
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
}

/**
 * An axis over a range of values: three to five ticks at 1, 2 or 5 times a power of ten, the ends padded by 6 %. A range
 * of no width is opened to ±1.
 */
export function axisOver(low: number, high: number, padding = 0.06): Axis {
  const width = high - low;
  if (!(width > 0)) return axisOver(low - 1, low + 1, 0);
  const from = low - padding * width;
  const to = high + padding * width;
  const step = roundStep((to - from) / 4);
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  // One product and one rounding to the step's decimals: 0.1·3 must read 0.3.
  const decimals = Math.max(0, -Math.floor(Math.log10(step)));
  const ticks = Array.from({ length: last - first + 1 }, (_, i) => Number(((first + i) * step).toFixed(decimals)));
  return { low: from, high: to, ticks };
}

function roundStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  const part = rough / power;
  if (part <= 1) return power;
  if (part <= 2) return 2 * power;
  return part <= 5 ? 5 * power : 10 * power;
}
