import { describe, expect, it } from 'vitest';
import type { ProtocolDocument } from '../../src-main/contract/documents.ts';
import type { StoredRehearsal, Trace } from '../../src-main/contract/results.ts';
import { tracesToCsv, tracesToOneCsv } from '../../src-main/exchange/csv.ts';
import { axisOver } from '../../src-main/exchange/figure-axis.ts';
import { curvePath, type Frame } from '../../src-main/exchange/figure-curve.ts';
import { figureSvg } from '../../src-main/exchange/figure-svg.ts';
import { forecastToJson } from '../../src-main/exchange/forecast-json.ts';
import { refusalsOf } from '../support/refusals.ts';
import { clampProtocol, hold, step } from '../support/protocols.ts';

function trace(sweep: number, key: string, unit: Trace['unit'], values: readonly number[], interval_ms = 0.02): Trace {
  return { sweep, key, unit, start_ms: 0, interval_ms, values: Float64Array.from(values) };
}

const protocol: ProtocolDocument = clampProtocol([hold('b', 1), step('t', 2, 0)], {
  ladders: [{ lane: 'A', block: 't', number: 'level', rungs: { start: -80, increment: 40, count: 3 } }],
});
const stored = (name = 'Na & K <test>'): Omit<StoredRehearsal, 'plan'> => ({
  summary: {
    rehearsalId: 1,
    planId: 2,
    planName: name,
    sessionId: null,
    rehearsedAt: '2024-01-01T00:00:00Z',
    engineVersion: '1',
    sweeps: 1,
    step_us: 20,
    compartments: 2,
    wall_s: 1,
    hashes: { plan: 'p', cell: 'c', rig: 'r', protocol: 'q' },
  },
  forecast: {
    clamp: {
      pipette: 'A',
      tolerance: { unit: 'mV', value: 5 },
      sweeps: [
        {
          sweep: 0,
          level_mV: -80,
          windowStart_ms: 1,
          windowEnd_ms: 3,
          reach: 0.5,
          steady_mV: Float64Array.of(0.1, -6),
          worst_mV: Float64Array.of(1, -9),
          settling_ms: Float64Array.of(0.5, NaN),
          accessPart_mV: 0.1,
          access_mV: Float64Array.of(0.1, 0.1),
        },
      ],
      reach: 0.5,
      reachByRegion: [],
      worstSweep: 0,
      trustDistance_um: null,
      accessError_mV: 0.1,
    },
    dualSite: null,
    readings: [],
    pipettes: [],
    cautions: [],
    notes: ['a note'],
    numerical: { state: 'pending', clampError_mV: null, reach: null },
  },
  protocol,
});

describe('traces as CSV', () => {
  const traces = [
    trace(1, 'recording:A', 'pA', [1, 2.5, NaN]),
    trace(1, 'membrane:tip, "far"', 'mV', [-70.00000000000001, -69.123456789012, 0]),
    trace(0, 'recording:A', 'pA', [3, 4, 5]),
  ];

  it('is refused where one text could not hold a sweep', () => {
    const long = { ...trace(3, 'recording:A', 'pA', []), values: new Float64Array(13_000_000) };
    expect(refusalsOf(() => tracesToCsv({ name: 'long' }, [long]))).toEqual([
      expect.objectContaining({ code: 'too-large', place: 'sweep 4', value: expect.stringContaining('13000000 rows') }),
    ]);
  });

  it('all sweeps in one file: sweeps from 1, one below the other, empty where a sweep has no such trace', () => {
    const [file, ...more] = tracesToOneCsv({ name: 'x' }, traces);
    expect(more).toEqual([]);
    expect(file!.name).toBe('x-traces.csv');
    expect(file!.text.split('\r\n')).toEqual([
      'sweep,time_ms,recording:A (pA),"membrane:tip, ""far"" (mV)"',
      '1,0,3,',
      '1,0.02,4,',
      '1,0.04,5,',
      '2,0,1,-70',
      '2,0.02,2.5,-69.12345679',
      '2,0.04,,0',
      '',
    ]);
  });

  it('one file per sweep, in order, named for the plan', () => {
    const names = tracesToCsv({ name: 'Sodium: soma, 12 MΩ' }, traces).map(({ name }) => name);
    expect(names).toEqual(['sodium-soma-12-mω-sweep-1.csv', 'sodium-soma-12-mω-sweep-2.csv']);
  });

  it('a header with units, times, ten digits, an empty field for no number, CR LF', () => {
    expect(tracesToCsv({ name: 'x' }, traces)[1]!.text).toBe(
      ['time_ms,recording:A (pA),"membrane:tip, ""far"" (mV)"', '0,1,-70', '0.02,2.5,-69.12345679', '0.04,,0', ''].join(
        '\r\n',
      ),
    );
  });

  it('traces on another clock get a file of their own', () => {
    const files = tracesToCsv({ name: 'x' }, [...traces, trace(0, 'command:A', 'mV', [1], 1)]);
    expect(files.map(({ name }) => name)).toEqual(['x-sweep-1.csv', 'x-sweep-1-2.csv', 'x-sweep-2.csv']);
  });
});

describe('a forecast as JSON', () => {
  const text = forecastToJson(stored()).text;
  const document = JSON.parse(text) as { forecast: { clamp: { sweeps: Record<string, unknown>[] } }; summary: unknown };

  it('keeps arrays as arrays and says null where there is no number', () => {
    expect(document.forecast.clamp.sweeps[0]!['settling_ms']).toEqual([0.5, null]);
    expect(document.forecast.clamp.sweeps[0]!['steady_mV']).toEqual([0.1, -6]);
  });

  it('says where it comes from: plan, versions, hashes', () => {
    expect(document).toMatchObject({
      kind: 'forecast',
      format: 1,
      summary: { hashes: { plan: 'p' } },
      protocol: { kind: 'protocol' },
    });
  });
});

describe('axes', () => {
  it('have two to five round ticks inside, over any range', () => {
    for (let decade = -6; decade <= 6; decade += 1) {
      for (const part of [1, 1.7, 2.3, 4.4, 7.9]) {
        const width = part * 10 ** decade;
        const axis = axisOver(-0.3 * width, 0.7 * width);
        expect(axis.ticks.length, `width ${width}`).toBeGreaterThanOrEqual(2);
        expect(axis.ticks.length, `width ${width}`).toBeLessThanOrEqual(5);
        for (const tick of axis.ticks) {
          expect(tick).toBeGreaterThanOrEqual(axis.low - 1e-9 * width);
          expect(tick).toBeLessThanOrEqual(axis.high + 1e-9 * width);
        }
      }
    }
  });

  it('open a range of no width', () => expect(axisOver(5, 5).ticks).toContain(5));
});

describe('curves', () => {
  const frame: Frame = { left: 0, right: 100, top: 0, bottom: 100, from_ms: 0, to_ms: 1999.98, low: -1, high: 1 };

  it('keep the one sample that sticks out of a hundred thousand', () => {
    const values = new Float64Array(100_000);
    values[77_777] = 1;
    const path = curvePath({ ...trace(0, 'recording:A', 'pA', []), values }, frame);
    expect(path.split('L').length).toBeLessThan(2000);
    expect(path).toContain(' 0.00L');
  });

  it('lift the pen where there is no number', () => {
    const path = curvePath(trace(0, 'recording:A', 'pA', [0, 0, NaN, 0, 0]), frame);
    expect(path.match(/M/g)).toHaveLength(2);
  });
});

describe('the figure', () => {
  const family = [0, 1, 2].flatMap((sweep) => [
    trace(sweep, 'membrane:tip', 'mV', [-70, -70 + sweep, -70 + sweep]),
    trace(sweep, 'recording:A', 'pA', [0, -5 * sweep, 100]),
    trace(sweep, 'command:A', 'mV', [-70, -80 + 40 * sweep, -70]),
  ]);
  const { name, text } = figureSvg(stored(), family);

  it('is well-formed and escapes what the user wrote', () => {
    expect(name).toBe('na-k-test.svg');
    expect(text).toContain('Na &amp; K &lt;test&gt;');
    expect(text.match(/<g /g)!.length).toBe(text.match(/<\/g>/g)!.length);
    expect(text).not.toMatch(/NaN|undefined|Infinity|<script|href/);
  });

  it('has command, recording and membrane in this order, each axis with its unit', () => {
    expect(text.indexOf('command A, mV')).toBeLessThan(text.indexOf('recording A, pA'));
    expect(text.indexOf('recording A, pA')).toBeLessThan(text.indexOf('membrane, tip, mV'));
    expect(text).toContain('time, ms');
  });

  it('names the sweeps by their ladder, with a minus sign and a thin space', () => {
    for (const label of ['−80\u2009mV', '−40\u2009mV', '0\u2009mV']) expect(text).toContain(`>${label}<`);
    expect(text).not.toMatch(/>-\d/);
  });
});
