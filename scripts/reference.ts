// npm run reference -- FOLDER: every reference case of a folder against this program. Ends with 1 where one fails.
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { referenceCase } from '../src-main/exchange/reference-case.ts';
import { runCase, type CaseResult } from './reference/run-case.ts';

const heads = ['case', 'voltage mV', 'spike ms', 'peak mV', 'currents %', 'step µs', 'verdict'];
const widths = [28, 11, 11, 11, 11, 9, 0];

function line(cells: readonly string[]): string {
  return cells.map((cell, i) => (i === 0 ? cell.padEnd(widths[i]!) : cell.padStart(widths[i]!))).join('  ');
}

function figure(value: number): string {
  return value === 0 ? '-' : value.toPrecision(2);
}

function verdict({ passed, notCovered, difference }: CaseResult): string {
  if (passed) return 'passed';
  const parts = notCovered.map((what) => `not covered: ${what}`);
  if (difference.worst > 1) parts.push(`failed: ${difference.worstWhere}, ${figure(difference.worst)} × tolerance`);
  return parts.join('; ');
}

function main(folder: string | undefined): number {
  if (folder === undefined) {
    console.error('Give the folder of the reference cases: npm run reference -- FOLDER');
    return 2;
  }
  const names = readdirSync(folder)
    .filter((name) => name.endsWith('.json'))
    .sort();
  console.log(line(heads));
  let failed = names.length === 0 ? 1 : 0;
  for (const name of names) {
    try {
      const result = runCase(referenceCase(JSON.parse(readFileSync(join(folder, name), 'utf8'))));
      const { voltage_mV, spike_ms, peak_mV, share_percent } = result.difference;
      const cells = [voltage_mV, spike_ms, peak_mV, share_percent].map(figure);
      console.log(line([result.id, ...cells, String(result.step_us), verdict(result)]));
      if (!result.passed) failed++;
    } catch (error) {
      console.log(line([name, '-', '-', '-', '-', '-', error instanceof Error ? error.message : String(error)]));
      failed++;
    }
  }
  console.log(`${names.length - failed} of ${names.length} passed`);
  return failed === 0 ? 0 : 1;
}

process.exitCode = main(process.argv[2]);
