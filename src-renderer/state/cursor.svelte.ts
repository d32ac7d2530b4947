// Where in the rehearsal one looks: the sweep, and the time within it. Charts, cell and film share it.

class CursorState {
  /** From 0. */
  sweep = $state(0);
  /** Within the sweep. Null: no crosshair is placed. */
  time_ms = $state<number | null>(null);

  /** Moves by `by` sweeps and stays within 0 … sweeps − 1. */
  stepSweep(by: number, sweeps: number): void {
    this.sweep = Math.max(0, Math.min(sweeps - 1, this.sweep + by));
  }

  /** Moves the crosshair and keeps it within the sweep. */
  stepTime(by_ms: number, duration_ms: number): void {
    this.time_ms = Math.max(0, Math.min(duration_ms, (this.time_ms ?? 0) + by_ms));
  }
}

export const cursor = new CursorState();
