// Paints the cell: every piece in its compartment's colour, as few strokes as there are colours and widths.
import { stepOf } from '../colours.ts';
import type { Projected } from '../projected.ts';

export interface CellPaint {
  readonly cell: Projected;
  /** Per compartment; null: one colour for all. */
  readonly values: Float64Array | null;
  readonly low: number;
  readonly high: number;
  /** Colours from low to high. */
  readonly steps: readonly string[];
  /** Where there is no value. */
  readonly plain: string;
}

/** Widths are painted in quarters of a pixel: finer cannot be seen. */
const widthsPerPixel = 4;

/** @returns how many strokes it took: one per colour and width in use. */
export function paintCell(context: CanvasRenderingContext2D, paint: CellPaint): number {
  const groups = grouped(paint);
  const { xy } = paint.cell;
  context.lineCap = 'round';
  for (const group of groups) {
    context.strokeStyle = group.step < 0 ? paint.plain : (paint.steps[group.step] ?? paint.plain);
    context.lineWidth = group.width;
    context.beginPath();
    let lastX = NaN;
    let lastY = NaN;
    for (const i of group.pieces) {
      const x0 = xy[4 * i] ?? 0;
      const y0 = xy[4 * i + 1] ?? 0;
      // Pieces that follow one another make one line, with joints instead of caps.
      if (x0 !== lastX || y0 !== lastY) context.moveTo(x0, y0);
      lastX = xy[4 * i + 2] ?? 0;
      lastY = xy[4 * i + 3] ?? 0;
      context.lineTo(lastX, lastY);
    }
    context.stroke();
  }
  paintSoma(context, paint);
  return groups.length;
}

interface Group {
  readonly step: number;
  readonly width: number;
  readonly pieces: number[];
}

function grouped({ cell, values, low, high, steps }: CellPaint): readonly Group[] {
  const groups = new Map<number, Group>();
  const { model, width } = cell;
  for (let i = 0; i < model.count; i++) {
    const k = model.compartment[i] ?? -1;
    const step = values === null || k < 0 ? -1 : stepOf(values[k] ?? NaN, low, high, steps.length);
    const wide = Math.round((width[i] ?? 1) * widthsPerPixel);
    const key = (step + 1) * 65536 + wide;
    const group = groups.get(key);
    if (group === undefined) groups.set(key, { step, width: wide / widthsPerPixel, pieces: [i] });
    else group.pieces.push(i);
  }
  // Thin over thick would cut branches where they meet: thin ones first.
  return [...groups.values()].sort((a, b) => a.width - b.width);
}

function paintSoma(context: CanvasRenderingContext2D, { cell, values, low, high, steps, plain }: CellPaint): void {
  if (cell.soma === null || cell.model.soma === null) return;
  const value = values?.[cell.model.soma.compartment] ?? NaN;
  const step = stepOf(value, low, high, steps.length);
  context.fillStyle = steps[step] ?? plain;
  context.beginPath();
  context.arc(cell.soma.x, cell.soma.y, cell.soma.radius, 0, 2 * Math.PI);
  context.fill();
}

/** A light band under the pieces that match: the selected region or compartment. */
export function paintBand(
  context: CanvasRenderingContext2D,
  cell: Projected,
  colour: string,
  matches: (compartment: number) => boolean,
): void {
  const { xy, width, model } = cell;
  context.strokeStyle = colour;
  context.fillStyle = colour;
  context.lineCap = 'round';
  for (let i = 0; i < model.count; i++) {
    if (!matches(model.compartment[i] ?? -1)) continue;
    context.lineWidth = (width[i] ?? 1) + 7;
    context.beginPath();
    context.moveTo(xy[4 * i] ?? 0, xy[4 * i + 1] ?? 0);
    context.lineTo(xy[4 * i + 2] ?? 0, xy[4 * i + 3] ?? 0);
    context.stroke();
  }
  if (cell.soma === null || model.soma === null || !matches(model.soma.compartment)) return;
  context.beginPath();
  context.arc(cell.soma.x, cell.soma.y, cell.soma.radius + 4, 0, 2 * Math.PI);
  context.fill();
}
