// What the Rig area does to the plan.
import type { PipetteLetter } from '../../src-main/contract/documents.ts';
import { drawing } from '../state/drawing.svelte.ts';
import { estimate } from '../state/estimate.svelte.ts';
import {
  pipetteOf,
  withMode,
  withoutSecondPipette,
  withPipette,
  withSecondPipette,
  type Mode,
} from '../state/edits/pipette.ts';
import { numberWords } from '../state/edits/words.ts';
import { notices } from '../state/notices.svelte.ts';
import { plan } from '../state/plan.svelte.ts';
import { selection } from '../state/selection.svelte.ts';
import { siteAt } from '../text/places.ts';
import type { PipetteRow } from './pipette-rows.ts';

export function setNumber(letter: PipetteLetter, row: PipetteRow, value: number): void {
  plan.change(
    numberWords(`${row.words} ${letter}`, row.unit, (p) => pipetteOf(p, letter)?.[row.field] ?? 0),
    (p) => withPipette(p, letter, { [row.field]: value }),
    `${row.field} ${letter}`,
  );
}

export function setMode(letter: PipetteLetter, mode: Mode): void {
  const atSite = estimate.of === plan.document ? estimate.value?.inputResistances_MOhm[letter] : undefined;
  const resistance = atSite ?? drawing.drawing?.inputResistance_MOhm ?? null;
  plan.change(`${letter} to ${mode}, levels converted`, (p) => withMode(p, letter, mode, resistance));
  const by =
    resistance === null
      ? '100 MΩ, for want of a better figure'
      : `the input resistance ${atSite === undefined ? 'of the cell' : 'at its site'}, ${resistance.toFixed(0)} MΩ`;
  notices.say(`${letter} is in ${mode}. The levels of its lane were converted by ${by}; look them over.`, () =>
    plan.undo(),
  );
}

/** B goes to the apical dendrite 200 µm out, else to the farthest region's thickest branch. */
export function addSecondPipette(): void {
  const shown = drawing.drawing;
  if (shown === null) return;
  const names = shown.compartments.names;
  const region =
    shown.regions.find((r) => r.name.includes('apical')) ??
    shown.regions.find((r) => r.name !== 'soma') ??
    shown.regions[0];
  const last = names?.at(-1);
  const site =
    last !== undefined ? { compartment: last } : region === undefined ? null : siteAt(shown, region.name, 200);
  plan.change('add pipette B and its lane', (p) => withSecondPipette(p, site ?? { branch: 0, at_um: 0 }));
  selection.selectPipette('B');
}

export function removeSecondPipette(): void {
  plan.change('remove pipette B and its lane', withoutSecondPipette);
  selection.selectPipette('A');
  notices.say('Pipette B and its lane were removed', () => plan.undo());
}
