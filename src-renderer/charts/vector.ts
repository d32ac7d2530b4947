import { dash, drawingOrder, lineWidth } from './drawing-order.ts';
import { faint, paintColour, type ReadToken } from './paint.ts';
import { axisLabel, type Picture, type Series } from './series.ts';
import { thinned } from './thin.ts';
import { roundStep, tickLabel, ticks } from './ticks.ts';

const margin = { left: 64, right: 16, top: 28, bottom: 44 };

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}

function rounded(value: number): string {
  return String(Math.round(value * 100) / 100);
}

interface Place {
  readonly x: (value: number) => number;
  readonly y: (value: number) => number;
}

function path(series: Series, picture: Picture, width: number, place: Place): string {
  const parts: string[] = [];
  let down = false;
  for (const point of thinned(series, picture.xView, Math.ceil(width) * 2)) {
    if (!Number.isFinite(point.y)) {
      down = false;
      continue;
    }
    parts.push(`${down ? 'L' : 'M'}${rounded(place.x(point.x))} ${rounded(place.y(point.y))}`);
    down = true;
  }
  return parts.join('');
}

function points(series: Series, place: Place, colour: string): string {
  const dots: string[] = [];
  for (const { x, y } of thinned(series, { from: -Infinity, to: Infinity }, series.y.length)) {
    if (!Number.isFinite(x) || !Number.isFinite(y)) continue;
    const cx = place.x(x);
    const cy = place.y(y);
    const at = (dx: number, dy: number): string => `${rounded(cx + dx)} ${rounded(cy + dy)}`;
    const outlines = {
      circle: `M${at(-2.5, 0)}a2.5 2.5 0 1 0 5 0a2.5 2.5 0 1 0 -5 0Z`,
      triangle: `M${at(0, -3)}L${at(3, 2.5)}L${at(-3, 2.5)}Z`,
      rect: `M${at(-2.3, -2.3)}L${at(2.3, -2.3)}L${at(2.3, 2.3)}L${at(-2.3, 2.3)}Z`,
      rectRot: `M${at(0, -3.2)}L${at(3.2, 0)}L${at(0, 3.2)}L${at(-3.2, 0)}Z`,
      cross: `M${at(-3, 0)}L${at(3, 0)}M${at(0, -3)}L${at(0, 3)}`,
    };
    dots.push(outlines[series.shape ?? 'circle']);
  }
  return `<path d="${dots.join('')}" fill="${colour}" stroke="${colour}" stroke-width="1"/>`;
}

function drawn(series: Series, picture: Picture, width: number, place: Place, read: ReadToken): string {
  const colour = paintColour(series.paint, read);
  const pattern = dash(series);
  const dashed = pattern.length > 0 ? ` stroke-dasharray="${pattern.join(' ')}"` : '';
  const line = `<path d="${path(series, picture, width, place)}" fill="none" stroke="${colour}" stroke-width="${lineWidth(series)}"${dashed}/>`;
  if (series.drawn === 'line') return line;
  return (series.drawn === 'points' ? '' : line) + points(series, place, colour);
}

/**
 * The chart as an SVG text: same data, view and colours as on the screen, axes with their units, a legend below the
 * plot's top edge where the chart has one.
 */
export function chartVector(picture: Picture, size: { width: number; height: number }, read: ReadToken): string {
  const { xView, yView } = picture;
  const width = size.width - margin.left - margin.right;
  const height = size.height - margin.top - margin.bottom;
  const place: Place = {
    x: (value) => margin.left + ((value - xView.from) / (xView.to - xView.from)) * width,
    y: (value) => margin.top + (1 - (value - yView.from) / (yView.to - yView.from)) * height,
  };
  const ink = read('--ink');
  const quiet = read('--ink-2');
  const out: string[] = [];
  const text = (x: number, y: number, words: string, anchor: string, fill: string): void =>
    void out.push(
      `<text x="${rounded(x)}" y="${rounded(y)}" text-anchor="${anchor}" fill="${fill}">${escaped(words)}</text>`,
    );

  out.push(
    `<svg xmlns="http://www.w3.org/2000/svg" width="${size.width}" height="${size.height}" viewBox="0 0 ${size.width} ${size.height}" font-family="Fira Sans, sans-serif" font-size="11">`,
    `<rect width="100%" height="100%" fill="${read('--panel')}"/>`,
    `<clipPath id="plot"><rect x="${margin.left}" y="${margin.top}" width="${width}" height="${height}"/></clipPath>`,
    '<g clip-path="url(#plot)">',
  );
  for (const shading of picture.shadings) {
    const fill = faint(read(shading.token), 0.14);
    const [x0, x1] =
      shading.axis === 'x' ? [place.x(shading.from), place.x(shading.to)] : [margin.left, margin.left + width];
    const [y0, y1] =
      shading.axis === 'y' ? [place.y(shading.to), place.y(shading.from)] : [margin.top, margin.top + height];
    out.push(
      `<rect x="${rounded(x0)}" y="${rounded(y0)}" width="${rounded(Math.max(0, x1 - x0))}" height="${rounded(Math.max(0, y1 - y0))}" fill="${fill}"><title>${escaped(shading.label)}</title></rect>`,
    );
  }
  const yStep = roundStep(yView, 5);
  for (const y of ticks(yView, yStep)) {
    out.push(`<path d="M${margin.left} ${rounded(place.y(y))}h${width}" stroke="${read('--grid')}"/>`);
  }
  for (const mark of picture.marks) {
    const line =
      mark.axis === 'x'
        ? `M${rounded(place.x(mark.at))} ${margin.top}v${height}`
        : `M${margin.left} ${rounded(place.y(mark.at))}h${width}`;
    out.push(`<path d="${line}" stroke="${read(mark.token)}"><title>${escaped(mark.label)}</title></path>`);
  }
  for (const series of drawingOrder(picture.series)) out.push(drawn(series, picture, width, place, read));
  out.push('</g>');

  out.push(`<path d="M${margin.left} ${margin.top}v${height}h${width}" fill="none" stroke="${read('--edge')}"/>`);
  for (const y of ticks(yView, yStep)) text(margin.left - 8, place.y(y) + 4, tickLabel(y, yStep), 'end', quiet);
  const xStep = roundStep(xView, 8);
  for (const x of ticks(xView, xStep)) text(place.x(x), margin.top + height + 16, tickLabel(x, xStep), 'middle', quiet);
  text(margin.left, 16, axisLabel(picture.y), 'start', quiet);
  text(margin.left + width, size.height - 8, axisLabel(picture.x), 'end', quiet);

  const named = picture.series.filter((one) => one.quiet !== true);
  if (picture.legend)
    named.forEach((one, i) => {
      const y = margin.top + 14 + i * 16;
      const pattern = dash(one).join(' ');
      out.push(
        `<path d="M${margin.left + width - 150} ${y - 4}h22" stroke="${paintColour(one.paint, read)}" stroke-width="${lineWidth(one)}"${pattern === '' ? '' : ` stroke-dasharray="${pattern}"`}/>`,
      );
      text(margin.left + width - 122, y, one.label, 'start', ink);
    });
  out.push('</svg>');
  return out.join('\n');
}
