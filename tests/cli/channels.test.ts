// holdfast channels: what it prints and how it ends.
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { channels } from '../../src-main/cli/channels.ts';
import { main } from '../../src-main/cli/main.ts';
import { storedChannels } from '../../src-main/channels/library.ts';

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

describe('holdfast channels', () => {
  it('prints id, ion, reversal potential, temperature, Q10 and, below, the source', () => {
    expect(channels([])).toBe(0);
    const lines = out.trimEnd().split('\n');
    expect(lines).toHaveLength(2 * storedChannels.size);
    const line = lines.indexOf(lines.find((each) => each.startsWith('ca-t-huguenard-mccormick-1992 '))!);
    expect(lines[line]!.split(/ {2,}/)).toEqual([
      'ca-t-huguenard-mccormick-1992',
      'Ca',
      'E 120 mV',
      '24 °C',
      'Q10 m 5, h 3',
    ]);
    expect(lines[line + 1]).toMatch(/^ {2}Huguenard JR, McCormick DA \(1992\), .+\(equations from memory\)$/);
    expect(lines.find((each) => each.startsWith('k-golomb') || each.startsWith('k-kv3-golomb'))).toMatch(
      /no temperature stated +not scaled$/,
    );
  });

  it('prints one array of objects with --json, without the curves', () => {
    expect(channels(['--json'])).toBe(0);
    const listed = JSON.parse(out) as Record<string, unknown>[];
    expect(listed.map(({ id }) => id)).toEqual([...storedChannels.keys()]);
    expect(listed[0]).toEqual({
      id: 'na-hodgkin-huxley-1952',
      title: 'Na, Hodgkin & Huxley 1952',
      ion: 'Na',
      reversal_mV: 50,
      temperature_C: 6.3,
      source: 'Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544',
      fromMemory: false,
      note: 'Squid giant axon, rest at −65 mV. Q10 from memory.',
      gates: [
        { name: 'm', power: 3, q10: 3 },
        { name: 'h', power: 1, q10: 3 },
      ],
    });
  });

  it('is found by its name, and says what it takes when given more', async () => {
    expect(await main(['channels', 'na'])).toBe(2);
    expect(errors).toBe('usage: holdfast channels [--json]\n');
    expect(out).toBe('');
  });

  it('stands in the help', async () => {
    const said = vi.spyOn(console, 'log').mockImplementation(() => undefined);
    expect(await main(['--help'])).toBe(0);
    expect(said.mock.calls.join('\n')).toMatch(/\n {2}channels +the published channels a cell can name\n/);
  });
});
