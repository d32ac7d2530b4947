// holdfast check: what it prints and how it ends.
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { check } from '../../src-main/cli/check.ts';

const folder = fileURLToPath(new URL('../support/swc-cases/', import.meta.url));
const expected = JSON.parse(readFileSync(join(folder, 'expected.json'), 'utf8')) as {
  files: Record<string, { outcome: string; codes: string[]; line?: number }>;
};
let out = '';
let errors = '';

beforeEach(() => {
  out = '';
  errors = '';
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    out += String(text);
    return true;
  });
  vi.spyOn(process.stderr, 'write').mockImplementation((text) => {
    errors += String(text);
    return true;
  });
});
afterEach(() => {
  vi.restoreAllMocks();
});

describe('holdfast check', () => {
  it.each(Object.entries(expected.files))('prints one object for %s with --json', (name, wanted) => {
    const code = check([join(folder, name), '--json']);
    const found = JSON.parse(out) as Record<string, unknown>;

    expect(Object.keys(found).sort()).toEqual(Object.keys(wanted).sort());
    expect(found).toMatchObject({ outcome: wanted.outcome, codes: wanted.codes });
    expect(found['line']).toBe(wanted.line);
    expect(code).toBe(wanted.outcome === 'refuse' ? 2 : 0);
    expect(errors === '').toBe(code === 0);
  });

  it('names file, line, the text of the line and the remedy when it refuses', () => {
    const file = join(folder, '45_not_a_number.swc');

    expect(check([file])).toBe(2);
    expect(errors).toBe(
      `${file} line 3: "3 3 sixty 0 0 1 2": E_NUMBER: write a plain decimal number with a point, without thousands separators or units\n`,
    );
    expect(out).toBe('');
  });

  it('tells repairs in words, with counts, lines and measures', () => {
    expect(check([join(folder, '17_children_before_parents.swc')])).toBe(0);
    expect(out).toMatch(/report\nW_ORDER \(4×, lines 1, 2, 3, 4\): .+\n {2}samples +5\n/);
  });

  it.each([
    ['a file that is not there', ['nowhere.swc'], 'nowhere.swc'],
    ['a folder', [folder], 'is a folder: name a file'],
    ['no file', [], 'No file is named.'],
    ['an option it does not know', ['a.swc', '--all'], '"--all" is not understood.'],
  ])('ends with 2 for %s', (_, args, words) => {
    expect(check(args)).toBe(2);
    expect(errors).toContain(words);
  });

  it('refuses a file above 100 MB by its size', () => {
    const temporary = mkdtempSync(join(tmpdir(), 'swc-check-'));
    const file = join(temporary, 'big.swc');
    writeFileSync(file, Buffer.alloc(100_000_001));
    try {
      expect(check([file])).toBe(2);
      expect(errors).toContain('100 MB');
    } finally {
      rmSync(temporary, { recursive: true });
    }
  });
});
