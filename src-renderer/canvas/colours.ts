// The theme's colours for painting, and the colour scales as steps.

export interface CanvasColours {
  readonly canvas: string;
  readonly ink: string;
  readonly ink2: string;
  readonly ink3: string;
  readonly accent: string;
  readonly select: string;
  readonly a: string;
  readonly aTint: string;
  readonly b: string;
  readonly bTint: string;
  readonly magnitude: readonly string[];
  readonly signed: readonly string[];
}

/** Colours a scale is painted in: enough that no step is seen, few enough to paint each in one stroke. */
export const scaleSteps = 32;

/** Reads the theme's variables; painters get plain strings. */
export function readColours(element: Element): CanvasColours {
  const style = getComputedStyle(element);
  const read = (name: string): string => style.getPropertyValue(`--${name}`).trim();
  const stops = (name: string, count: number): string[] =>
    Array.from({ length: count }, (_, i) => read(`${name}-${i}`));
  return {
    canvas: read('canvas'),
    ink: read('ink'),
    ink2: read('ink-2'),
    ink3: read('ink-3'),
    accent: read('accent'),
    select: read('select'),
    a: read('a'),
    aTint: read('a-tint'),
    b: read('b'),
    bTint: read('b-tint'),
    magnitude: colourSteps(stops('seq', 6), scaleSteps),
    signed: colourSteps(stops('signed', 7), scaleSteps + 1),
  };
}

/** Colours evenly spread between the stops, the first and last included. @param stops "#rrggbb" each. */
export function colourSteps(stops: readonly string[], count: number): readonly string[] {
  return Array.from({ length: count }, (_, i) => {
    const at = (i / (count - 1)) * (stops.length - 1);
    const left = Math.min(Math.floor(at), stops.length - 2);
    return mix(stops[left] ?? '#000000', stops[left + 1] ?? '#000000', at - left);
  });
}

function mix(from: string, to: string, share: number): string {
  const part = (hex: string, i: number): number => parseInt(hex.slice(1 + 2 * i, 3 + 2 * i), 16);
  const [r, g, b] = [0, 1, 2].map((i) => Math.round(part(from, i) + share * (part(to, i) - part(from, i))));
  return `rgb(${r ?? 0} ${g ?? 0} ${b ?? 0})`;
}

/** Which step of a scale a value falls on; −1 for no value. Beyond the ends: the end. */
export function stepOf(value: number, low: number, high: number, count: number): number {
  if (Number.isNaN(value)) return -1;
  const share = high > low ? (value - low) / (high - low) : 0.5;
  return Math.max(0, Math.min(count - 1, Math.round(share * (count - 1))));
}
