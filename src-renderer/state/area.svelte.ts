// Which area of work is open.
import type { Area } from './areas.ts';

class AreaState {
  open = $state<Area>('Forecast');

  /** For other state: an area was opened. */
  whenShown: () => void = () => undefined;

  show(area: Area): void {
    this.open = area;
    this.whenShown();
  }
}

export const area = new AreaState();
