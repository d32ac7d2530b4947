// A sketched cell to its grid: compartments and couplings as given, checked to be one tree.
import type { Site, SketchedCellDocument } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { toSi } from '../units/si.ts';
import { ConductanceSums } from './conductance-sums.ts';
import { refuseFaults } from './faults.ts';
import type { Grid } from './grid.ts';
import { ownReversal } from './make-up.ts';
import { placesOfTree } from './sketch-layout.ts';
import { sketchedSite } from './sites.ts';

/** The one region of a sketch, which has none of its own. */
const wholeCell = 'cell';

/** Row k: compartment `order[k]` of the document, its parent's row, and the coupling to it. */
interface Rooted {
  readonly order: readonly number[];
  readonly parent: Int32Array;
  readonly coupling: Float64Array;
}

/**
 * See `cutGrid`. The document's order is kept where every compartment stands after its parent; else compartments are put
 * depth first. A sketch gives no lengths: path distance is 0 everywhere and positions are a flat tree's, for drawing only.
 */
export function cutSketch(document: SketchedCellDocument, sites: readonly Site[]): Grid {
  const { order, parent, coupling } = rooted(document);
  const compartments = order.map((i) => document.compartments[i]!);
  const count = compartments.length;
  const names = compartments.map((compartment) => compartment.name);
  const area = Float64Array.from(compartments, (compartment) => toSi(compartment.area_um2, 'um2'));
  const conductances = new ConductanceSums(count);
  compartments.forEach((compartment, k) => {
    for (const [channel, density] of Object.entries(compartment.channels))
      conductances.add(k, channel, toSi(density, 'mS_cm2') * area[k]!, ownReversal(document.channels, channel));
  });
  const compartmentAt = (site: Site, place: string) => sketchedSite(site, names, place);
  sites.forEach((site, n) => compartmentAt(site, `sites[${n}]`));
  return {
    count,
    parent,
    coupling,
    area,
    capacitance: Float64Array.from(compartments, (c, k) => toSi(c.capacitance_uF_cm2, 'uF_cm2') * area[k]!),
    conductances: conductances.list(),
    branch: Int32Array.from({ length: count }, (_, k) => k),
    at: new Float64Array(count),
    distance: new Float64Array(count),
    position: placesOfTree(parent, area),
    regionNames: [wholeCell],
    regionIndex: new Int32Array(count),
    regionArea: [area],
    regionStretch: null,
    names,
    compartmentAt,
  };
}

function rooted(document: SketchedCellDocument): Rooted {
  const faults: RefusalData[] = [];
  const indexOf = new Map<string, number>();
  document.compartments.forEach(({ name }, i) => {
    if (indexOf.has(name)) faults.push(nameFault('name-twice', `compartments[${i}].name`, name, 'another name'));
    indexOf.set(name, i);
  });
  const near = document.compartments.map((): { to: number; g: number }[] => []);
  const group = new Groups(document.compartments.length);
  document.couplings_nS.forEach(([a, b, g_nS], n) => {
    const ends = [a, b].map((name, end) => {
      const i = indexOf.get(name);
      if (i === undefined)
        faults.push(nameFault('name-unknown', `couplings_nS[${n}][${end}]`, name, "one of the compartments' names"));
      return i;
    });
    const [i, j] = ends;
    if (i === undefined || j === undefined) return;
    if (!group.join(i, j))
      faults.push({
        code: 'couplings-form-a-loop',
        thing: 'coupling',
        place: `cell.couplings_nS[${n}]`,
        value: `${a} to ${b}`,
        remedy: 'leave out one coupling of the loop; a cell is a tree',
      });
    const g = toSi(g_nS, 'nS');
    near[i]!.push({ to: j, g });
    near[j]!.push({ to: i, g });
  });
  const apart = document.compartments.filter((_, i) => !group.areJoined(0, i)).map(({ name }) => name);
  if (faults.length === 0 && apart.length > 0)
    faults.push({
      code: 'couplings-leave-parts',
      thing: 'compartments without a way to the first',
      place: 'cell.couplings_nS',
      value: apart.slice(0, 12).join(', ') + (apart.length > 12 ? ` and ${apart.length - 12} more` : ''),
      remedy: `couple them to ${document.compartments[0]!.name} or to its neighbours`,
    });
  refuseFaults(faults);
  return rootedAtFirst(near);
}

function nameFault(code: RefusalData['code'], place: string, value: string, remedy: string): RefusalData {
  return { code, thing: 'compartment', place: `cell.${place}`, value, remedy: `give ${remedy}` };
}

function rootedAtFirst(near: readonly (readonly { to: number; g: number }[])[]): Rooted {
  const count = near.length;
  const above = new Int32Array(count).fill(-1);
  const g = new Float64Array(count);
  let order: number[] = [];
  const waiting = [0];
  for (let i = waiting.pop(); i !== undefined; i = waiting.pop()) {
    order.push(i);
    for (const link of near[i]!.toSorted((a, b) => b.to - a.to)) {
      if (link.to === above[i]) continue;
      above[link.to] = i;
      g[link.to] = link.g;
      waiting.push(link.to);
    }
  }
  if (above.every((parent, i) => parent < i)) order = order.toSorted((a, b) => a - b);
  const row = new Int32Array(count);
  order.forEach((i, k) => (row[i] = k));
  return {
    order,
    parent: Int32Array.from(order, (i) => (above[i]! < 0 ? -1 : row[above[i]!]!)),
    coupling: Float64Array.from(order, (i) => g[i]!),
  };
}

/** Which compartments hang together so far. */
class Groups {
  readonly #leader: Int32Array;

  constructor(count: number) {
    this.#leader = Int32Array.from({ length: count }, (_, i) => i);
  }

  #find(i: number): number {
    let top = i;
    while (this.#leader[top] !== top) top = this.#leader[top]!;
    while (this.#leader[i] !== top) {
      const next = this.#leader[i]!;
      this.#leader[i] = top;
      i = next;
    }
    return top;
  }

  areJoined(i: number, j: number): boolean {
    return this.#find(i) === this.#find(j);
  }

  /** False when they were joined before: one more link closes a loop. */
  join(i: number, j: number): boolean {
    const a = this.#find(i);
    const b = this.#find(j);
    this.#leader[a] = b;
    return a !== b;
  }
}
