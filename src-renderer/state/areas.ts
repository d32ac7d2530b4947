// The areas of work, in the order of their tabs.

export const areas = ['Cell', 'Rig', 'Protocol', 'Rehearse', 'Forecast'] as const;
export type Area = (typeof areas)[number];
