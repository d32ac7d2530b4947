import type { TextFile } from '../contract/requests.ts';
import type { StoredRehearsal } from '../contract/results.ts';
import { fileStem } from './csv.ts';

/** Raised when the meaning of an exported forecast changes. */
export const forecastFormat = 1;

/**
 * A stored rehearsal's forecast as JSON, with the protocol it was made for and the hashes and versions that tell where
 * it comes from. Units stand in the field names; arrays over compartments are in grid order, those over sweeps in sweep
 * order. `null` in an array: no number there (not settled within the window, a reading that could not be taken).
 */
export function forecastToJson(stored: Omit<StoredRehearsal, 'plan'>): TextFile {
  const { summary, forecast, protocol } = stored;
  const document = { kind: 'forecast', format: forecastFormat, summary, forecast, protocol };
  return { name: `${fileStem(summary.planName)}-forecast.json`, text: `${JSON.stringify(document, plainArrays, 2)}\n` };
}

function plainArrays(_key: string, value: unknown): unknown {
  if (value instanceof Float64Array || value instanceof Int32Array) return Array.from(value, finiteOrNull);
  return typeof value === 'number' ? finiteOrNull(value) : value;
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
