// A cell made by a generator, with a plain membrane to start from. Pure.
import type { CellDocument, Generator, MakeUpDocument, RegionDocument } from '../../src-main/contract/documents.ts';

/** Passive membrane of a hippocampal pyramidal kind: 1 µF/cm², 150 Ω·cm, 20 kΩ·cm². Common practice. */
function passive(region: string): MakeUpDocument {
  return {
    region,
    capacitance_uF_cm2: 1,
    axialResistivity_Ohm_cm: 150,
    spineFactor: 1,
    leak: { conductance_mS_cm2: 0.05, reversal_mV: -70 },
    channels: [],
  };
}

/** SWC types 1 to 4, INCF SWC specification: soma, axon, basal dendrite, apical dendrite. */
const named = [
  { name: 'soma', swcTypes: [1] },
  { name: 'axon', swcTypes: [2] },
  { name: 'basal', swcTypes: [3] },
  { name: 'apical', swcTypes: [4] },
] as const;

/** A document for a generated cell: the four usual regions, or the soma and its stick, all with passive membrane. */
export function madeCell(name: string, generator: Generator): CellDocument {
  const regions: RegionDocument[] =
    generator.kind === 'sphere'
      ? [{ name: 'soma', swcTypes: [1], from_um: 0 }]
      : generator.kind === 'ball-and-stick'
        ? [
            { name: 'soma', swcTypes: [1], from_um: 0 },
            { name: 'dendrite', swcTypes: [3, 4], from_um: 0 },
          ]
        : named.map((r) => ({ name: r.name, swcTypes: [...r.swcTypes], from_um: 0 }));
  return {
    kind: 'cell',
    format: 1,
    name,
    note: 'Made by a generator; its membrane is a passive starting point.',
    surroundings: { temperature_C: 22 },
    channels: [],
    shape: { kind: 'generator', generator },
    regions,
    makeUp: regions.map((r) => passive(r.name)),
  };
}
