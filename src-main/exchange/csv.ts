// Traces as tables for any spreadsheet or script: one column per trace; one file per sweep, or one for all.
import type { TextFile } from '../contract/requests.ts';
import type { Trace } from '../contract/results.ts';
import { refuse } from '../units/refuse.ts';

/**
 * CSV files of a rehearsal's traces, one per sweep. First column `time_ms` from the sweep's start; then one column per
 * trace, named for it with its unit, such as `recording:A (pA)`. Decimal points, commas between columns, ten
 * significant digits, an empty field where there is no number.
 *
 * Traces of one sweep that start or step differently get their own file.
 *
 * @throws Refusal `too-large` for a sweep of more than 25 million fields.
 * @source RFC 4180 (2005): lines end in CR LF; names with a comma or quote are quoted.
 */
export function tracesToCsv(plan: { readonly name: string }, traces: readonly Trace[]): TextFile[] {
  const sorted = tablesOf(traces);
  const digits = String(Math.max(0, ...sorted.map(sweepOf)) + 1).length;
  const names = new Map<string, number>();
  return sorted.map((table) => {
    const stem = `${fileStem(plan.name)}-sweep-${String(sweepOf(table) + 1).padStart(digits, '0')}`;
    const before = names.get(stem) ?? 0;
    names.set(stem, before + 1);
    return { name: `${stem}${before === 0 ? '' : `-${before + 1}`}.csv`, text: tableText(table) };
  });
}

/**
 * All sweeps in one CSV file, one below the other: `sweep` (from 1), `time_ms` from that sweep's start, then the columns
 * of `tracesToCsv`. A trace that a sweep does not have leaves its field empty; traces of a sweep that start or step
 * differently are told one after the other.
 *
 * @returns one file; the files of `tracesToCsv` where one text could not hold all of it.
 * @throws Refusal as `tracesToCsv`.
 */
export function tracesToOneCsv(plan: { readonly name: string }, traces: readonly Trace[]): TextFile[] {
  const columns = [...new Set(traces.map(columnName))];
  const tables = tablesOf(traces);
  const rows = tables.reduce((total, table) => total + rowsOf(table), 0);
  if (rows * (columns.length + 2) > mostFields) return tracesToCsv(plan, traces);
  const lines = [['sweep', 'time_ms', ...columns.map(quoted)].join(',')];
  for (const table of tables) {
    const sweep = String(sweepOf(table) + 1);
    const inOrder = columns.map((name) => table.find((trace) => columnName(trace) === name));
    for (let i = 0; i < rowsOf(table); i += 1) {
      lines.push([sweep, timeOf(table, i), ...inOrder.map((trace) => number(trace?.values[i] ?? NaN))].join(','));
    }
  }
  return [{ name: `${fileStem(plan.name)}-traces.csv`, text: `${lines.join('\r\n')}\r\n` }];
}

/** Traces that share their sweep and their times, in the order of the sweeps. */
function tablesOf(traces: readonly Trace[]): Trace[][] {
  const tables = new Map<string, Trace[]>();
  for (const trace of traces) {
    const key = `${trace.sweep} ${trace.start_ms} ${trace.interval_ms}`;
    tables.set(key, [...(tables.get(key) ?? []), trace]);
  }
  return [...tables.values()].sort((a, b) => sweepOf(a) - sweepOf(b));
}

/** A field takes 17 characters at most, "-1.234567891e-123", and its comma. A text holds 2²⁹ characters, ours to be safe fewer. */
const mostFields = 25_000_000;

/** @throws Refusal `too-large` for a table that one text could not hold. */
function refuseTooLong(sweep: number, rows: number, columns: number): void {
  if (rows * columns <= mostFields) return;
  refuse('too-large', {
    thing: 'table of traces',
    place: `sweep ${sweep + 1}`,
    value: `${rows} rows of ${columns} columns, at most ${mostFields} fields`,
    remedy: 'sample more coarsely, or split the sweep into several',
  });
}

function sweepOf(table: readonly Trace[]): number {
  return table[0]?.sweep ?? 0;
}

function rowsOf(table: readonly Trace[]): number {
  return Math.max(0, ...table.map(({ values }) => values.length));
}

function timeOf(table: readonly Trace[], row: number): string {
  const first = table[0];
  return first === undefined ? '' : number(first.start_ms + row * first.interval_ms);
}

function columnName({ key, unit }: Trace): string {
  return `${key} (${unit})`;
}

function tableText(table: readonly Trace[]): string {
  const rows = rowsOf(table);
  refuseTooLong(sweepOf(table), rows, table.length + 1);
  const lines = [['time_ms', ...table.map((trace) => quoted(columnName(trace)))].join(',')];
  for (let i = 0; i < rows; i += 1) {
    lines.push([timeOf(table, i), ...table.map(({ values }) => number(values[i] ?? NaN))].join(','));
  }
  return `${lines.join('\r\n')}\r\n`;
}

/** Ten significant digits, no padding: beyond what any rehearsal is good for. */
function number(value: number): string {
  return Number.isFinite(value) ? String(Number(value.toPrecision(10))) : '';
}

function quoted(field: string): string {
  return /[",\r\n]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field;
}

/** A name as part of a file's name on any system: letters, digits, dots and hyphens. */
export function fileStem(name: string): string {
  const plain = name
    .normalize('NFKD')
    .replace(/[^\p{Letter}\p{Number}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .toLowerCase();
  return plain.slice(0, 80) || 'plan';
}
