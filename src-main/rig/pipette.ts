import type { PipetteDocument, PipetteLetter, RigDocument, Site } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { toSi, type Farad, type Hertz, type Ohm } from '../units/si.ts';

/** A pipette in SI, checked. */
export interface Pipette {
  readonly letter: PipetteLetter;
  readonly site: Site;
  readonly mode: PipetteDocument['mode'];
  /** 0 is ideal. */
  readonly access: Ohm;
  readonly stray: Farad;
  readonly bridge: Ohm;
}

/** The rig's pipettes in SI, in the document's order. The document has passed `rigFaults`. */
export function pipettesOf(rig: RigDocument): Pipette[] {
  return rig.pipettes.map((pipette) => ({
    letter: pipette.letter,
    site: pipette.site,
    mode: pipette.mode,
    access: toSi(pipette.accessResistance_MOhm, 'MOhm'),
    stray: toSi(pipette.strayCapacitance_pF, 'pF'),
    bridge: toSi(pipette.bridge_MOhm, 'MOhm'),
  }));
}

/** What is wrong with a rig on its own: letters used twice, bridge in voltage clamp. Places from "rig". */
export function rigFaults(rig: RigDocument): RefusalData[] {
  return rig.pipettes.flatMap((pipette, p) => {
    const place = `rig.pipettes[${p}]`;
    const faults: RefusalData[] = [];
    if (rig.pipettes.findIndex(({ letter }) => letter === pipette.letter) !== p) {
      const remedy = 'give each pipette its own letter';
      faults.push({ code: 'name-twice', thing: 'pipette', place: `${place}.letter`, value: pipette.letter, remedy });
    }
    if (pipette.mode === 'voltage clamp' && pipette.bridge_MOhm !== 0) {
      faults.push({
        code: 'quantity-out-of-range',
        thing: 'bridge balance in voltage clamp',
        place: `${place}.bridge_MOhm`,
        value: `${pipette.bridge_MOhm} MΩ`,
        remedy: 'give 0: the bridge belongs to current clamp',
      });
    }
    return faults;
  });
}

/** Whether the pipette adds nothing of its own to what is measured through it. */
export function isPerfect(pipette: Pick<Pipette, 'access' | 'stray' | 'bridge'>): boolean {
  return pipette.access === 0 && pipette.stray === 0 && pipette.bridge === 0;
}

/**
 * Corner of the low-pass that the access resistance makes with the cell, 1/(2π·R·C).
 *
 * @param capacitance the whole cell's, in parallel: a lower bound where the cell is not isopotential.
 * @returns null for an ideal pipette.
 * @source common practice; τ ≈ Rs·Cm as in Traynelis (1998), J Neurosci Methods 86:25 (from memory).
 */
export function clampBandwidth(access: Ohm, capacitance: Farad): Hertz | null {
  return access === 0 ? null : 1 / (2 * Math.PI * access * capacitance);
}
