// Which region a piece of cable belongs to: by SWC type and path distance, the first that fits.
import type { RegionDocument } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { toSi, type Metre } from '../units/si.ts';

export interface Region {
  readonly name: string;
  readonly types: ReadonlySet<number>;
  /** Path distance from the soma's surface, m: from ≤ distance < to. */
  readonly from: Metre;
  readonly to: Metre;
}

/** A document's regions in SI, in its order; faults go to `faults`: a name given twice, an empty span. */
export function regionsOf(documents: readonly RegionDocument[], faults: RefusalData[]): Region[] {
  const names = new Set<string>();
  return documents.map((document, n) => {
    const place = `cell.regions[${n}]`;
    if (names.has(document.name))
      faults.push({
        code: 'name-twice',
        thing: 'region',
        place: `${place}.name`,
        value: document.name,
        remedy: 'give every region a name of its own',
      });
    names.add(document.name);
    if (document.to_um !== undefined && document.to_um <= document.from_um)
      faults.push({
        code: 'quantity-out-of-range',
        thing: 'end of the region',
        place: `${place}.to_um`,
        value: `${document.to_um} µm`,
        remedy: `give a distance above from_um, ${document.from_um} µm`,
      });
    return {
      name: document.name,
      types: new Set(document.swcTypes),
      from: toSi(document.from_um, 'um'),
      to: document.to_um === undefined ? Infinity : toSi(document.to_um, 'um'),
    };
  });
}

/** Index of the first region that takes cable of this type at this distance; -1 when none does. */
export function regionAt(regions: readonly Region[], type: number, distance: Metre): number {
  return regions.findIndex((region) => region.types.has(type) && region.from <= distance && distance < region.to);
}

/** Distances inside (from, to) at which cable of this type may change its region, ascending. */
export function bordersWithin(regions: readonly Region[], type: number, from: Metre, to: Metre): Metre[] {
  const borders = regions.filter((region) => region.types.has(type)).flatMap((region) => [region.from, region.to]);
  return [...new Set(borders)].filter((border) => border > from && border < to).sort((a, b) => a - b);
}
