// Made by another program; see data/README.md. Each case goes from its file to plans and through the whole solver.
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { runCase } from '../../scripts/reference/run-case.ts';
import { referenceCase } from '../../src-main/exchange/reference-case.ts';

const folder = join(import.meta.dirname, 'data');
const names = readdirSync(folder).filter((name) => name.endsWith('.json'));

interface RawCase {
  format: string;
  sweeps: {
    synapses: unknown[];
    traces: Record<string, number[]>;
    measures: { kind: string; values?: number[] }[];
    electrodes: { command: object[] }[];
  }[];
}
function readCase(name: string): RawCase {
  return JSON.parse(readFileSync(join(folder, name), 'utf8')) as RawCase;
}

describe('reference cases, LSODA at rtol 1e-12', () => {
  // Tolerances: scripts/reference/compare.ts. 1 is the limit of the worst trace, spike or measure.
  it.each(names)('%s agrees in every trace and measure', (name) => {
    const result = runCase(referenceCase(readCase(name)));
    expect(result.notCovered).toEqual([]);
    expect(result.difference.worst, result.difference.worstWhere).toBeLessThanOrEqual(1);
    expect(result.passed).toBe(true);
  });

  it('fails a case with one voltage off by 0.011 mV in a passive cell', () => {
    const off = readCase('c06_y_branch.json');
    off.sweeps[0]!.traces['V:B']![100]! += 0.011;
    expect(runCase(referenceCase(off)).passed).toBe(false);
  });

  it('fails a case with a spike late by 0.011 ms, and one with a spike too many', () => {
    const late = readCase('c03_hh_anode_break.json');
    late.sweeps[1]!.measures.find(({ kind }) => kind === 'crossings')!.values![0]! += 0.011;
    expect(runCase(referenceCase(late)).passed).toBe(false);
    const many = readCase('c03_hh_anode_break.json');
    many.sweeps[1]!.measures.find(({ kind }) => kind === 'crossings')!.values!.push(60);
    expect(runCase(referenceCase(many)).difference.spike_ms).toBe(Infinity);
  });

  it('does not pass what a plan cannot express, and names it', () => {
    const synapse = readCase('c06_y_branch.json');
    synapse.sweeps[1]!.synapses.push({ name: 's' });
    const sine = readCase('c06_y_branch.json');
    sine.sweeps[2]!.electrodes[0]!.command = [{ t0: 0, t1: 300, shape: 'sine' }];
    const results = [synapse, sine].map((raw) => runCase(referenceCase(raw)));
    expect(results.map(({ notCovered }) => notCovered)).toEqual([['synapse'], ['sine']]);
    expect(results.map(({ passed }) => passed)).toEqual([false, false]);
  });

  it('refuses a file of another format', () => {
    const wrong = expect.objectContaining({ data: expect.objectContaining({ code: 'document-wrong-kind' }) });
    expect(() => referenceCase({ ...readCase('c06_y_branch.json'), format: 'something/2' })).toThrow(wrong);
    expect(() => referenceCase(null)).toThrow(wrong);
  });
});
