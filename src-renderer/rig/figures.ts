// Figures derived from a pipette's values, with where they come from. Pure.
import type { PipetteDocument } from '../../src-main/contract/documents.ts';
import type { CellDrawing, PassiveEstimate } from '../../src-main/contract/results.ts';
import { scaled, signedFigure } from '../text/quantity.ts';

export interface DerivedFigure {
  readonly words: string;
  readonly value: string;
  readonly note: string;
}

/**
 * Bandwidth of a clamp through an access resistance into a capacitance, f = 1/(2πRC).
 *
 * @returns Hz; null for an ideal pipette.
 * @source one-pole circuit; common practice for whole-cell recording.
 */
export function clampBandwidth_Hz(access_MOhm: number, capacitance_pF: number): number | null {
  // MΩ·pF = µs.
  const tau_us = access_MOhm * capacitance_pF;
  return tau_us > 0 ? 1e6 / (2 * Math.PI * tau_us) : null;
}

/** What the pipette does to the recording, before any rehearsal. */
export function derivedFigures(
  pipette: PipetteDocument,
  drawing: CellDrawing | null,
  estimate: PassiveEstimate | null,
): readonly DerivedFigure[] {
  const own = pipette.mode === 'voltage clamp' ? clampFigures(pipette, drawing, estimate) : currentFigures(pipette);
  const resistance = estimate?.inputResistances_MOhm[pipette.letter];
  if (resistance === undefined) return own;
  return [
    ...own,
    {
      words: 'input resistance at its site, estimate',
      value: scaled(resistance, 'MΩ'),
      note: 'steady, gates frozen, no clamp active',
    },
  ];
}

function clampFigures(
  { letter, accessResistance_MOhm: access }: PipetteDocument,
  drawing: CellDrawing | null,
  estimate: PassiveEstimate | null,
): readonly DerivedFigure[] {
  const rows: DerivedFigure[] = [];
  if (drawing !== null) {
    const bandwidth = clampBandwidth_Hz(access, drawing.totalCapacitance_pF);
    const cell = scaled(drawing.totalCapacitance_pF, 'pF');
    rows.push({
      words: 'clamp bandwidth',
      value: bandwidth === null ? 'no limit: ideal pipette' : scaled(bandwidth, 'Hz'),
      note: `1/(2π·R·C), R the access, C the whole cell's ${cell}`,
    });
    const tau_us = access * drawing.totalCapacitance_pF;
    rows.push({ words: 'charging time constant', value: scaled(tau_us / 1000, 'ms'), note: 'R·C of the same two' });
  }
  if (letter === 'A' && estimate?.accessError_mV != null) {
    rows.push({
      words: 'access error, estimate',
      value: signedFigure(estimate.accessError_mV, 'mV'),
      note: 'steady, passive, at the largest step of the plan',
    });
  }
  return rows;
}

function currentFigures(pipette: PipetteDocument): readonly DerivedFigure[] {
  const { accessResistance_MOhm: access, bridge_MOhm: bridge, strayCapacitance_pF: stray } = pipette;
  const left = access - bridge;
  const rows: DerivedFigure[] = [
    {
      words: 'bridge error per 100 pA',
      value: signedFigure(left * 0.1, 'mV'),
      note: 'current × (access − bridge)',
    },
  ];
  if (stray > 0) {
    rows.push({
      words: 'lag of the recorded voltage',
      value: scaled((access * stray) / 1000, 'ms'),
      note: 'access × stray capacitance',
    });
  }
  return rows;
}
