// The model on the picture: every piece in pixels, for one camera. Shared by the painter and the hit test.
import type { Camera, Size } from './camera.ts';
import { project, projection } from './camera.ts';
import type { CellModel } from './cell-model.ts';

/** Piece i runs from (xy[4i], xy[4i+1]) to (xy[4i+2], xy[4i+3]), px. */
export interface Projected {
  readonly model: CellModel;
  readonly xy: Float32Array;
  /** Line width, px; never under 1. */
  readonly width: Float32Array;
  readonly soma: { readonly x: number; readonly y: number; readonly radius: number } | null;
  readonly zoom: number;
}

const thinnest_px = 1;

/** Projects every piece. O(pieces), no allocation beyond the two arrays. */
export function projected(model: CellModel, camera: Camera, size: Size): Projected {
  const p = projection(camera, size);
  const xy = new Float32Array(4 * model.count);
  const width = new Float32Array(model.count);
  const points = model.points_um;
  for (let end = 0; end < 2 * model.count; end++) {
    const x = points[3 * end] ?? 0;
    const y = points[3 * end + 1] ?? 0;
    const z = points[3 * end + 2] ?? 0;
    xy[2 * end] = p.a * x + p.b * y + p.c * z + p.e;
    xy[2 * end + 1] = p.d * x + p.f * y + p.g * z + p.h;
  }
  // Flat layouts spread far wider than branches are thick: there thickness is shown doubled.
  const scale = 2 * camera.zoom * (model.isFlat ? 2 : 1);
  for (let i = 0; i < model.count; i++) width[i] = Math.max(thinnest_px, scale * (model.radius_um[i] ?? 0));
  const disc = model.soma;
  if (disc === null) return { model, xy, width, soma: null, zoom: camera.zoom };
  const [x, y] = project(p, disc.x, disc.y, disc.z);
  const soma = { x, y, radius: Math.max(4, disc.radius_um * camera.zoom) };
  return { model, xy, width, soma, zoom: camera.zoom };
}
