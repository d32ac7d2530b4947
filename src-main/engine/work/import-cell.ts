import type { MakeUpDocument, RegionDocument, ShapedCellDocument } from '../../contract/documents.ts';
import { documentFormat } from '../../contract/documents.ts';
import { readSwc } from '../../cell/swc-read.ts';
import { textOfSwc } from '../../cell/swc-text.ts';
import type { WorkAnswer, WorkQuestion } from '../work.ts';

/** @source INCF SWC specification 1.0.3, structure identifiers. */
const standardRegions: readonly { readonly name: string; readonly type: number }[] = [
  { name: 'soma', type: 1 },
  { name: 'axon', type: 2 },
  { name: 'basal', type: 3 },
  { name: 'apical', type: 4 },
];

/**
 * A cell around a shape file: a region for every kind of cable in it, each with a passive make-up to start from. Those
 * values are assumed, and the note says so: a shape file holds no membrane. No cell where the file is refused.
 */
export function importCell({ name, bytes }: WorkQuestion<'import cell'>): WorkAnswer<'import cell'> {
  const reading = readSwc(bytes);
  if (reading.kind === 'refused') return { cell: null, report: reading.report };
  const types = new Set(reading.samples.map(({ type }) => type));
  const regions = regionsFor(types);
  const bareName = name.replace(/^.*[/\\]/u, '').replace(/\.swc$/iu, '');
  const cell: ShapedCellDocument = {
    kind: 'cell',
    format: documentFormat,
    name: bareName.trim() === '' ? name : bareName.trim(),
    note: 'The membrane values are assumed to start with: the shape file holds none. Set them from your own recordings.',
    surroundings: { temperature_C: 22 },
    channels: [],
    shape: { kind: 'swc', text: textOfSwc(bytes), fileName: name },
    regions,
    makeUp: regions.map(assumedMakeUp),
  };
  return { cell, report: reading.report };
}

function regionsFor(types: ReadonlySet<number>): RegionDocument[] {
  const standard = standardRegions.filter(({ type }) => types.has(type));
  const known = new Set(standardRegions.map(({ type }) => type));
  const others = [...types].filter((type) => !known.has(type)).toSorted((a, b) => a - b);
  const regions = standard.map(({ name, type }): RegionDocument => ({ name, swcTypes: [type], from_um: 0 }));
  return others.length === 0 ? regions : [...regions, { name: 'other', swcTypes: others, from_um: 0 }];
}

/** 1 µF/cm², 150 Ω·cm, 20 kΩ·cm², −70 mV: common practice for a first guess at a passive neuron. */
function assumedMakeUp({ name }: RegionDocument): MakeUpDocument {
  return {
    region: name,
    capacitance_uF_cm2: 1,
    axialResistivity_Ohm_cm: 150,
    spineFactor: 1,
    leak: { conductance_mS_cm2: 0.05, reversal_mV: -70 },
    channels: [],
  };
}
