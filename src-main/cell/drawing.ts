// A cell to look at: branches as polylines, regions with their sizes, and the compartments of its grid.
import type { CellDocument } from '../contract/documents.ts';
import type { CellDrawing, CompartmentTable, DrawnBranch } from '../contract/results.ts';
import { fromSi } from '../units/si.ts';
import { shapedCell, type ShapedCell } from './cut-shape.ts';
import type { Grid } from './grid.ts';

/** Everything of a drawing but what needs an operating point. */
export type GeometryDrawing = Omit<CellDrawing, 'inputResistance_MOhm'>;

/**
 * The drawing of a cell whose grid has been cut. A branch that lies in several regions is drawn under the one that owns
 * most of its length; the compartments tell them apart. A sketch is laid out as a flat tree, each compartment the line from
 * its parent, with the radius of the sphere of its area.
 *
 * @throws Refusal as `cutGrid`.
 */
export function drawCell(cell: CellDocument, grid: Grid): GeometryDrawing {
  return 'compartments' in cell ? drawSketch(grid) : drawShape(shapedCell(cell), 'text' in cell.shape, grid);
}

function drawShape(cell: ShapedCell, isFromFile: boolean, grid: Grid): GeometryDrawing {
  const { shape, cable, regions } = cell;
  const lengths = regions.map(() => 0);
  for (const pieces of cable.pieces) for (const { region, from, to } of pieces) lengths[region]! += to - from;
  const branches = shape.branches.map((branch, b): DrawnBranch => {
    const region = longestRegion(cell, b);
    return {
      branch: b,
      parent: branch.parent,
      region: regions[region]?.name ?? grid.regionNames[0]!,
      xyz_um: inMicrometres(branch.xyz),
      radius_um: inMicrometres(branch.radius),
      at_um: inMicrometres(branch.at),
      startDistance_um: fromSi(branch.startDistance, 'um'),
    };
  });
  const { soma } = shape;
  return {
    ...sumsOf(grid, lengths),
    branches,
    soma:
      soma === null
        ? null
        : {
            xyz_um: [fromSi(soma.centre[0], 'um'), fromSi(soma.centre[1], 'um'), fromSi(soma.centre[2], 'um')],
            radius_um: fromSi(soma.radius, 'um'),
          },
    swcReport: isFromFile ? shape.report : null,
  };
}

/** Region that owns most of a branch's length; the soma sphere's; -1 for a stem of one sample. */
function longestRegion(cell: ShapedCell, branch: number): number {
  const pieces = cell.cable.pieces[branch]!;
  if (pieces.length === 0) return branch === 0 ? cell.cable.sphereRegion : -1;
  const lengths = cell.regions.map(() => 0);
  for (const { region, from, to } of pieces) lengths[region]! += to - from;
  return lengths.indexOf(lengths.reduce((a, b) => Math.max(a, b)));
}

function drawSketch(grid: Grid): GeometryDrawing {
  const radius = grid.area.map((area) => fromSi(Math.sqrt(area / (4 * Math.PI)), 'um'));
  const xyz = inMicrometres(grid.position);
  const at = (k: number) => xyz.subarray(3 * k, 3 * k + 3);
  const branches = Array.from({ length: grid.count }, (_, k): DrawnBranch => {
    const parent = grid.parent[k]!;
    const points = parent < 0 ? [k] : [parent, k];
    return {
      branch: k,
      parent,
      region: grid.regionNames[0]!,
      xyz_um: Float64Array.from(points.flatMap((point) => [...at(point)])),
      radius_um: Float64Array.from(points, () => radius[k]!),
      at_um: new Float64Array(points.length),
      startDistance_um: 0,
    };
  });
  return {
    ...sumsOf(grid, [0]),
    branches,
    soma: { xyz_um: [xyz[0]!, xyz[1]!, xyz[2]!], radius_um: radius[0]! },
    swcReport: null,
  };
}

function sumsOf(grid: Grid, lengths: readonly number[]) {
  const total = (values: Float64Array) => values.reduce((sum, value) => sum + value, 0);
  const compartments: CompartmentTable = {
    count: grid.count,
    branch: grid.branch,
    at_um: inMicrometres(grid.at),
    distance_um: inMicrometres(grid.distance),
    area_um2: grid.area.map((area) => fromSi(area, 'um2')),
    regionIndex: grid.regionIndex,
    regionNames: grid.regionNames,
    names: grid.names,
  };
  return {
    regions: grid.regionNames.map((name, r) => ({
      name,
      area_um2: fromSi(total(grid.regionArea[r]!), 'um2'),
      length_um: fromSi(lengths[r]!, 'um'),
    })),
    compartments,
    totalArea_um2: fromSi(total(grid.area), 'um2'),
    totalCapacitance_pF: fromSi(total(grid.capacitance), 'pF'),
  };
}

function inMicrometres(metres: Float64Array): Float64Array {
  return metres.map((value) => fromSi(value, 'um'));
}
