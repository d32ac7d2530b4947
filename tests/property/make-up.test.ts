// Make-up: every region has one, every make-up a region; spines multiply membrane.
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import type { MakeUpDocument, ShapedCellDocument } from '../../src-main/contract/documents.ts';
import { refusalsOf } from '../support/refusals.ts';
import { passiveCell, total } from '../support/shape-cells.ts';

const passive = passiveCell(
  {
    kind: 'generator',
    generator: { kind: 'ball-and-stick', somaDiameter_um: 10, stickDiameter_um: 2, stickLength_um: 100 },
  },
  { Rm_kOhm_cm2: 20, Ri_Ohm_cm: 100, Cm_uF_cm2: 1 },
);
const one: MakeUpDocument = passive.makeUp[0]!;
const withMakeUp = (...makeUp: MakeUpDocument[]): ShapedCellDocument => ({ ...passive, makeUp });
const areaOf = 100 * Math.PI + 200 * Math.PI;

describe('make-up', () => {
  it('multiplies membrane, capacitance and conductances by the spine factor, not the axial resistance', () => {
    const smooth = cutGrid(passive, []);
    const spiny = cutGrid(withMakeUp({ ...one, spineFactor: 2 }), []);
    const thick = cutGrid(withMakeUp({ ...one, capacitance_uF_cm2: 2 }), []);

    expect(total(smooth.area) * 1e12).toBeCloseTo(areaOf, 6);
    expect(total(spiny.area) * 1e12).toBeCloseTo(2 * areaOf, 6);
    expect(total(spiny.capacitance)).toBeCloseTo(2 * total(smooth.capacitance), 18);
    expect(total(spiny.conductances[0]!.conductance)).toBeCloseTo(2 * total(smooth.conductances[0]!.conductance), 18);
    // The same capacitance makes the same compartments, and these have the same axial resistance.
    expect([...spiny.coupling]).toEqual([...thick.coupling]);
  });

  it('names leak and channels, with the cell’s own reversal potentials where it has them', () => {
    const cell: ShapedCellDocument = {
      ...withMakeUp({
        ...one,
        channels: [
          { channel: 'mine', density_mS_cm2: 3 },
          { channel: 'stored', density_mS_cm2: 2 },
          { channel: 'other', density_mS_cm2: 1, reversal_mV: -12 },
        ],
      }),
      channels: [{ name: 'mine', reversal_mV: 42, gates: [] }],
    };
    const { conductances } = cutGrid(cell, []);

    expect(conductances.map(({ channel }) => channel)).toEqual(['leak', 'mine', 'stored', 'other']);
    expect(conductances[0]?.reversal[0]).toBeCloseTo(-0.065, 12);
    expect(conductances[1]?.reversal[0]).toBeCloseTo(0.042, 12);
    expect(conductances[2]?.reversal[0]).toBeNaN();
    expect(conductances[3]?.reversal[0]).toBeCloseTo(-0.012, 12);
    // mS/cm² × µm² in pS: 10 S/m² × 1e-12 m².
    expect(total(conductances[1]!.conductance)).toBeCloseTo(3 * 10 * areaOf * 1e-12, 18);
  });

  it('keeps a stored reversal apart from a replaced one of the same channel', () => {
    const cell: ShapedCellDocument = {
      ...passive,
      regions: [
        { name: 'soma', swcTypes: [1], from_um: 0 },
        { name: 'rest', swcTypes: [3], from_um: 0 },
      ],
      makeUp: [
        { ...one, region: 'soma', channels: [{ channel: 'k', density_mS_cm2: 1 }] },
        { ...one, region: 'rest', channels: [{ channel: 'k', density_mS_cm2: 1, reversal_mV: -90 }] },
      ],
    };
    const both = cutGrid(cell, []).conductances.filter(({ channel }) => channel === 'k');

    expect(both.map(({ reversal }) => reversal[0])).toEqual([NaN, expect.closeTo(-0.09, 12)]);
    // Compartment 0 is the sphere and half a stretch of the stick: it has both.
    expect(both.every(({ conductance }) => conductance[0]! > 0)).toBe(true);
  });

  it('refuses, all at once and by path, what does not fit the regions', () => {
    const twice = { channel: 'na', density_mS_cm2: 1 };
    const refusals = refusalsOf(() =>
      cutGrid(
        {
          ...withMakeUp({ ...one, region: 'nowhere' }, one, {
            ...one,
            channels: [twice, twice, { channel: 'leak', density_mS_cm2: 1 }],
          }),
          regions: [...passive.regions, { name: 'bare', swcTypes: [9], from_um: 0 }],
        },
        [],
      ),
    );

    expect(refusals.map(({ code, place, value }) => [code, place, value])).toEqual([
      ['name-unknown', 'cell.makeUp[0].region', 'nowhere'],
      ['name-twice', 'cell.makeUp[2].region', 'all'],
      ['name-twice', 'cell.makeUp[2].channels[1].channel', 'na'],
      ['name-twice', 'cell.makeUp[2].channels[2].channel', 'leak'],
      ['document-field-missing', 'cell.regions[1]', 'none for bare'],
    ]);
  });
});
