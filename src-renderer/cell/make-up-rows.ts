// The rows of the make-up table: what can be changed of a region's membrane. Pure.
import type { MakeUpDocument, ShapedCellDocument } from '../../src-main/contract/documents.ts';

export interface MakeUpRow {
  readonly words: string;
  readonly unit: string;
  readonly step: number;
  readonly least: number;
  readonly most: number;
  /** Null where the region has no such thing. */
  readonly read: (m: MakeUpDocument) => number | null;
  readonly write: (m: MakeUpDocument, value: number) => MakeUpDocument;
}

const fixed: readonly MakeUpRow[] = [
  {
    words: 'capacitance',
    unit: 'µF/cm²',
    step: 0.05,
    least: 0.001,
    most: 100,
    read: (m) => m.capacitance_uF_cm2,
    write: (m, capacitance_uF_cm2) => ({ ...m, capacitance_uF_cm2 }),
  },
  {
    words: 'axial resistivity',
    unit: 'Ω·cm',
    step: 10,
    least: 0.1,
    most: 100_000,
    read: (m) => m.axialResistivity_Ohm_cm,
    write: (m, axialResistivity_Ohm_cm) => ({ ...m, axialResistivity_Ohm_cm }),
  },
  {
    words: 'spine factor',
    unit: '',
    step: 0.1,
    least: 1,
    most: 10,
    read: (m) => m.spineFactor,
    write: (m, spineFactor) => ({ ...m, spineFactor }),
  },
  {
    words: 'leak',
    unit: 'mS/cm²',
    step: 0.005,
    least: 0,
    most: 1000,
    read: (m) => m.leak.conductance_mS_cm2,
    write: (m, conductance_mS_cm2) => ({ ...m, leak: { ...m.leak, conductance_mS_cm2 } }),
  },
  {
    words: 'leak reversal',
    unit: 'mV',
    step: 1,
    least: -200,
    most: 200,
    read: (m) => m.leak.reversal_mV,
    write: (m, reversal_mV) => ({ ...m, leak: { ...m.leak, reversal_mV } }),
  },
];

/** The fixed rows, then one per channel that any region has, under what `channelWords` calls it. */
export function makeUpRows(cell: ShapedCellDocument, channelWords: (channel: string) => string): readonly MakeUpRow[] {
  const names = new Set(cell.makeUp.flatMap((m) => m.channels.map((c) => c.channel)));
  return [...fixed, ...[...names].map((channel) => channelRow(channel, channelWords(channel)))];
}

function channelRow(channel: string, words: string): MakeUpRow {
  return {
    words,
    unit: 'mS/cm²',
    step: 1,
    least: 0,
    most: 100_000,
    read: (m) => m.channels.find((c) => c.channel === channel)?.density_mS_cm2 ?? null,
    write: (m, density_mS_cm2) => ({
      ...m,
      channels: m.channels.map((c) => (c.channel === channel ? { ...c, density_mS_cm2 } : c)),
    }),
  };
}
