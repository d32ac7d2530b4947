/** U+2009: between a number and its unit. */
export const thinSpace = '\u2009';

/**
 * A number as the trade writes it: three significant digits unless told otherwise, the minus sign U+2212, no exponent
 * between 0.001 and 9999999. `plain(-34.125)` is "−34.1".
 */
export function plain(value: number, significant = 3): string {
  if (Number.isNaN(value)) return '–';
  if (!Number.isFinite(value)) return value > 0 ? '∞' : '−∞';
  const size = Math.abs(value);
  if (size === 0) return '0';
  const exponent = Math.floor(Math.log10(Number(size.toPrecision(significant))));
  const text =
    exponent < -3 || exponent > 6
      ? value.toExponential(significant - 1).replace('e+', 'e')
      : value.toFixed(Math.max(0, significant - 1 - exponent));
  return text.replaceAll('-', '−');
}

/** `withUnit(12, 'MΩ')` is "12.0 MΩ", a thin space between. */
export function withUnit(value: number, unit: string, significant = 3): string {
  return `${plain(value, significant)}${unit === '' ? '' : thinSpace}${unit}`;
}
