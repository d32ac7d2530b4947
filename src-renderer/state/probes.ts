// Probes: places whose true membrane voltage a rehearsal keeps.
import type { Site } from '../../src-main/contract/documents.ts';
import { probeName } from '../text/places.ts';
import { drawing } from './drawing.svelte.ts';
import { hover } from './hover.svelte.ts';
import { notices } from './notices.svelte.ts';
import { plan } from './plan.svelte.ts';
import { selection } from './selection.svelte.ts';

/** As the document allows. */
const mostProbes = 64;

/** Places a probe where the pointer is on the cell, else at the selected place. */
export function placeProbe(): void {
  if (!plan.isOpen || drawing.drawing === null) return;
  const chosen = selection.current;
  const site = hover.place?.site ?? (chosen.kind === 'compartment' ? chosen.site : null);
  if (site === null) notices.say('Point at a place on the cell, or select one, then press P.');
  else placeProbeAt(site);
}

export function placeProbeAt(site: Site): void {
  if (drawing.drawing === null) return;
  if (plan.document.probes.length >= mostProbes) {
    notices.say(`A plan holds ${mostProbes} probes at most.`);
    return;
  }
  const name = probeName(plan.document, drawing.drawing, site);
  plan.change(`probe at ${name}`, (p) => ({ ...p, probes: [...p.probes, { name, site }] }));
  selection.select({ kind: 'probe', name });
}

export function removeProbe(name: string): void {
  plan.change(`remove probe ${name}`, (p) => ({ ...p, probes: p.probes.filter((probe) => probe.name !== name) }));
  selection.clear();
  notices.say(`Probe “${name}” removed`, () => plan.undo());
}
