// Files that come in by the window: how large they may be, how they are sent, and what is said of them.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readdirSync, readFileSync } from 'node:fs';
import { Readable } from 'node:stream';
import type { IncomingMessage } from 'node:http';
import { readSwc } from '../../src-main/cell/swc-read.ts';
import { encodePieces, encodeText } from '../../src-main/contract/frame.ts';
import type { SwcMeasures } from '../../src-main/contract/results.ts';
import { readBody } from '../../src-main/shells/browser/body.ts';
import { fileTooLarge, mostInBrowser_bytes, mostRequest_bytes } from '../../src-renderer/state/file-limits.ts';
import { fullReport, lineText, measureRows, somaGap } from '../../src-renderer/text/swc-words.ts';

describe('the size of a file', () => {
  it('is refused above 100 MB in any window, with the size and the limit', () => {
    const refusal = fileTooLarge({ name: 'cell.swc', size: 140e6 }, 'electron');
    expect(refusal).toMatchObject({ code: 'too-large', value: '140 MB', remedy: 'give a file of at most 100 MB' });
    expect(fileTooLarge({ name: 'cell.swc', size: 100e6 }, 'electron')).toBeNull();
  });

  it('is refused in a browser tab above what one request holds', () => {
    expect(fileTooLarge({ name: 'cell.swc', size: 60e6 }, 'browser')?.remedy).toContain('at most 50 MB');
    // Base64 makes four letters of three bytes; a kilobyte is plenty for what goes with the file.
    expect((mostInBrowser_bytes * 4) / 3 + 1024).toBeLessThan(mostRequest_bytes);
  });

  it('has the limit that the browser shell holds', async () => {
    // A request is read as any stream of bytes is.
    const body = (size: number) => Readable.from([Buffer.alloc(size, 32)]) as unknown as IncomingMessage;
    expect((await readBody(body(mostRequest_bytes), 'long'))?.length).toBe(mostRequest_bytes);
    expect(await readBody(body(mostRequest_bytes + 1), 'long')).toBeNull();
  });
});

describe('sending in pieces', () => {
  it('gives the very text that sending at once gives, with a pause within a large file', async () => {
    const bytes = Uint8Array.from({ length: 2_000_001 }, (_, i) => (i * 7919) % 256);
    const question = { call: '1', name: 'cell import', question: { name: 'Cell', bytes, at: NaN } };
    let pauses = 0;
    const pause = (): Promise<void> => {
      pauses++;
      return Promise.resolve();
    };
    const text = (await encodePieces(question, pause)).join('');
    expect(text).toBe(encodeText(question));
    expect(pauses).toBe(3);
  });
});

describe('a refused line', () => {
  it('is found by its number, whatever ends the lines', () => {
    const lines = fc.array(fc.stringMatching(/^[a-z0-9 µ]{0,20}$/), { minLength: 1, maxLength: 8 });
    fc.assert(
      fc.property(lines, fc.constantFrom('\n', '\r', '\r\n'), (list, end) => {
        const bytes = new TextEncoder().encode(list.join(end));
        expect(list.map((_, i) => lineText(bytes, i + 1))).toEqual(list.map((line) => line.trim()));
      }),
    );
  });

  it('is quoted in the report', () => {
    const bytes = new TextEncoder().encode('1 1 0 0 0 5 -1\n2 3 0 oops 0 1 1\n');
    const read = readSwc(bytes);
    expect(read.kind).toBe('refused');
    expect(fullReport(read.report, bytes).findings[0]?.words).toContain('It reads “2 3 0 oops 0 1 1”.');
  });
});

describe('the gap at the soma', () => {
  const measures = (soma_link_length_um: number): SwcMeasures => ({
    ...({} as SwcMeasures),
    soma: 'single',
    soma_area_um2: 4 * Math.PI * 100,
    stem_count: 3,
    soma_link_length_um,
  });

  it('is said when the stems begin well outside the sphere of the soma, with how far', () => {
    expect(somaGap(measures(30 + 60))?.words).toContain('Its 3 stems begin 60.0\u2009µm outside');
  });

  it('is not said of stems that begin at its surface, or nearly so', () => {
    expect(somaGap(measures(30))).toBeNull();
    expect(somaGap(measures(40))).toBeNull();
  });
});

describe('measures of a traced cell', () => {
  it('are told in words for every case there is', () => {
    for (const name of readdirSync('tests/support/swc-cases').filter((f) => f.endsWith('.swc'))) {
      const { report } = readSwc(readFileSync(`tests/support/swc-cases/${name}`));
      for (const [, value] of report.measures ? measureRows(report.measures) : [])
        expect(value).not.toMatch(/NaN|undefined/);
    }
  });
});
