import type { PipetteLetter } from '../../src-main/contract/documents.ts';
import type { Paint } from '../charts/series.ts';
import { traceAt, type SweepTraces } from './shown-run.ts';

export interface CrosshairRow {
  readonly words: string;
  readonly value: number;
  readonly unit: 'mV' | 'pA';
  /** A difference of two rows above it: shown with its sign. */
  readonly isDifference: boolean;
  readonly paint: Paint | null;
  readonly stroke: 'solid' | 'dashed' | 'dotted';
}
export interface CrosshairGroup {
  readonly title: string;
  readonly letter: PipetteLetter | null;
  readonly rows: readonly CrosshairRow[];
}

/**
 * What one sweep reads at a time, by pipette: recorded, command, membrane, and the difference that matters there: in voltage
 * clamp membrane − command, in current clamp recorded − membrane. Probes last, each against A's command when A clamps.
 */
export function atCrosshair(sweep: SweepTraces, time_ms: number): CrosshairGroup[] {
  const read = (key: string): { value: number; unit: 'mV' | 'pA' } | null => {
    const trace = sweep.get(key);
    const value = traceAt(trace, time_ms);
    return trace && value !== null ? { value, unit: trace.unit } : null;
  };
  const groups: CrosshairGroup[] = [];
  for (const letter of ['A', 'B'] as const) {
    const paint: Paint = { token: letter === 'A' ? '--a' : '--b' };
    const stroke = letter === 'A' ? 'solid' : 'dashed';
    const recorded = read(`recording:${letter}`);
    const command = read(`command:${letter}`);
    const membrane = read(`membrane:${letter}`);
    const rows: CrosshairRow[] = [];
    const row = (words: string, of: { value: number; unit: 'mV' | 'pA' }, own: Paint | null): void =>
      void rows.push({ words, ...of, isDifference: false, paint: own, stroke });
    const difference = (words: string, value: number): void =>
      void rows.push({ words, value, unit: 'mV', isDifference: true, paint: null, stroke });
    if (recorded) row('recorded', recorded, paint);
    if (command) row(command.unit === 'mV' ? 'command, dial' : 'injected', command, { token: '--ink-3' });
    if (membrane) row('membrane', membrane, paint);
    if (command?.unit === 'mV' && membrane) difference('membrane − command', membrane.value - command.value);
    if (recorded?.unit === 'mV' && membrane) difference('recorded − membrane', recorded.value - membrane.value);
    if (rows.length > 0) groups.push({ title: `Pipette ${letter}`, letter, rows });
  }
  const command = read('command:A');
  const probes = [...sweep.keys()].filter((key) => /^membrane:(?![AB]$)/.test(key));
  const rows = probes.flatMap((key): CrosshairRow[] => {
    const at = read(key);
    if (!at) return [];
    const words = key.slice('membrane:'.length);
    const own: CrosshairRow = { words, ...at, isDifference: false, paint: { token: '--ink-2' }, stroke: 'dotted' };
    if (command?.unit !== 'mV') return [own];
    const off = { value: at.value - command.value, isDifference: true, paint: null };
    return [own, { ...own, ...off, words: `${words} − command A` }];
  });
  if (rows.length > 0) groups.push({ title: 'Probes', letter: null, rows });
  return groups;
}
