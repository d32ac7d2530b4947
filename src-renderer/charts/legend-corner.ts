export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
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
  const covered = corners.map(() => 0);
  for (const { x, y } of points) {
    corners.forEach((box, k) => {
      const isIn = x >= box.left && x <= box.left + width && y >= box.top && y <= box.top + height;
      if (isIn) covered[k] = (covered[k] ?? 0) + 1;
    });
  }
  const least = Math.min(...covered);
  return corners[covered.indexOf(least)] ?? { left: right, top: plot.top, width, height };
}
