// Sites: from a branch and micrometres, or a compartment's name, to a compartment of the grid.
import type { Site } from '../contract/documents.ts';
import { refuse } from '../units/refuse.ts';
import { fromSi, toSi, type Metre } from '../units/si.ts';

/** A site nearer than this to a centre that is there anyway uses that one, m. Design choice: far below any pipette's tip. */
export const sameSite = 0.5e-6;

/** Rounding of a typed length, m. */
const rounding = 1e-9;

export interface Place {
  readonly branch: number;
  readonly at: Metre;
}

/**
 * A site on a shape, as branch and metres.
 *
 * @param lengths of the branches, m.
 * @throws Refusal `site-off-the-cell` with the allowed range.
 */
export function placeOf(site: Site, lengths: readonly Metre[], place: string): Place {
  if ('compartment' in site)
    return refuse('site-off-the-cell', {
      thing: 'site',
      place: `${place}.compartment`,
      value: site.compartment,
      remedy: `give branch and at_um; this cell has a shape with branches 0 to ${lengths.length - 1}`,
    });
  const length = lengths[site.branch];
  if (length === undefined)
    return refuse('site-off-the-cell', {
      thing: 'branch of the site',
      place: `${place}.branch`,
      value: String(site.branch),
      remedy: `give a branch from 0 to ${lengths.length - 1}`,
    });
  const at = toSi(site.at_um, 'um');
  if (!(at >= 0 && at <= length + rounding))
    return refuse('site-off-the-cell', {
      thing: `distance along branch ${site.branch}`,
      place: `${place}.at_um`,
      value: `${site.at_um} µm`,
      remedy: `give a distance from 0 to ${fromSi(length, 'um').toFixed(3)} µm`,
    });
  return { branch: site.branch, at: Math.min(at, length) };
}

/**
 * A site on a sketched cell, by name, or as branch (the compartment's own index) at 0.
 *
 * @throws Refusal `site-off-the-cell`.
 */
export function sketchedSite(site: Site, names: readonly string[], place: string): number {
  if ('compartment' in site) {
    const k = names.indexOf(site.compartment);
    if (k >= 0) return k;
    const some = names.slice(0, 12).join(', ') + (names.length > 12 ? ', ...' : '');
    return refuse('site-off-the-cell', {
      thing: 'site',
      place: `${place}.compartment`,
      value: site.compartment,
      remedy: `name one of: ${some}`,
    });
  }
  return placeOf(site, Array<number>(names.length).fill(0), place).branch;
}

/** Index of the entry of an ascending list that is nearest to x; of two, the first. */
export function nearestIndex(ascending: readonly number[], x: number): number {
  let low = 0;
  let high = ascending.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (ascending[middle]! < x) low = middle + 1;
    else high = middle;
  }
  return low > 0 && x - ascending[low - 1]! <= ascending[low]! - x ? low - 1 : low;
}
