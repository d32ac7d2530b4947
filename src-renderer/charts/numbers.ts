import { axisLabel, xAt, type Axis, type Series } from './series.ts';

function cell(text: string): string {
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

function sameAbscissa(a: Series, b: Series): boolean {
  if (a.y.length !== b.y.length) return false;
  for (let i = 0; i < a.y.length; i += 1) if (xAt(a, i) !== xAt(b, i)) return false;
  return true;
}

/**
 * The chart's numbers as CSV (RFC 4180, full precision, empty where there is none): series that share their abscissa
 * share its column, others bring their own.
 */
export function chartNumbers(series: readonly Series[], x: Axis, y: Axis): string {
  const columns: { head: string; length: number; at: (i: number) => number }[] = [];
  let last: Series | undefined;
  for (const one of series) {
    if (!last || !sameAbscissa(last, one)) {
      columns.push({ head: axisLabel(x), length: one.y.length, at: (i) => Number(xAt(one, i).toPrecision(12)) });
    }
    columns.push({ head: `${one.label}, ${axisLabel(y)}`, length: one.y.length, at: (i) => one.y[i] ?? NaN });
    last = one;
  }
  const rows = Math.max(0, ...columns.map((column) => column.length));
  const lines = [columns.map((column) => cell(column.head)).join(',')];
  for (let i = 0; i < rows; i += 1) {
    const numbers = columns.map((column) => (i < column.length ? column.at(i) : NaN));
    lines.push(numbers.map((value) => (Number.isFinite(value) ? String(value) : '')).join(','));
  }
  return `${lines.join('\r\n')}\r\n`;
}
