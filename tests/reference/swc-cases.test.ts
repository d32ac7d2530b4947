// Outcome, codes, line and measures of 45 self-made files, as an independent reader in Python found them
// (tests/support/swc-cases/README.md). Rules: INCF SWC specification 1.0.3 and this project's thresholds.
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { SwcMeasures } from '../../src-main/contract/results.ts';
import { readSwc } from '../../src-main/cell/swc-read.ts';

const folder = new URL('../support/swc-cases/', import.meta.url);
type Expected = { outcome: string; codes: string[]; line?: number } & Partial<SwcMeasures>;
const expected = JSON.parse(readFileSync(new URL('expected.json', folder), 'utf8')) as {
  tolerance_relative: number;
  files: Record<string, Expected>;
};

describe('SWC cases', () => {
  it('has an expectation for every file', () => {
    const files = readdirSync(folder).filter((name) => name.endsWith('.swc'));

    expect(files.sort()).toEqual(Object.keys(expected.files).sort());
    expect(files).toHaveLength(45);
  });

  it.each(Object.entries(expected.files))('reads %s as expected', (name, { outcome, codes, line, ...measures }) => {
    const reading = readSwc(readFileSync(new URL(name, folder)));

    expect(reading.report.outcome).toBe(outcome);
    expect(reading.report.codes).toEqual(codes);
    expect(reading.kind === 'refused' ? reading.line : undefined).toBe(line);
    for (const [measure, value] of Object.entries(measures)) {
      const found = reading.report.measures?.[measure as keyof SwcMeasures];
      // The reader in Python rounded to six decimals.
      if (typeof value === 'number')
        expect(Math.abs(Number(found) - value), measure).toBeLessThanOrEqual(
          expected.tolerance_relative * Math.abs(value),
        );
      else expect(found, measure).toBe(value);
    }
    expect(Object.keys(reading.report.measures ?? {}).sort()).toEqual(Object.keys(measures).sort());
  });

  it.each(Object.keys(expected.files))('tells every finding of %s in a sentence with a count', (name) => {
    for (const finding of readSwc(readFileSync(new URL(name, folder))).report.findings) {
      expect(finding.words).toMatch(/^[A-Z].+\.$/);
      expect(finding.count).toBeGreaterThan(0);
      expect(finding.lines.length).toBeLessThanOrEqual(5);
    }
  });
});
