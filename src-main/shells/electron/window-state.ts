import { readFileSync, writeFileSync } from 'node:fs';

export interface Bounds {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}
export interface WindowState {
  readonly bounds: Bounds;
  readonly maximized: boolean;
}

const least = { width: 900, height: 600 } as const;

/** The state a window was left in; null when there is none to be read, or it would leave the window out of sight. */
export function readWindowState(file: string, screens: readonly Bounds[]): WindowState | null {
  let kept: unknown;
  try {
    kept = JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    // A first start, or a damaged file: the window then opens where the system puts it.
    return null;
  }
  if (!isState(kept)) return null;
  return screens.some((screen) => reachable(kept.bounds, screen)) ? kept : null;
}

export function writeWindowState(file: string, state: WindowState): void {
  writeFileSync(file, JSON.stringify(state));
}

/** Enough of the title bar on a screen to take hold of it. */
function reachable(window: Bounds, screen: Bounds): boolean {
  const across = Math.min(window.x + window.width, screen.x + screen.width) - Math.max(window.x, screen.x);
  return across >= 100 && window.y >= screen.y && window.y <= screen.y + screen.height - 50;
}

function isState(value: unknown): value is WindowState {
  if (typeof value !== 'object' || value === null || !('bounds' in value) || !('maximized' in value)) return false;
  const { bounds } = value;
  if (typeof bounds !== 'object' || bounds === null || typeof value.maximized !== 'boolean') return false;
  const { x, y, width, height } = bounds as Record<string, unknown>;
  if (![x, y, width, height].every(Number.isInteger)) return false;
  return (width as number) >= least.width && (height as number) >= least.height;
}
