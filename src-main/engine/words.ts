// What the command line says of refusals and forecasts; it sees the engine only.
import type { RefusalData } from '../contract/refusal.ts';
import type { StoredRehearsal } from '../contract/results.ts';
import { forecastText } from '../exchange/forecast-text.ts';
import { Refusal, wording } from '../units/refuse.ts';

/** One line per refusal. */
export function refusalWords(refusals: readonly RefusalData[]): string {
  return refusals.map(wording).join('\n');
}

/** What an error refuses, or null when it is a bug. */
export function refusalsOf(error: unknown): readonly RefusalData[] | null {
  return error instanceof Refusal ? error.all : null;
}

/** The forecast as a terminal shows it. */
export function forecastWords(stored: Omit<StoredRehearsal, 'plan'>): string {
  return forecastText(stored);
}
