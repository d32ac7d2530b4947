import type { Trace } from '../contract/results.ts';
import type { Notebook } from './open.ts';

interface TraceRow extends Omit<Trace, 'values'> {
  readonly samples: Buffer;
}

/** Runs inside the caller's `change`. */
export function insertTraces(notebook: Notebook, rehearsalId: number, traces: readonly Trace[]): void {
  const insert = notebook.db.prepare(
    'INSERT INTO trace (rehearsal_id, sweep, key, unit, start_ms, interval_ms, samples) VALUES (?, ?, ?, ?, ?, ?, ?)',
  );
  for (const { sweep, key, unit, start_ms, interval_ms, values } of traces) {
    // A view of the same bytes; every platform Holdfast runs on is little endian.
    const samples = Buffer.from(values.buffer, values.byteOffset, values.byteLength);
    insert.run(rehearsalId, sweep, key, unit, start_ms, interval_ms, samples);
  }
}

/** A rehearsal's traces at full resolution, by sweep and in the order stored; all sweeps, or those named. */
export function readTraces(notebook: Notebook, rehearsalId: number, sweeps?: readonly number[]): Trace[] {
  const wanted = sweeps && JSON.stringify(sweeps);
  const filter = wanted === undefined ? '' : 'AND sweep IN (SELECT value FROM json_each(?))';
  return notebook.db
    .prepare<(number | string)[], TraceRow>(
      `SELECT sweep, key, unit, start_ms, interval_ms, samples FROM trace WHERE rehearsal_id = ? ${filter}
       ORDER BY sweep, trace_id`,
    )
    .all(...(wanted === undefined ? [rehearsalId] : [rehearsalId, wanted]))
    .map(({ samples, ...rest }) => ({ ...rest, values: new Float64Array(new Uint8Array(samples).buffer) }));
}
