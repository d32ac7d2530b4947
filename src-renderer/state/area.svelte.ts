// Which area of work is open.

export const areas = ['Cell', 'Rig', 'Protocol', 'Rehearse', 'Forecast'] as const;
export type Area = (typeof areas)[number];

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
