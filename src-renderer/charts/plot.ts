import {
  Chart,
  LinearScale,
  LineController,
  LineElement,
  PointElement,
  type ChartDataset,
  type Plugin,
} from 'chart.js';
import { dash, drawingOrder, lineWidth } from './drawing-order.ts';
import { paintOver, paintUnder } from './overlay.ts';
import { paintColour, type ReadToken } from './paint.ts';
import type { Cursor, Picture, Range, Series } from './series.ts';
import { thinned, type Point } from './thin.ts';
import { roundStep, tickLabel, ticks } from './ticks.ts';

// Only what is used: the rest of Chart.js stays out of the bundle.
Chart.register(LineController, LineElement, PointElement, LinearScale);

/** Common to every chart, so that charts and strips stacked on one time axis line up, px. */
export const plotInset = { left: 52, right: 14 } as const;
const mostGridlines = 5;
const padding = { top: 24, right: plotInset.right, bottom: 18, left: 0 };

export interface Plot {
  readonly draw: (picture: Picture, cursor: Cursor | null) => void;
  /** The same again: the theme or the fonts have changed. */
  readonly redraw: () => void;
  readonly toX: (pixel: number) => number;
  readonly toY: (pixel: number) => number;
  readonly pixelX: (value: number) => number;
  readonly pixelY: (value: number) => number;
  readonly area: () => { left: number; right: number; top: number; bottom: number };
  readonly image: () => Promise<Blob>;
  readonly close: () => void;
}

function themeReader(element: Element): ReadToken {
  const style = getComputedStyle(element);
  return (token) => style.getPropertyValue(token).trim();
}

function dataset(series: Series, view: Range, columns: number, read: ReadToken): ChartDataset<'line', Point[]> {
  const colour = paintColour(series.paint, read);
  const pointed = series.drawn !== 'line';
  // A crowd of points is read as a cloud: smaller ones keep its shape.
  const radius = pointed ? (series.y.length > 100 ? 1.75 : 2.75) : 0;
  return {
    label: series.label,
    data: pointed
      ? thinned(series, { from: -Infinity, to: Infinity }, series.y.length)
      : thinned(series, view, columns),
    parsing: false,
    showLine: series.drawn !== 'points',
    borderColor: colour,
    borderWidth: lineWidth(series),
    borderDash: dash(series),
    pointRadius: radius,
    pointHoverRadius: radius,
    pointStyle: series.shape ?? 'circle',
    pointBackgroundColor: colour,
    pointBorderColor: colour,
    pointBorderWidth: 1,
    tension: 0,
    spanGaps: false,
  };
}

/** Puts Chart.js on a canvas. The canvas takes the size of its positioned parent. */
export function openPlot(canvas: HTMLCanvasElement): Plot {
  let picture: Picture | null = null;
  let cursor: Cursor | null = null;
  let read = themeReader(canvas);
  const steps = { x: 1, y: 1 };

  const overlay: Plugin<'line'> = {
    id: 'holdfast',
    beforeDatasetsDraw: (chart) => {
      if (picture) paintUnder(chart, picture, read);
    },
    afterDraw: (chart) => {
      if (picture) paintOver(chart, picture, cursor, read);
    },
  };

  const chart = new Chart<'line', Point[]>(canvas, {
    type: 'line',
    data: { datasets: [] },
    plugins: [overlay],
    options: {
      animation: false,
      responsive: true,
      maintainAspectRatio: false,
      events: [],
      layout: { padding },
      onResize: () => queueMicrotask(refresh),
      scales: {
        x: {
          type: 'linear',
          grid: { drawOnChartArea: false, tickLength: 4 },
          ticks: { maxRotation: 0, autoSkip: false, callback: (value) => tickLabel(Number(value), steps.x) },
          // A label that reaches over the end must not move the plot against its neighbours.
          afterFit: (scale) => {
            scale.paddingLeft = 0;
            scale.paddingRight = 0;
          },
          afterBuildTicks: (scale) => {
            const most = Math.max(2, Math.min(9, Math.floor(scale.width / 64)));
            const step = roundStep({ from: scale.min, to: scale.max }, most);
            steps.x = step;
            scale.ticks = ticks({ from: scale.min, to: scale.max }, step).map((value) => ({ value }));
          },
        },
        y: {
          type: 'linear',
          grid: { tickLength: 0 },
          ticks: { autoSkip: false, padding: 8, callback: (value) => tickLabel(Number(value), steps.y) },
          afterBuildTicks: (scale) => {
            const most = Math.max(2, Math.min(mostGridlines, Math.floor(scale.height / 26)));
            const step = roundStep({ from: scale.min, to: scale.max }, most);
            steps.y = step;
            scale.ticks = ticks({ from: scale.min, to: scale.max }, step).map((value) => ({ value }));
          },
          afterFit: (scale) => {
            scale.width = plotInset.left;
          },
        },
      },
    },
  });

  function refresh(): void {
    if (!picture || !canvas.isConnected) return;
    read = themeReader(canvas);
    const columns = Math.max(50, Math.ceil(canvas.clientWidth));
    const font = { family: 'Fira Sans, sans-serif', size: 11 };
    for (const [key, view] of [
      ['x', picture.xView],
      ['y', picture.yView],
    ] as const) {
      const scale = chart.options.scales?.[key];
      if (!scale) continue;
      scale.min = view.from;
      scale.max = view.to;
      Object.assign(scale, {
        border: { color: read('--edge') },
        grid: { ...(scale.grid as object), color: key === 'x' ? read('--edge') : read('--grid') },
        ticks: {
          ...(scale.ticks as object),
          color: read('--ink-2'),
          font,
          display: picture.series.length > 0 && (key === 'y' || picture.bareX !== true),
        },
      });
    }
    const shown = picture;
    const top = shown.y.words === '' && shown.y.unit === '' ? 8 : 24;
    chart.options.layout = { padding: { ...padding, top, bottom: shown.bareX === true ? 0 : padding.bottom } };
    chart.data.datasets = drawingOrder(shown.series).map((one) => dataset(one, shown.xView, columns, read));
    chart.update('none');
  }

  const scaleOf = (key: 'x' | 'y'): LinearScale => chart.scales[key] as LinearScale;
  return {
    draw(next, at) {
      const onlyCursor = next === picture;
      picture = next;
      cursor = at;
      if (onlyCursor) chart.draw();
      else refresh();
    },
    redraw: refresh,
    toX: (pixel) => scaleOf('x').getValueForPixel(pixel) ?? NaN,
    toY: (pixel) => scaleOf('y').getValueForPixel(pixel) ?? NaN,
    pixelX: (value) => scaleOf('x').getPixelForValue(value),
    pixelY: (value) => scaleOf('y').getPixelForValue(value),
    area: () => chart.chartArea,
    image: () =>
      new Promise((resolve, reject) => {
        // The canvas is clear where nothing is drawn: lay the panel's colour under a copy of it.
        const copy = document.createElement('canvas');
        copy.width = canvas.width;
        copy.height = canvas.height;
        const context = copy.getContext('2d');
        if (!context) {
          reject(new Error('this window cannot draw pictures'));
          return;
        }
        context.fillStyle = read('--panel');
        context.fillRect(0, 0, copy.width, copy.height);
        context.drawImage(canvas, 0, 0);
        copy.toBlob((blob) => {
          if (blob) resolve(blob);
          else reject(new Error('the picture came out empty'));
        }, 'image/png');
      }),
    close: () => chart.destroy(),
  };
}
