// What Chart.js does not draw: shadings and marks below the data; axis words, legend and crosshair above it.
import type { Chart } from 'chart.js';
import { dash, lineWidth } from './drawing-order.ts';
import { covered, emptiestCorner, type Box } from './legend-corner.ts';
import { faint, paintColour, type ReadToken } from './paint.ts';
import { axisLabel, valueAt, type Cursor, type Picture, type Series } from './series.ts';

type Canvas = Chart<'line'>;

const note = '11px "Fira Sans", sans-serif';
/** A legend's row: the swatch before a name (a mark takes less than a line), the gap after it, the chart's menu at the right end. */
const lineSwatch = 30;
const markSwatch = 14;
const rowGap = 14;
const menuRoom = 36;

function pixel(chart: Canvas, axis: 'x' | 'y', value: number): number {
  return chart.scales[axis]?.getPixelForValue(value) ?? NaN;
}

/** Shadings and marks, kept within the plot. */
export function paintUnder(chart: Canvas, picture: Picture, read: ReadToken): void {
  const { ctx, chartArea: area } = chart;
  ctx.save();
  ctx.beginPath();
  ctx.rect(area.left, area.top, area.width, area.height);
  ctx.clip();
  ctx.font = note;
  for (const shading of picture.shadings) {
    const a = pixel(chart, shading.axis, shading.from);
    const b = pixel(chart, shading.axis, shading.to);
    const from = Math.min(a, b);
    const size = Math.max(1, Math.abs(b - a));
    ctx.fillStyle = faint(read(shading.token), shading.isFaint === true ? 0.06 : 0.11);
    if (shading.axis === 'x') ctx.fillRect(from, area.top, size, area.height);
    else ctx.fillRect(area.left, from, area.width, size);
    ctx.fillStyle = read('--ink-3');
    const width = ctx.measureText(shading.label).width;
    if (shading.axis === 'x' && width + 12 < size) {
      ctx.textAlign = 'right';
      ctx.fillText(shading.label, from + size - 6, area.bottom - 6);
    } else if (shading.axis === 'y' && size > 16) {
      ctx.textAlign = 'right';
      ctx.fillText(shading.label, area.right - 8, Math.min(area.bottom, from + size) - 6);
    }
  }
  for (const mark of picture.marks) {
    const at = Math.round(pixel(chart, mark.axis, mark.at)) + 0.5;
    ctx.strokeStyle = read(mark.token);
    ctx.fillStyle = read(mark.token);
    ctx.lineWidth = 1;
    ctx.beginPath();
    if (mark.axis === 'x') {
      ctx.moveTo(at, area.top);
      ctx.lineTo(at, area.bottom);
    } else {
      ctx.moveTo(area.left, at);
      ctx.lineTo(area.right, at);
    }
    ctx.stroke();
    if (mark.axis === 'x') {
      const width = ctx.measureText(mark.label).width;
      const fits = at + 6 + width < area.right;
      const box = { left: fits ? at + 6 : at - 6 - width, top: area.top, width, height: 14 };
      const isFreer = covered(lineOf(chart, picture, box), { ...box, top: area.bottom - 14 }) === 0;
      const isAtTop = covered(lineOf(chart, picture, box), box) === 0 || !isFreer;
      ctx.textAlign = 'left';
      ctx.fillText(mark.label, box.left, isAtTop ? area.top + 11 : area.bottom - 5);
    } else {
      ctx.textAlign = 'right';
      ctx.fillText(mark.label, area.right - 6, at - 5);
    }
  }
  ctx.restore();
}

/** Axis words, legend, crosshair with a dot on every series that is read. */
export function paintOver(chart: Canvas, picture: Picture, cursor: Cursor | null, read: ReadToken): void {
  const { ctx, chartArea: area } = chart;
  ctx.save();
  ctx.font = note;
  ctx.fillStyle = read('--ink-2');
  ctx.textAlign = 'left';
  ctx.fillText(axisLabel(picture.y), Math.max(0, area.left - 40), area.top - 10);
  if (picture.bareX !== true) {
    ctx.textAlign = 'right';
    ctx.fillText(axisLabel(picture.x), area.right, chart.height - 4);
  }
  if (picture.legend) paintLegend(chart, picture, read);
  if (cursor) paintCursor(chart, picture, cursor, read);
  ctx.restore();
}

function* drawnPoints(chart: Canvas): Generator<{ x: number; y: number }> {
  for (let k = 0; k < chart.data.datasets.length; k += 1) {
    for (const point of chart.getDatasetMeta(k).data) yield point;
  }
}

/** Drawn points, and the lines between them where they pass over or under a box. */
function* lineOf(chart: Canvas, picture: Picture, box: Box): Generator<{ x: number; y: number }> {
  yield* drawnPoints(chart);
  const scale = chart.scales['x'];
  for (const one of picture.series) {
    if (one.drawn === 'points') continue;
    for (let x = box.left; x <= box.left + box.width; x += 4) {
      const y = valueAt(one, scale?.getValueForPixel(x) ?? NaN);
      if (y !== null) yield { x, y: pixel(chart, 'y', y) };
    }
  }
}

/** What a legend should not cover: the data, and the words at the marks. */
function* crowd(chart: Canvas, picture: Picture): Generator<{ x: number; y: number }> {
  yield* drawnPoints(chart);
  for (const mark of picture.marks) {
    if (mark.axis !== 'x') continue;
    const x = pixel(chart, 'x', mark.at);
    for (const along of [10, 50, 90]) yield { x: x + along, y: chart.chartArea.top + 8 };
  }
}

/** In the row of the y label where all names fit beside it, else in the plot's emptiest corner. */
function paintLegend(chart: Canvas, picture: Picture, read: ReadToken): void {
  const { ctx, chartArea: area } = chart;
  const named = picture.series.filter((one) => one.quiet !== true);
  if (named.length === 0) return;
  const widths = named.map((one) => ctx.measureText(one.label).width);
  const inRow = named.reduce((sum, one, i) => sum + (widths[i] ?? 0) + swatchRoom(one) + rowGap, 0);
  const labelEnd = Math.max(0, area.left - 40) + ctx.measureText(axisLabel(picture.y)).width;
  const rowEnd = area.right - menuRoom;
  if (rowEnd - inRow > labelEnd + rowGap) {
    let x = rowEnd - inRow + rowGap;
    named.forEach((one, i) => {
      paintName(ctx, one, x, area.top - 14, read);
      x += (widths[i] ?? 0) + swatchRoom(one) + rowGap;
    });
    return;
  }
  const width = Math.max(...widths) + 46;
  const height = named.length * 16 + 10;
  if (width > area.width * 0.6 || height > area.height * 0.75) return;
  const plot = { left: area.left, top: area.top, width: area.width, height: area.height };
  const box = emptiestCorner(crowd(chart, picture), plot, width, height);
  ctx.fillStyle = faint(read('--panel'), 0.82);
  ctx.fillRect(box.left, box.top, width, height);
  named.forEach((one, i) => paintName(ctx, one, box.left + 8, box.top + 13 + i * 16, read));
}

function swatchRoom(one: Series): number {
  return one.drawn === 'points' ? markSwatch : lineSwatch;
}

function paintName(ctx: CanvasRenderingContext2D, one: Series, x: number, y: number, read: ReadToken): void {
  swatch(ctx, one, x, y, read);
  ctx.fillStyle = read('--ink');
  ctx.textAlign = 'left';
  ctx.fillText(one.label, x + swatchRoom(one), y + 4);
}

function swatch(ctx: CanvasRenderingContext2D, one: Series, x: number, y: number, read: ReadToken): void {
  const colour = paintColour(one.paint, read);
  ctx.strokeStyle = colour;
  ctx.fillStyle = colour;
  ctx.lineWidth = lineWidth(one);
  if (one.drawn !== 'points') {
    ctx.setLineDash(dash(one));
    ctx.beginPath();
    ctx.moveTo(x, y);
    ctx.lineTo(x + 24, y);
    ctx.stroke();
    ctx.setLineDash([]);
  }
  if (one.drawn !== 'line') shape(ctx, one.shape ?? 'circle', x + (one.drawn === 'points' ? 4 : 12), y);
}

function shape(ctx: CanvasRenderingContext2D, kind: NonNullable<Series['shape']>, x: number, y: number): void {
  const outline = {
    circle: null,
    triangle: [0, -3, 3, 2.5, -3, 2.5],
    rect: [-2.3, -2.3, 2.3, -2.3, 2.3, 2.3, -2.3, 2.3],
    rectRot: [0, -3.2, 3.2, 0, 0, 3.2, -3.2, 0],
    cross: [-3, 0, 3, 0, 0, 0, 0, -3, 0, 3],
  }[kind];
  ctx.beginPath();
  if (!outline) ctx.arc(x, y, 2.75, 0, 2 * Math.PI);
  else for (let i = 0; i < outline.length; i += 2) ctx.lineTo(x + (outline[i] ?? 0), y + (outline[i + 1] ?? 0));
  if (kind === 'cross') ctx.stroke();
  else ctx.fill();
}

function paintCursor(chart: Canvas, picture: Picture, cursor: Cursor, read: ReadToken): void {
  const { ctx, chartArea: area } = chart;
  const x = pixel(chart, 'x', cursor.x);
  if (!(x >= area.left - 0.5 && x <= area.right + 0.5)) return;
  ctx.strokeStyle = read('--accent');
  ctx.lineWidth = 1;
  ctx.beginPath();
  ctx.moveTo(Math.round(x) + 0.5, area.top - 4);
  ctx.lineTo(Math.round(x) + 0.5, area.bottom);
  ctx.stroke();
  for (const one of picture.series) {
    if (one.quiet === true || one.drawn === 'points') continue;
    const y = valueAt(one, cursor.x);
    if (y === null) continue;
    const at = pixel(chart, 'y', y);
    if (at < area.top || at > area.bottom) continue;
    ctx.beginPath();
    ctx.arc(x, at, 3.5, 0, 2 * Math.PI);
    ctx.fillStyle = read('--panel');
    ctx.fill();
    ctx.strokeStyle = paintColour(one.paint, read);
    ctx.lineWidth = 1.5;
    ctx.stroke();
  }
  if (cursor.words === '') return;
  const width = ctx.measureText(cursor.words).width + 16;
  const left = Math.max(0, Math.min(chart.width - width, x - width / 2));
  ctx.fillStyle = read('--accent');
  ctx.beginPath();
  ctx.roundRect(left, area.top - 22, width, 18, 4);
  ctx.fill();
  ctx.fillStyle = read('--on-accent');
  ctx.textAlign = 'center';
  ctx.fillText(cursor.words, left + width / 2, area.top - 9);
}
