// The rows of the pipette table: one number of a pipette each. Pure.
import type { PipetteDocument } from '../../src-main/contract/documents.ts';

export interface PipetteRow {
  readonly words: string;
  readonly unit: string;
  readonly step: number;
  readonly most: number;
  readonly field: 'accessResistance_MOhm' | 'strayCapacitance_pF' | 'bridge_MOhm';
  /** Why it means nothing for this pipette; undefined where it does. */
  readonly idle: (p: PipetteDocument) => string | undefined;
}

export const pipetteRows: readonly PipetteRow[] = [
  {
    words: 'access resistance',
    unit: 'MΩ',
    step: 1,
    most: 10_000,
    field: 'accessResistance_MOhm',
    idle: () => undefined,
  },
  {
    words: 'stray capacitance',
    unit: 'pF',
    step: 0.5,
    most: 1000,
    field: 'strayCapacitance_pF',
    idle: () => undefined,
  },
  {
    words: 'bridge',
    unit: 'MΩ',
    step: 1,
    most: 10_000,
    field: 'bridge_MOhm',
    idle: (p) => (p.mode === 'current clamp' ? undefined : 'current clamp only'),
  },
];
