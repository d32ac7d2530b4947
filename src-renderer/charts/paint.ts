import type { Paint } from './series.ts';

/** Reads a theme colour by its custom property's name. */
export type ReadToken = (token: string) => string;

function channels(hex: string): [number, number, number] | null {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(hex.trim());
  if (!match) return null;
  return [match[1], match[2], match[3]].map((pair) => parseInt(pair ?? '0', 16)) as [number, number, number];
}

/** A colour between two, by share of the second; the nearer of them where one is not written as #rrggbb. */
export function mixed(a: string, b: string, share: number): string {
  const from = channels(a);
  const to = channels(b);
  if (!from || !to) return share < 0.5 ? a : b;
  const mix = from.map((value, i) => Math.round(value + ((to[i] ?? value) - value) * share));
  return `#${mix.map((value) => value.toString(16).padStart(2, '0')).join('')}`;
}

/** The colour to draw with in the present theme. */
export function paintColour(paint: Paint, read: ReadToken): string {
  if ('token' in paint) return read(paint.token);
  const at = Math.max(0, Math.min(1, paint.at));
  const token = (k: number): string => read(`--sweep-${paint.sweeps}-${k}`);
  return at <= 0.5 ? mixed(token(0), token(1), at * 2) : mixed(token(1), token(2), at * 2 - 1);
}

/** The place of sweep i among n along the ladder; a lone sweep takes the middle, which reads best on the canvas. */
export function ladderPlace(sweep: number, sweeps: number): number {
  return sweeps <= 1 ? 0.5 : sweep / (sweeps - 1);
}

/** A colour with a share of opacity, for shading. */
export function faint(colour: string, opacity: number): string {
  const parts = channels(colour);
  return parts ? `rgb(${parts.join(' ')} / ${opacity})` : colour;
}

/** The same colour as a CSS expression, which follows the theme by itself. */
export function paintCss(paint: Paint): string {
  if ('token' in paint) return `var(${paint.token})`;
  const at = Math.max(0, Math.min(1, paint.at));
  const lower = at <= 0.5 ? 0 : 1;
  const share = Math.round(1000 * (2 * at - lower)) / 10;
  const token = (k: number): string => `var(--sweep-${paint.sweeps}-${k})`;
  return `color-mix(in srgb, ${token(lower + 1)} ${share}%, ${token(lower)})`;
}
