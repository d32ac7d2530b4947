// A rehearsal among others of its plan: what it was run with, how one of its sweeps fares, and its values on the cell now.
import { describe, expect, it } from 'vitest';
import { cellSchema, type CellDocument, type PipetteDocument } from '../../src-main/contract/documents.ts';
import type {
  ClampForecast,
  ClampSweep,
  CompartmentTable,
  PassiveEstimate,
  Trace,
} from '../../src-main/contract/results.ts';
import { cautionsOf } from '../../src-renderer/forecast/cautions.ts';
import { topicWithin } from '../../src-renderer/forecast/definitions.ts';
import { largestCommand } from '../../src-renderer/forecast/largest-command.ts';
import { regionRows, sweepWords } from '../../src-renderer/forecast/region-rows.ts';
import { accessWords, sweepsWords } from '../../src-renderer/rehearse/ran-with.ts';
import { derivedFigures } from '../../src-renderer/rig/figures.ts';
import { isSameShape, onGrid } from '../../src-renderer/state/on-grid.ts';
import { ballAndStick, planOf, soma } from '../support/plans.ts';
import { clampProtocol, hold, step } from '../support/protocols.ts';

/** Thin spaces as plain ones, so that the expectations can be typed. */
const plain = (text: string): string => text.replaceAll('\u2009', ' ');

function table(branch: number[], at_um: number[], names: string[] | null = null): CompartmentTable {
  const count = branch.length;
  return {
    count,
    branch: Int32Array.from(branch),
    at_um: Float64Array.from(at_um),
    distance_um: Float64Array.from(at_um),
    area_um2: new Float64Array(count).fill(100),
    regionIndex: new Int32Array(count),
    regionNames: ['dendrite'],
    names,
  };
}

describe('what a rehearsal was run with', () => {
  const protocol = clampProtocol([hold('b', 1), step('t', 2, -100)], {
    ladders: [{ lane: 'A', block: 't', number: 'level', rungs: { start: -100, increment: 10, count: 5 } }],
  });
  const rigOf = (...access: number[]) =>
    planOf({
      cell: ballAndStick({ soma_um: 20, stick_um: 2, length_um: 100 }, { Rm: 1e4, Ri: 100, Cm: 1 }),
      pipettes: access.map((accessResistance_MOhm, i) => ({
        letter: i === 0 ? ('A' as const) : ('B' as const),
        site: soma,
        mode: 'voltage clamp' as const,
        accessResistance_MOhm,
      })),
      lanes: [{ holding: -70, blocks: [hold('h', 5)] }],
    }).rig;

  it('is its access, its first and last level, its sweeps', () => {
    expect(plain(accessWords({ rig: rigOf(12), protocol }))).toBe('12 MΩ');
    expect(plain(accessWords({ rig: rigOf(12, 80), protocol }))).toBe('A 12 MΩ, B 80 MΩ');
    expect(plain(sweepsWords({ rig: rigOf(12), protocol }))).toBe('−100…−60 mV · 5 sweeps');
    expect(plain(sweepsWords({ rig: rigOf(12), protocol: { ...protocol, ladders: [] } }))).toBe('−100 mV · 1 sweep');
  });
});

describe('one sweep of a forecast', () => {
  const sweep = (at: number, reach: number, dendrite?: number): ClampSweep => ({
    sweep: at,
    level_mV: -20,
    windowStart_ms: 10,
    windowEnd_ms: 60,
    reach,
    ...(dendrite === undefined ? {} : { reachByRegion: [{ region: 'dendrite', reach: dendrite }] }),
    steady_mV: Float64Array.of(2, -3),
    worst_mV: Float64Array.of(50, -60),
    settling_ms: Float64Array.of(1, NaN),
    accessPart_mV: 2,
    access_mV: Float64Array.of(2, 2),
  });
  const clamp: ClampForecast = {
    pipette: 'A',
    tolerance: { unit: 'mV', value: 5 },
    sweeps: [sweep(0, 0.9, 0.8), sweep(1, 0.4)],
    reach: 0.4,
    reachByRegion: [{ region: 'dendrite', area_um2: 200, reach: 0.3 }],
    worstSweep: 1,
    trustDistance_um: 16,
    accessError_mV: 2,
  };
  const reachOf = (at: number) => regionRows(clamp, clamp.sweeps[at]!, table([0, 0], [0, 10]))[0]?.reach;

  it('has the reach of that very sweep in its row, and none where it was not told', () => {
    expect(reachOf(0)).toBe(0.8);
    // Stored before it was told by sweep: known for the worst alone.
    expect(reachOf(1)).toBe(0.3);
    const older = { ...clamp, sweeps: [sweep(0, 0.9), sweep(1, 0.4)] };
    expect(regionRows(older, older.sweeps[0]!, null)[0]?.reach).toBeNaN();
  });

  it('is called the worst of all when it is, and only among others', () => {
    expect(sweepWords(clamp, clamp.sweeps[0]!)).toBe('sweep 1');
    expect(sweepWords(clamp, clamp.sweeps[1]!)).toBe('sweep 2, the worst of all');
    expect(sweepWords({ ...clamp, sweeps: [sweep(1, 0.4)] }, sweep(1, 0.4))).toBe('sweep 2');
  });

  it('explains no figure that the forecast does not have', () => {
    const inCurrentClamp = { clamp: null, dualSite: null, readings: [] };
    expect(topicWithin('clamp error', inCurrentClamp)).toBe('largest current');
    expect(topicWithin('attenuation', { ...inCurrentClamp, clamp })).toBe('clamp error');
    expect(topicWithin('reach', { ...inCurrentClamp, clamp })).toBe('reach');
  });

  it('warns of what its engine warns of, and of arithmetic worse than the tolerance', () => {
    const computed = (clampError_mV: number) => ({ state: 'computed' as const, clampError_mV, reach: 0 });
    expect(cautionsOf({ clamp, numerical: computed(4.9), cautions: ['fires'] })).toEqual(['fires']);
    const both = cautionsOf({ clamp, numerical: computed(-35), cautions: ['fires'] });
    expect(both.map(plain)).toEqual(['fires', expect.stringMatching(/35 mV, is above the tolerance of 5 mV/)]);
    expect(cautionsOf({ clamp, numerical: computed(35), cautions: ['Numerical uncertainty is large'] })).toHaveLength(
      1,
    );
    // Stored by an engine that gave none.
    expect(cautionsOf({ clamp: null, numerical: { state: 'pending', clampError_mV: null, reach: null } })).toEqual([]);
  });

  it('the largest command is told for a pipette in current clamp alone', () => {
    const trace = (key: string, unit: Trace['unit'], values: number[]): Trace => ({
      sweep: 0,
      key,
      unit,
      start_ms: 0,
      interval_ms: 1,
      values: Float64Array.from(values),
    });
    const traces = [trace('command:A', 'mV', [-80, 10]), trace('command:B', 'pA', [0, -500, 100])];
    expect(largestCommand(traces, 'A')).toBeNull();
    expect(largestCommand(traces, 'B')).toBe(-500);
  });
});

describe('values of a rehearsal on the cell as it stands', () => {
  it('are those of the nearest centre on the same branch, whatever the cut', () => {
    const from = table([0, 1, 1], [0, 10, 30]);
    const to = table([0, 1, 1, 1, 2], [0, 5, 22, 40, 3]);
    expect([...onGrid(Float64Array.of(1, 2, 3), from, to)]).toEqual([1, 2, 3, 3, NaN]);
    expect(onGrid(Float64Array.of(1, 2, 3), from, from)).toEqual(Float64Array.of(1, 2, 3));
  });

  it('are those of the same name in a sketch', () => {
    const from = table([0, 1], [0, 0], ['a', 'b']);
    const to = table([0, 1, 2], [0, 0, 0], ['b', 'c', 'a']);
    expect([...onGrid(Float64Array.of(1, 2), from, to)]).toEqual([2, NaN, 1]);
  });

  it('are carried over to the same geometry only; the membrane may differ', () => {
    const cell = (length_um: number, Rm: number): CellDocument =>
      cellSchema.parse(ballAndStick({ soma_um: 20, stick_um: 2, length_um }, { Rm, Ri: 100, Cm: 1 }));
    expect(isSameShape(cell(100, 1e4), cell(100, 2e4))).toBe(true);
    expect(isSameShape(cell(100, 1e4), cell(101, 1e4))).toBe(false);
  });
});

describe('figures of a pipette', () => {
  it('the input resistance is that at its own site', () => {
    const pipette = (letter: 'A' | 'B') =>
      ({
        letter,
        mode: 'current clamp',
        accessResistance_MOhm: 30,
        bridge_MOhm: 30,
        strayCapacitance_pF: 0,
      }) as PipetteDocument;
    const estimate = { inputResistances_MOhm: { A: 38.2, B: 210 } } as PassiveEstimate;
    const shown = (letter: 'A' | 'B') =>
      derivedFigures(pipette(letter), null, estimate).find(({ words }) => words.startsWith('input resistance'))?.value;
    expect(plain(shown('A') ?? '')).toBe('38.2 MΩ');
    expect(plain(shown('B') ?? '')).toBe('210 MΩ');
  });
});
