import type { Grid } from '../../src-main/cell/grid.ts';

interface Cable {
  readonly count: number;
  readonly compartmentLength: number;
  readonly diameter: number;
  /** Axial resistivity, Ω·m. */
  readonly axial: number;
  /** Squid densities (120, 36, 0.3 mS/cm²) or the leak alone. */
  readonly active: boolean;
}

/** An unbranched cable of equal cylinders at 1 µF/cm², coupled centre to centre: the plainest grid there is. */
export function uniformCable(cable: Cable): Grid {
  const { count } = cable;
  const area = Math.PI * cable.diameter * cable.compartmentLength;
  const coupling = (Math.PI * cable.diameter ** 2) / (4 * cable.axial * cable.compartmentLength);
  const filled = (value: number) => new Float64Array(count).fill(value);
  const conductance = (channel: string, reversal: number, density: number) => ({
    channel,
    reversal: filled(reversal),
    conductance: filled(density * area),
  });
  return {
    count,
    parent: Int32Array.from({ length: count }, (_, k) => k - 1),
    coupling: filled(coupling).fill(0, 0, 1),
    area: filled(area),
    capacitance: filled(0.01 * area),
    conductances: [
      conductance('leak', -0.054387, 3),
      ...(cable.active
        ? [conductance('na-hodgkin-huxley-1952', 0.05, 1200), conductance('k-hodgkin-huxley-1952', -0.077, 360)]
        : []),
    ],
    branch: new Int32Array(count),
    at: Float64Array.from({ length: count }, (_, k) => k * cable.compartmentLength),
    distance: Float64Array.from({ length: count }, (_, k) => k * cable.compartmentLength),
    position: new Float64Array(3 * count),
    regionNames: ['cable'],
    regionIndex: new Int32Array(count),
    regionArea: [filled(area)],
    regionStretch: null,
    names: null,
    compartmentAt: () => 0,
  };
}
