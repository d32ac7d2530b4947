// A family of sweeps as a figure for a paper: command, recording and membrane, one above the other, one time axis.
import type { ProtocolDocument } from '../contract/documents.ts';
import type { TextFile } from '../contract/requests.ts';
import type { StoredRehearsal, Trace } from '../contract/results.ts';
import { rungOfSweep, rungValue } from '../protocol/ladder.ts';
import { plain, withUnit } from '../units/format.ts';
import { fileStem } from './csv.ts';
import { axisOver } from './figure-axis.ts';
import { curvePath, xOf, yOf, type Frame } from './figure-curve.ts';

const width = 720;
const margin = { left: 72, right: 96, top: 58, bottom: 44 };
const panelHeight = { command: 84, recording: 190, membrane: 130 };
const panelGap = 30;
const ink = '#191e20';
const quiet = '#475054';
const grid = '#e6e9ea';
/** Along the ladder, near the paper to far from it; one hue per pipette, a third for probes. */
const sweepColours: Record<string, readonly [string, string, string]> = {
  A: ['#9dbbe6', '#1f57b0', '#0c2b60'],
  B: ['#dda0c2', '#9d2566', '#530d33'],
  probe: ['#b9c0c2', '#616a6e', '#191e20'],
};
/** Milliseconds after a command jump that do not stretch an axis: the capacity transient runs off it and is cut. */
const transient_ms = 0.3;
const transientNote = `Within ${transient_ms} ms after a command jump, currents may run off the axis.`;

/**
 * The figure of a rehearsal: a panel per trace key, sweeps from light to dark along the ladder, B dashed, labelled axes
 * with units, a legend of sweeps. Plain SVG 1.1 without scripts or outside references.
 */
export function figureSvg(stored: Pick<StoredRehearsal, 'summary' | 'protocol'>, traces: readonly Trace[]): TextFile {
  const keys = [...new Set(traces.map(({ key }) => key))].toSorted((a, b) => orderOf(a) - orderOf(b));
  const last = traces.reduce((end, t) => Math.max(end, t.start_ms + (t.values.length - 1) * t.interval_ms), 0);
  const first = traces.reduce((start, t) => Math.min(start, t.start_ms), last);
  let top = margin.top;
  const panels = keys.map((key) => {
    const own = traces.filter((trace) => trace.key === key);
    const command = traces.filter((trace) => trace.key.startsWith('command:'));
    const range = rangeOf(own, key.startsWith('recording:') ? command : []);
    const axis = axisOver(range.low, range.high);
    const bottom = top + panelHeight[kindOf(key)];
    const edges = { left: margin.left, right: width - margin.right, top, bottom };
    const frame: Frame = { ...edges, from_ms: first, to_ms: last > first ? last : first + 1, ...axis };
    top = bottom + panelGap;
    return panel(key, own, frame, axis.ticks, stored.protocol);
  });
  const bottom = top - panelGap;
  const height = bottom + margin.bottom;
  const body = [
    `<title>${escaped(stored.summary.planName)}</title>`,
    `<rect width="${width}" height="${height}" fill="#ffffff"/>`,
    text(margin.left, 22, stored.summary.planName, 'start', 13, ink, 600),
    ...panels,
    timeAxis(first, last, bottom),
    legend(traces, stored.protocol),
    traces.some(({ key, unit }) => key.startsWith('recording:') && unit === 'pA')
      ? text(margin.left, bottom + 36, transientNote, 'start')
      : '',
  ];
  const face = `font-family="Fira Sans, Helvetica, Arial, sans-serif"`;
  const open = `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" ${face}>`;
  return { name: `${fileStem(stored.summary.planName)}.svg`, text: `${[open, ...body, '</svg>'].join('\n')}\n` };
}

type PanelKind = keyof typeof panelHeight;

function kindOf(key: string): PanelKind {
  const kind = key.slice(0, key.indexOf(':'));
  return kind === 'command' || kind === 'recording' ? kind : 'membrane';
}

function orderOf(key: string): number {
  return ['command', 'recording', 'membrane'].indexOf(kindOf(key));
}

function nameOf(key: string): string {
  const who = key.slice(key.indexOf(':') + 1);
  const pipette = who in sweepColours && who !== 'probe';
  if (kindOf(key) === 'membrane') return pipette ? `membrane at ${who}` : `membrane, ${who}`;
  return `${kindOf(key)} ${who}`;
}

function panel(
  key: string,
  traces: readonly Trace[],
  frame: Frame,
  ticks: readonly number[],
  protocol: ProtocolDocument,
): string {
  const who = key.slice(key.indexOf(':') + 1);
  const clip = `clip-${key.replace(/[^A-Za-z0-9]/g, '_')}-${frame.top}`;
  const { left, right, top, bottom } = frame;
  const labels = tickLabels(ticks);
  const lines = ticks.flatMap((tick, i) => {
    const y = yOf(tick, frame);
    return [
      `<line x1="${left}" x2="${right}" y1="${y.toFixed(2)}" y2="${y.toFixed(2)}" stroke="${grid}"/>`,
      text(left - 8, y + 4, labels[i] ?? '', 'end'),
    ];
  });
  const curves = traces.map((trace) => {
    const stroke = sweepColour(who, trace.sweep, protocol, traces);
    const dash = who === 'B' ? ' stroke-dasharray="5 3"' : '';
    return `<path d="${curvePath(trace, frame)}" fill="none" stroke="${stroke}" stroke-width="1.1"${dash}/>`;
  });
  return [
    `<clipPath id="${clip}"><rect x="${left}" y="${top}" width="${right - left}" height="${bottom - top}"/></clipPath>`,
    ...lines,
    `<line x1="${left}" x2="${left}" y1="${top}" y2="${bottom}" stroke="${quiet}"/>`,
    `<g clip-path="url(#${clip})">${curves.join('')}</g>`,
    text(left, top - 8, `${nameOf(key)}, ${traces[0]?.unit ?? ''}`, 'start', 12, ink),
  ].join('\n');
}

/** Ticks with as many decimals as the one that needs most: −60 and −100, or −0.5 and 1.0. */
function tickLabels(ticks: readonly number[]): string[] {
  const decimals = Math.max(0, ...ticks.map((tick) => (String(tick).split('.')[1] ?? '').length));
  return ticks.map((tick) =>
    (Math.abs(tick) < 1e-4 && tick !== 0 ? plain(tick) : tick.toFixed(decimals)).replace('-', '−'),
  );
}

function timeAxis(from: number, to: number, bottom: number): string {
  const axis = axisOver(from, to > from ? to : from + 1, 0);
  const frame: Frame = {
    left: margin.left,
    right: width - margin.right,
    top: 0,
    bottom,
    from_ms: axis.low,
    to_ms: axis.high,
    low: 0,
    high: 1,
  };
  const labels = tickLabels(axis.ticks);
  const ticks = axis.ticks.map((tick, i) => {
    const x = xOf(tick, frame).toFixed(2);
    const mark = `<line x1="${x}" x2="${x}" y1="${bottom}" y2="${bottom + 5}" stroke="${quiet}"/>`;
    return `${mark}${text(Number(x), bottom + 19, labels[i] ?? '', 'middle')}`;
  });
  const line = `<line x1="${frame.left}" x2="${frame.right}" y1="${bottom}" y2="${bottom}" stroke="${quiet}"/>`;
  return [line, ...ticks, text(frame.right, bottom + 36, 'time, ms', 'end', 12, ink)].join('\n');
}

/** Up to eight sweeps by ladder value, light to dark; more are told by a few of them, the first and last included. */
function legend(traces: readonly Trace[], protocol: ProtocolDocument): string {
  const sweeps = [...new Set(traces.map(({ sweep }) => sweep))].sort((a, b) => a - b);
  const shown =
    sweeps.length <= 8 ? sweeps : [0, 1, 2, 3, 4].map((i) => sweeps[Math.round((i / 4) * (sweeps.length - 1))]);
  const left = width - margin.right + 12;
  return shown
    .map((sweep, i) => {
      const y = margin.top + 6 + i * 16;
      const colour = sweepColour('A', sweep ?? 0, protocol, traces);
      const mark = `<line x1="${left}" x2="${left + 16}" y1="${y}" y2="${y}" stroke="${colour}" stroke-width="2"/>`;
      return `${mark}${text(left + 21, y + 4, sweepName(sweep ?? 0, protocol), 'start')}`;
    })
    .join('\n');
}

function sweepName(sweep: number, protocol: ProtocolDocument): string {
  const ladder = protocol.ladders[0];
  if (ladder === undefined) return `sweep ${sweep + 1}`;
  const lane = protocol.lanes.find(({ pipette }) => pipette === ladder.lane);
  const units = { duration_ms: 'ms', width_ms: 'ms', rate_Hz: 'Hz', count: 'pulses' };
  const unit = ladder.number in units ? units[ladder.number as keyof typeof units] : (lane?.unit ?? '');
  return withUnit(rungValue(ladder, rungOfSweep(protocol, sweep)), unit, 4).replace(/\.0+(?=\u2009)/, '');
}

function sweepColour(who: string, sweep: number, protocol: ProtocolDocument, traces: readonly Trace[]): string {
  const stops = sweepColours[who === 'A' || who === 'B' ? who : 'probe'] ?? [ink, ink, ink];
  const most = traces.reduce((last, trace) => Math.max(last, trace.sweep), 0);
  if (most === 0) return stops[1];
  const along = sweep / most;
  return along < 0.5 ? mixed(stops[0], stops[1], 2 * along) : mixed(stops[1], stops[2], 2 * along - 1);
}

function mixed(from: string, to: string, part: number): string {
  const channel = (colour: string, at: number): number => parseInt(colour.slice(at, at + 2), 16);
  const hex = [1, 3, 5].map((at) => {
    const value = Math.round(channel(from, at) + part * (channel(to, at) - channel(from, at)));
    return value.toString(16).padStart(2, '0');
  });
  return `#${hex.join('')}`;
}

/** The values an axis must show: all but those within a moment after a command jump of the same sweep. */
function rangeOf(traces: readonly Trace[], commands: readonly Trace[]): { low: number; high: number } {
  let low = Infinity;
  let high = -Infinity;
  for (const trace of traces) {
    const left = samplesAfterJumps(
      trace,
      commands.filter(({ sweep }) => sweep === trace.sweep),
    );
    trace.values.forEach((value, i) => {
      if (left.has(i) || !Number.isFinite(value)) return;
      low = Math.min(low, value);
      high = Math.max(high, value);
    });
  }
  // Pulses closer than a transient leave nothing over: then everything is shown.
  if (low > high && commands.length > 0) return rangeOf(traces, []);
  return low <= high ? { low, high } : { low: 0, high: 0 };
}

function samplesAfterJumps(trace: Trace, commands: readonly Trace[]): Set<number> {
  const after = new Set<number>();
  const length = Math.ceil(transient_ms / trace.interval_ms);
  for (const { values } of commands) {
    for (let i = 1; i < values.length; i += 1) {
      if (!isJump(values, i)) continue;
      for (let n = 0; n < length; n += 1) after.add(i + n);
    }
  }
  return after;
}

/** A change that the samples on either side do not go on with: not the slope of a ramp. */
function isJump(values: Float64Array, i: number): boolean {
  const change = (values[i] ?? 0) - (values[i - 1] ?? 0);
  if (Math.abs(change) < 1e-9) return false;
  const next = (values[i + 1] ?? values[i] ?? 0) - (values[i] ?? 0);
  return Math.abs(change) > 4 * Math.abs(next) || Math.sign(next) !== Math.sign(change);
}

function text(
  x: number,
  y: number,
  words: string,
  anchor: 'start' | 'middle' | 'end',
  size = 11,
  fill = quiet,
  weight = 400,
): string {
  const style = `font-size="${size}" fill="${fill}" text-anchor="${anchor}" font-weight="${weight}"`;
  return `<text x="${x.toFixed(2)}" y="${y.toFixed(2)}" ${style}>${escaped(words)}</text>`;
}

function escaped(words: string): string {
  return words.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}
