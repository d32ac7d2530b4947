// Which area of work is open.

export const areas = ['Cell', 'Rig', 'Protocol', 'Rehearse', 'Forecast'] as const;
export type Area = (typeof areas)[number];

class AreaState {
  open = $state<Area>('Forecast');

  show(area: Area): void {
    this.open = area;
  }
}

export const area = new AreaState();
