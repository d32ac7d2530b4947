// What a rehearsal gives away as files. The engine writes them; the page only hands them over.
import type { TextFile } from '../../src-main/contract/requests.ts';
import { keepFile } from '../charts/download.ts';
import { askOrSay } from '../state/ask.ts';
import { plan } from '../state/plan.svelte.ts';

function typeOf(name: string): string {
  if (name.endsWith('.csv')) return 'text/csv';
  if (name.endsWith('.svg')) return 'image/svg+xml';
  return name.endsWith('.json') ? 'application/json' : 'text/plain';
}

function keep(file: TextFile | null): void {
  if (file) keepFile(file.name, typeOf(file.name), file.text);
}

/** All sweeps in one CSV file, full resolution; one per sweep where one would be too long. */
export async function keepTraces(rehearsalId: number): Promise<void> {
  for (const file of (await askOrSay('export traces', { rehearsalId, asOne: true })) ?? []) {
    keep(file);
    // A browser drops downloads that come all at once.
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
}

export async function keepForecast(rehearsalId: number): Promise<void> {
  keep(await askOrSay('export forecast', { rehearsalId }));
}

export async function keepFigure(rehearsalId: number): Promise<void> {
  keep(await askOrSay('export figure', { rehearsalId }));
}

export async function keepPlan(): Promise<void> {
  keep(await askOrSay('export plan', { plan: plan.document }));
}
