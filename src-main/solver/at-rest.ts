// A cell that is steady before anything is searched for.
import { wayOf } from './electrodes.ts';
import type { HeldPipette, OperatingInput } from './operating-point.ts';
import { isStable } from './stability.ts';
import { steadyMembrane } from './steady-membrane.ts';
import type { Volt } from '../units/si.ts';

/** A cell no compartment of which would move further than this, V, is at rest: rounding of a level in mV. */
const settled: Volt = 1e-12;

/**
 * The voltages of a cell that is at rest with `V` everywhere but at ideal clamps, which stand at their holding levels;
 * undefined where it is not, or where that rest is not stable. A passive cell held at its reversal potential, and any
 * single compartment under an ideal clamp, need no search, and a search by relative progress finds none there.
 */
export function atRest(input: OperatingInput, everywhere: Volt): Float64Array | undefined {
  const { grid, kinetics, temperature, pipettes } = input;
  const V = new Float64Array(grid.count).fill(everywhere);
  const imposed = pipettes.filter((pipette) => wayOf(pipette) === 'imposed');
  for (const { compartment, holding } of imposed) V[compartment] = holding;
  const membrane = steadyMembrane(grid, kinetics, temperature, V);
  const net = membrane.current.map((I) => -I);
  const conductance = Float64Array.from(membrane.chord);
  for (let k = 1; k < grid.count; k++) {
    const p = grid.parent[k]!;
    const axial = grid.coupling[k]! * (V[p]! - V[k]!);
    net[k] = net[k]! + axial;
    net[p] = net[p]! - axial;
    conductance[k] = conductance[k]! + grid.coupling[k]!;
    conductance[p] = conductance[p]! + grid.coupling[k]!;
  }
  for (const pipette of pipettes) addPipette(pipette, V, net, conductance);
  for (const { compartment } of imposed) net[compartment] = 0;
  const still = net.every((I, k) => Math.abs(I) <= settled * conductance[k]!);
  return still && isStable(grid, membrane, pipettes) ? V : undefined;
}

function addPipette(pipette: HeldPipette, V: Float64Array, net: Float64Array, conductance: Float64Array): void {
  const c = pipette.compartment;
  const way = wayOf(pipette);
  if (way === 'imposed') return;
  if (way === 'held') {
    net[c] = net[c]! + (pipette.holding - V[c]!) / pipette.access;
    conductance[c] = conductance[c]! + 1 / pipette.access;
  } else {
    net[c] = net[c]! + pipette.holding;
  }
}
