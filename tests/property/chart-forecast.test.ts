// What the charts of a forecast and a rehearsal are made of: nothing lost, nothing mixed up between sweeps or regions.
import { describe, expect, it } from 'vitest';
import { protocolSchema } from '../../src-main/contract/documents.ts';
import type {
  ClampForecast,
  ClampSweep,
  CompartmentTable,
  ReadingForecast,
  Trace,
} from '../../src-main/contract/results.ts';
import {
  compartmentOf,
  errorValues,
  regionPoints,
  toleranceIn,
} from '../../src-renderer/forecast/error-by-distance.ts';
import { familyAxis, familyOrder, familySeries } from '../../src-renderer/forecast/reading-family.ts';
import { regionRows } from '../../src-renderer/forecast/region-rows.ts';
import { atCrosshair } from '../../src-renderer/rehearse/at-crosshair.ts';
import { readingRows } from '../../src-renderer/rehearse/reading-rows.ts';
import { bySweep, timeRange, traceAt } from '../../src-renderer/rehearse/shown-run.ts';
import { injectedSeries, recordedFamily, voltageSeries } from '../../src-renderer/rehearse/trace-series.ts';

const table: CompartmentTable = {
  count: 4,
  branch: Int32Array.of(0, 1, 1, 2),
  at_um: Float64Array.of(0, 10, 30, 5),
  distance_um: Float64Array.of(0, 10, 30, 5),
  area_um2: Float64Array.of(500, 100, 300, 100),
  regionIndex: Int32Array.of(0, 1, 1, 2),
  regionNames: ['soma', 'apical', 'axon'],
  names: null,
};
const sweep: ClampSweep = {
  sweep: 2,
  level_mV: -20,
  windowStart_ms: 10,
  windowEnd_ms: 60,
  reach: 0.6,
  steady_mV: Float64Array.of(2, -3, -9, 4),
  worst_mV: Float64Array.of(50, -60, -61, 55),
  settling_ms: Float64Array.of(1, 4, NaN, 2),
  accessPart_mV: 2,
  access_mV: Float64Array.of(2, 2, 1, 2),
};
const clamp: ClampForecast = {
  pipette: 'A',
  tolerance: { unit: 'mV', value: 5 },
  sweeps: [sweep],
  reach: 0.6,
  reachByRegion: [
    { region: 'soma', area_um2: 500, reach: 1 },
    { region: 'apical', area_um2: 400, reach: 0.25 },
    { region: 'axon', area_um2: 100, reach: 1 },
  ],
  worstSweep: 2,
  trustDistance_um: 16,
  accessError_mV: 2,
};

describe('clamp error along the cell', () => {
  it('access part and cable part add up to the whole, everywhere', () => {
    const whole = errorValues(sweep, 'steady', 'whole');
    const access = errorValues(sweep, 'steady', 'access');
    const cable = errorValues(sweep, 'steady', 'cable');
    whole.forEach((value, k) => expect((access[k] ?? NaN) + (cable[k] ?? NaN)).toBeCloseTo(value, 12));
    expect(Array.from(cable)).toEqual([0, -5, -10, 2]);
    expect(errorValues(sweep, 'worst', 'cable')).toBe(sweep.worst_mV);
    // Stored by an engine that knew the access part at one clamp alone.
    const older: ClampSweep = { ...sweep };
    Reflect.deleteProperty(older, 'access_mV');
    expect([...errorValues(older, 'steady', 'access')]).toEqual([2, 2, 2, 2]);
  });

  it('every compartment is one point of its own region, and a point leads back to its compartment', () => {
    const series = regionPoints(table, sweep.steady_mV, 'apical');
    expect(series.map((one) => [one.key, one.y.length])).toEqual([
      ['soma', 1],
      ['apical', 2],
      ['axon', 1],
    ]);
    expect(series[1]?.selected).toBe(true);
    for (const one of series) {
      for (let i = 0; i < one.y.length; i += 1) {
        const k = compartmentOf(table, one.key, i);
        expect(one.y[i]).toBe(sweep.steady_mV[k]);
      }
    }
    expect(compartmentOf(table, 'apical', 2)).toBe(-1);
  });

  it('a tolerance in per cent is of the step, and of nothing where there is no step', () => {
    expect(toleranceIn({ unit: 'mV', value: 5 }, null, null)).toBe(5);
    expect(toleranceIn({ unit: '%', value: 10 }, -20, -80)).toBeCloseTo(6, 12);
    expect(toleranceIn({ unit: '%', value: 10 }, -80, -80)).toBeNull();
  });

  it('a region with one compartment that never settles does not settle, and says how much of it', () => {
    const rows = regionRows(clamp, sweep, table);
    expect(rows.map((row) => row.steady_mV)).toEqual([2, -9, 4]);
    expect(rows.map((row) => row.settles_ms)).toEqual([1, null, 2]);
    expect(rows[1]?.unsettled).toBeCloseTo(0.75, 12);
    expect(regionRows(clamp, sweep, null)[0]?.reach).toBe(1);
  });
});

describe('a reading over its ladder', () => {
  const reading: ReadingForecast = {
    reading: 'peak',
    name: 'peak',
    unit: 'pA',
    recorded: Float64Array.of(30, 10, 20),
    truth: Float64Array.of(33, 11, 0),
    ladderValue: Float64Array.of(0, -40, -20),
  };
  it('is drawn in the order of the ladder, whatever the order of the sweeps', () => {
    expect(familyOrder(reading).map((point) => point.sweep)).toEqual([1, 2, 0]);
    const [recorded, truth] = familySeries(reading, 'A', false);
    expect(recorded?.y).toEqual([10, 20, 30]);
    expect(truth?.y).toEqual([11, 0, 33]);
    expect(truth?.stroke).toBe('dotted');
    expect(familySeries(reading, 'A', true)[0]?.y).toEqual([-1, 20, -3]);
  });
  it('bias is recorded less true; its share is left out where the truth is zero', () => {
    expect(readingRows([reading], 1)[0]).toMatchObject({ bias: -1, words: '9.1\u2009% too small' });
    expect(readingRows([reading], 2)[0]).toMatchObject({ bias: 20, words: '–' });
    expect(readingRows([{ ...reading, truth: null }], 0)[0]).toMatchObject({ truth: null, bias: null, words: '–' });
  });
  it('is drawn against what the first ladder sets, in its unit', () => {
    const protocol = protocolSchema.parse({
      kind: 'protocol',
      format: 1,
      name: 'p',
      sampling_us: 50,
      sweepInterval_ms: 1000,
      lanes: [
        { pipette: 'A', unit: 'mV', holding: -70, blocks: [{ kind: 'step', id: 's', duration_ms: 10, level: 0 }] },
      ],
      ladders: [{ lane: 'A', block: 's', number: 'duration_ms', rungs: { list: [1, 2] } }],
    });
    expect(familyAxis(protocol)).toEqual({ words: 'duration', unit: 'ms' });
    expect(familyAxis({ ...protocol, ladders: [] })).toEqual({ words: 'sweep', unit: '' });
  });
});

describe('traces of a rehearsal', () => {
  const trace = (key: string, unit: Trace['unit'], values: number[], at = 0): Trace => ({
    sweep: at,
    key,
    unit,
    start_ms: 0,
    interval_ms: 0.5,
    values: Float64Array.from(values),
  });
  const traces = [
    trace('recording:A', 'pA', [0, -3000, 100]),
    trace('command:A', 'mV', [-80, -20, -20]),
    trace('membrane:A', 'mV', [-80, -26, -22]),
    trace('membrane:tip', 'mV', [-80, -60, -50]),
    trace('recording:B', 'mV', [-79, -30, -30]),
    trace('command:B', 'pA', [0, 50, 50]),
    trace('membrane:B', 'mV', [-80, -31, -30]),
    trace('recording:A', 'pA', [1, 2, 3], 1),
  ];
  const sweeps = bySweep(traces);
  const first = sweeps.get(0) ?? new Map<string, Trace>();

  it('are read straight between samples and not beyond them', () => {
    expect(traceAt(first.get('membrane:A'), 0.75)).toBeCloseTo(-24, 12);
    expect(traceAt(first.get('membrane:A'), 1)).toBe(-22);
    expect(traceAt(first.get('membrane:A'), 1.1)).toBeNull();
    expect(timeRange(traces)).toEqual({ from: 0, to: 1 });
  });

  it('the family of A is solid and in nA when it is large; the selected sweep is told apart; B is dashed', () => {
    const { series, unit } = recordedFamily(sweeps, 'A', 1, 2);
    expect(unit).toBe('nA');
    expect(series.map((one) => [one.key, one.selected, one.stroke])).toEqual([
      ['0', false, 'solid'],
      ['1', true, 'solid'],
    ]);
    expect(series[0]?.y[1]).toBeCloseTo(-3, 12);
    expect(recordedFamily(sweeps, 'B', 0, 2).series[0]?.stroke).toBe('dashed');
  });

  it('voltages and injected currents are kept apart', () => {
    expect(voltageSeries(first).map((one) => one.key)).toEqual([
      'command:A',
      'membrane:A',
      'membrane:tip',
      'membrane:B',
    ]);
    expect(injectedSeries(first).series.map((one) => one.key)).toEqual(['command:B']);
  });

  it('the crosshair subtracts what belongs together: membrane − command in voltage clamp, recorded − membrane in current clamp', () => {
    const groups = atCrosshair(first, 0.5);
    const difference = (title: string) =>
      groups.find((group) => group.title === title)?.rows.find((row) => row.isDifference);
    expect(difference('Pipette A')).toMatchObject({ words: 'membrane − command', value: -6 });
    expect(difference('Pipette B')).toMatchObject({ words: 'recorded − membrane', value: 1 });
    expect(difference('Probes')).toMatchObject({ words: 'tip − command A', value: -40 });
  });
});
