// A shaped cell to its grid: finite volumes around nodes, from midpoint to midpoint.
import type { ShapedCellDocument, Site } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import type { Metre, SquareMetre } from '../units/si.ts';
import { cableOf, eachSlice, type Cable } from './cable.ts';
import { ConductanceSums } from './conductance-sums.ts';
import { refuseFaults } from './faults.ts';
import { axialResistance, sideArea } from './frustum.ts';
import type { Grid } from './grid.ts';
import { makeUpsOf, type MakeUp } from './make-up.ts';
import { mostCompartments, nodePlaces, refuseTooLarge } from './nodes.ts';
import { regionsOf, type Region } from './regions.ts';
import { lengthOf, shapeOf, type Shape, type ShapeBranch } from './shape.ts';
import { nearestIndex, placeOf, sameSite, type Place } from './sites.ts';

/** A shaped cell with its regions and make-ups, checked and in SI. */
export interface ShapedCell {
  readonly shape: Shape;
  readonly regions: readonly Region[];
  readonly makeUps: readonly MakeUp[];
  readonly cable: Cable;
}

/** @throws Refusal with every fault of the document. */
export function shapedCell(cell: ShapedCellDocument): ShapedCell {
  const faults: RefusalData[] = [];
  const regions = regionsOf(cell.regions, faults);
  const makeUps = makeUpsOf(cell.makeUp, regions, cell.channels, faults);
  const shape = shapeOf(cell.shape);
  const cable = cableOf(shape, regions, faults);
  refuseFaults(faults);
  return { shape, regions, makeUps, cable };
}

/** Centres on one branch: places ascend, nodes[0] is the parent's. */
interface BranchNodes {
  readonly places: readonly Metre[];
  readonly nodes: readonly number[];
}

/** See `cutGrid`. */
export function cutShape(document: ShapedCellDocument, sites: readonly Site[], fineness: number): Grid {
  const cell = shapedCell(document);
  const lengths = cell.shape.branches.map(lengthOf);
  const wanted = sites.map((site, n) => placeOf(site, lengths, `sites[${n}]`));
  const byBranch = nodesOfBranches(cell, lengths, wanted, fineness);
  const sums = sumUp(cell, byBranch);
  const compartmentAt = (site: Site, place: string) => {
    const { branch, at } = placeOf(site, lengths, place);
    const { places, nodes } = byBranch[branch]!;
    return nodes[nearestIndex(places, at)]!;
  };
  return { ...sums, names: null, compartmentAt };
}

function nodesOfBranches(
  cell: ShapedCell,
  lengths: readonly Metre[],
  sites: readonly Place[],
  fineness: number,
): BranchNodes[] {
  const { branches } = cell.shape;
  const fixed = lengths.map((length) => new Set([0, length]));
  for (const branch of branches) if (branch.parent >= 0) fixed[branch.parent]!.add(branch.parentAt);
  const byBranch: BranchNodes[] = [];
  let count = 1;
  branches.forEach((branch, b) => {
    const own = sites.filter((site) => site.branch === b).map((site) => site.at);
    const places = nodePlaces(cell.cable.pieces[b]!, cell.makeUps, withSites(fixed[b]!, own), fineness);
    const above = byBranch[branch.parent];
    const start = above === undefined ? 0 : above.nodes[nearestIndex(above.places, branch.parentAt)]!;
    const nodes = places.map((_, n) => (n === 0 ? start : count + n - 1));
    count += places.length - 1;
    if (count > mostCompartments) refuseTooLarge();
    byBranch.push({ places, nodes });
  });
  return byBranch;
}

/** Places that must be centres, ascending; sites too near to one of them use that. */
function withSites(fixed: ReadonlySet<Metre>, sites: readonly Metre[]): Metre[] {
  const all = [...fixed];
  for (const site of sites.toSorted((a, b) => a - b))
    if (all.every((place) => Math.abs(place - site) >= sameSite)) all.push(site);
  return all.sort((a, b) => a - b);
}

/** Everything of a grid but the ways to look a compartment up. */
type Sums = Omit<Grid, 'names' | 'compartmentAt'>;

function sumUp(cell: ShapedCell, byBranch: readonly BranchNodes[]): Sums {
  const { shape, regions, makeUps, cable } = cell;
  const count = 1 + byBranch.reduce((sum, { places }) => sum + places.length - 1, 0);
  const parent = new Int32Array(count).fill(-1);
  const coupling = new Float64Array(count);
  const capacitance = new Float64Array(count);
  const regionArea = regions.map(() => new Float64Array(count));
  const regionStretch = regions.map(() => ({ own: new Float64Array(count), parents: new Float64Array(count) }));
  const conductances = new ConductanceSums(count);
  const branchOf = new Int32Array(count);
  const at = new Float64Array(count);
  const distance = new Float64Array(count);
  const position = new Float64Array(3 * count);
  const cover = (k: number, region: number, smoothArea: number): SquareMetre => {
    const makeUp = makeUps[region]!;
    const area = smoothArea * makeUp.spineFactor;
    regionArea[region]![k]! += area;
    capacitance[k]! += area * makeUp.capacitance;
    for (const { channel, density, reversal } of makeUp.channels)
      conductances.add(k, channel, area * density, reversal);
    return area;
  };
  position.set(shape.soma?.kind === 'sphere' ? shape.soma.centre : shape.branches[0]!.xyz.subarray(0, 3));
  if (cable.sphereRegion >= 0) cover(0, cable.sphereRegion, 4 * Math.PI * shape.soma!.radius ** 2);
  shape.branches.forEach((branch, b) => {
    const { places, nodes } = byBranch[b]!;
    for (let n = 1; n < places.length; n += 1) {
      const k = nodes[n]!;
      parent[k] = nodes[n - 1]!;
      branchOf[k] = b;
      at[k] = places[n]!;
      distance[k] = branch.isSoma ? 0 : branch.startDistance + places[n]!;
      position.set(pointAt(branch, places[n]!), 3 * k);
    }
    // Even places are centres, odd ones the borders between them: slice s of halves belongs to the centre at its end.
    const halves = places.flatMap((place, n) => (n === 0 ? [place] : [(places[n - 1]! + place) / 2, place]));
    const resistance = new Float64Array(places.length);
    eachSlice(cable.pieces[b]!, halves, (s, region, r0, r1, length) => {
      const area = cover(nodes[(s + 1) >> 1]!, region, sideArea(r0, r1, length));
      const stretch = regionStretch[region]!;
      (s % 2 === 0 ? stretch.parents : stretch.own)[nodes[(s >> 1) + 1]!]! += area;
      resistance[(s >> 1) + 1]! += axialResistance(makeUps[region]!.axial, r0, r1, length);
    });
    for (let n = 1; n < places.length; n += 1) coupling[nodes[n]!] = 1 / resistance[n]!;
  });
  const area = new Float64Array(count).map((_, k) => regionArea.reduce((sum, areas) => sum + areas[k]!, 0));
  return {
    count,
    parent,
    coupling,
    area,
    capacitance,
    conductances: conductances.list(),
    branch: branchOf,
    at,
    distance,
    position,
    regionNames: regions.map((region) => region.name),
    regionIndex: Int32Array.from(area, (_, k) => largest(regionArea, k)),
    regionArea,
    regionStretch,
  };
}

function largest(regionArea: readonly Float64Array[], k: number): number {
  return regionArea.reduce((best, areas, r) => (areas[k]! > regionArea[best]![k]! ? r : best), 0);
}

/** The point of a branch's midline at a length from its start, m. */
function pointAt(branch: ShapeBranch, x: Metre): [Metre, Metre, Metre] {
  let low = 0;
  let high = branch.at.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (branch.at[middle]! < x) low = middle + 1;
    else high = middle;
  }
  if (low === 0) return [branch.xyz[0]!, branch.xyz[1]!, branch.xyz[2]!];
  const from = branch.at[low - 1]!;
  const share = (x - from) / (branch.at[low]! - from);
  const along = (axis: number) => branch.xyz[3 * low - 3 + axis]! * (1 - share) + branch.xyz[3 * low + axis]! * share;
  return [along(0), along(1), along(2)];
}
