// Closed forms: soma sphere with one sealed cylinder, DC. Soma to tip 1/cosh L, tip to soma 1/(cosh L + (Gs/G∞)·sinh L),
// Rin = 1/(Gs + G∞·tanh L): Rall (1959), Exp Neurol 1:491–527 (from memory). Cells: test vectors in the range of the type.
import { describe, expect, it } from 'vitest';
import { dualSiteOf } from '../../src-main/forecast/attenuation.ts';
import { passiveEstimate } from '../../src-main/forecast/estimate.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import { ballAndStick, planOf, soma } from '../support/plans.ts';
import { hold } from '../support/protocols.ts';

// D, l, d in µm; Rm in kΩ·cm²; Ri in Ω·cm; Cm in µF/cm²; then Rin in MΩ, soma to tip, tip to soma, Rin at the tip.
const cells: [string, number, number, number, number, number, number, number, number, number, number][] = [
  ['layer 5 pyramidal', 20, 1000, 8, 15, 100, 1, 62.7, 0.854, 0.841, 63.6],
  ['CA1 pyramidal', 15, 700, 9, 22, 180, 1, 113.39, 0.917, 0.912, 114.1],
  ['fast-spiking interneuron', 15, 400, 4.8, 9, 170, 0.9, 143.34, 0.886, 0.863, 147.3],
  ['dentate granule', 10, 260, 16.9, 16.8, 300, 0.9, 120.1, 0.986, 0.985, 120.2],
  ['motoneurone', 30, 1480, 20, 5.3, 87, 2.4, 6.75, 0.724, 0.711, 6.9],
  ['cerebellar granule', 6, 15, 2.5, 4, 100, 1, 1732.56, 1.0, 0.999, 1734.1],
];

describe('attenuation between soma and tip', () => {
  it.each(cells)(
    '%s: both directions and both input resistances within 0.5 %%',
    (_, D, l, d, Rm, Ri, Cm, Rin, out, back, RinTip) => {
      const plan = planOf({
        cell: ballAndStick({ soma_um: D, stick_um: d, length_um: l }, { Rm: 1000 * Rm, Ri, Cm, rest_mV: -65 }),
        pipettes: [
          { letter: 'A', site: soma, mode: 'voltage clamp', accessResistance_MOhm: 12 },
          { letter: 'B', site: { branch: 1, at_um: l }, mode: 'current clamp', accessResistance_MOhm: 30 },
        ],
        lanes: [
          { holding: -65, blocks: [hold('h', 5)] },
          { holding: 0, blocks: [hold('h', 5)] },
        ],
      });
      const { figures } = dualSiteOf(preparePlan(plan));
      // The table is printed to 0.0005 and 0.05 MΩ at the tip.
      const within = (value: number, printed: number, half: number): void =>
        expect(Math.abs(value - printed)).toBeLessThan(0.005 * printed + half);
      within(figures!.inputResistanceA_MOhm, Rin, 0.005);
      within(1 / figures!.attenuationAtoB, out, 0.0005);
      within(1 / figures!.attenuationBtoA, back, 0.0005);
      within(figures!.inputResistanceB_MOhm, RinTip, 0.05);
      // Reciprocity: R_AB = R_A/A→B = R_B/B→A.
      expect(figures!.inputResistanceB_MOhm / figures!.attenuationBtoA / figures!.transferResistance_MOhm).toBeCloseTo(
        1,
        9,
      );
      const { inputResistance_MOhm, inputResistances_MOhm } = passiveEstimate(plan);
      expect(inputResistance_MOhm).toBeCloseTo(figures!.inputResistanceA_MOhm, 9);
      // Each pipette's own site, not the clamp's.
      expect(inputResistances_MOhm.A).toBeCloseTo(figures!.inputResistanceA_MOhm, 9);
      expect(inputResistances_MOhm.B).toBeCloseTo(figures!.inputResistanceB_MOhm, 9);
    },
  );

  it('is not given with one pipette', () => {
    const plan = planOf({
      cell: ballAndStick({ soma_um: 20, stick_um: 2, length_um: 100 }, { Rm: 1e4, Ri: 100, Cm: 1 }),
      pipettes: [{ letter: 'A', site: soma, mode: 'current clamp' }],
      lanes: [{ holding: 0, blocks: [hold('h', 5)] }],
    });
    expect(dualSiteOf(preparePlan(plan))).toEqual({ figures: null, notes: [] });
  });
});
