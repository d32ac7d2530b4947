// Looking at the cell: pure geometry. Micrometres in, CSS pixels out; the tracing's y axis points up.

export interface Camera {
  /** Pixels per micrometre. */
  readonly zoom: number;
  /** Where the cell's origin stands, px from the middle of the picture. */
  readonly x: number;
  readonly y: number;
  /** Turn about the vertical axis and tilt about the horizontal, rad. */
  readonly yaw: number;
  readonly pitch: number;
}

export interface Size {
  readonly width: number;
  readonly height: number;
}

export const front = { yaw: 0, pitch: 0 } as const;

/** The 2 × 3 matrix and shift of a camera: sx = a·x + b·y + c·z + e, sy = d·x + f·y + g·z + h. */
export interface Projection {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly e: number;
  readonly d: number;
  readonly f: number;
  readonly g: number;
  readonly h: number;
}

/** What the camera does to a point, as numbers to multiply with. Parallel projection: lengths can be compared. */
export function projection(camera: Camera, size: Size): Projection {
  const { zoom, yaw, pitch } = camera;
  return {
    a: zoom * Math.cos(yaw),
    b: 0,
    c: zoom * Math.sin(yaw),
    e: size.width / 2 + camera.x,
    d: -zoom * Math.sin(pitch) * Math.sin(yaw),
    f: -zoom * Math.cos(pitch),
    g: zoom * Math.sin(pitch) * Math.cos(yaw),
    h: size.height / 2 + camera.y,
  };
}

/** A point of the cell on the picture, px. */
export function project(p: Projection, x: number, y: number, z: number): [number, number] {
  return [p.a * x + p.b * y + p.c * z + p.e, p.d * x + p.f * y + p.g * z + p.h];
}

/** Moved by pixels. */
export function pan(camera: Camera, dx: number, dy: number): Camera {
  return { ...camera, x: camera.x + dx, y: camera.y + dy };
}

/** Zoomed so that what lies under the pointer stays under it. */
export function zoomAt(camera: Camera, size: Size, px: number, py: number, factor: number): Camera {
  const zoom = Math.min(200, Math.max(0.01, camera.zoom * factor));
  const by = zoom / camera.zoom;
  const fromX = px - size.width / 2;
  const fromY = py - size.height / 2;
  return { ...camera, zoom, x: fromX + (camera.x - fromX) * by, y: fromY + (camera.y - fromY) * by };
}

/** Turned; the tilt stops short of looking from straight above. */
export function turn(camera: Camera, yaw: number, pitch: number): Camera {
  const limit = Math.PI / 2;
  return { ...camera, yaw: camera.yaw + yaw, pitch: Math.max(-limit, Math.min(limit, camera.pitch + pitch)) };
}

/**
 * The camera that shows all points within the margins, at the given angles.
 *
 * @param points_um x, y, z in turn.
 */
export function fit(
  points_um: Float64Array,
  size: Size,
  angles: Pick<Camera, 'yaw' | 'pitch'>,
  margin: { readonly x: number; readonly top: number; readonly bottom: number },
): Camera {
  const unit = projection({ zoom: 1, x: 0, y: 0, ...angles }, { width: 0, height: 0 });
  let left = Infinity;
  let right = -Infinity;
  let top = Infinity;
  let bottom = -Infinity;
  for (let i = 0; i + 2 < points_um.length; i += 3) {
    const [x, y] = project(unit, points_um[i] ?? 0, points_um[i + 1] ?? 0, points_um[i + 2] ?? 0);
    left = Math.min(left, x);
    right = Math.max(right, x);
    top = Math.min(top, y);
    bottom = Math.max(bottom, y);
  }
  if (left > right) return { zoom: 1, x: 0, y: 0, ...angles };
  const roomX = Math.max(20, size.width - 2 * margin.x);
  const roomY = Math.max(20, size.height - margin.top - margin.bottom);
  const zoom = Math.min(roomX / Math.max(right - left, 10), roomY / Math.max(bottom - top, 10));
  return {
    zoom,
    x: (-zoom * (left + right)) / 2,
    y: (-zoom * (top + bottom)) / 2 + (margin.top - margin.bottom) / 2,
    ...angles,
  };
}

/** A round length for the scale bar, at most `most_px` long. */
export function scaleBar(zoom: number, most_px: number): { readonly length_um: number; readonly px: number } {
  const most = most_px / zoom;
  const decade = 10 ** Math.floor(Math.log10(most));
  const length_um = ([5, 2, 1].find((m) => m * decade <= most) ?? 1) * decade;
  return { length_um, px: length_um * zoom };
}
