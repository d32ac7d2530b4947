export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** How many of the points a box covers. */
export function covered(points: Iterable<{ x: number; y: number }>, box: Box): number {
  let count = 0;
  for (const { x, y } of points) {
    if (x >= box.left && x <= box.left + box.width && y >= box.top && y <= box.top + box.height) count += 1;
  }
  return count;
}

/** The corner of the plot where a box of this size covers the fewest drawn points; top right when several are equal. */
export function emptiestCorner(
  points: Iterable<{ x: number; y: number }>,
  plot: Box,
  width: number,
  height: number,
): Box {
  const right = plot.left + plot.width - width;
  const bottom = plot.top + plot.height - height;
  const corners = [
    { left: right, top: plot.top },
    { left: right, top: bottom },
    { left: plot.left + 4, top: plot.top },
    { left: plot.left + 4, top: bottom },
  ].map((corner) => ({ ...corner, width, height }));
  const all = [...points];
  const counts = corners.map((box) => covered(all, box));
  const least = Math.min(...counts);
  return corners[counts.indexOf(least)] ?? { left: right, top: plot.top, width, height };
}
