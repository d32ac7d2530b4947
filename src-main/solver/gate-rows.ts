// What a step does to a gate, tabulated over voltage:  x ← x·e + b,  e = exp(−Δ/τ),  b = (1 − e)·inf.
import type { Gate } from '../channels/kinetics.ts';
import type { Second, Volt } from '../units/si.ts';

/** Membrane is hardly ever taken beyond; where it is, rows are computed instead of looked up. */
const lowest = -0.15;
const highest = 0.15;
/** 0.1 mV shifts a spike by 0.04 µs at steps of 25 µs (measured); the error falls with the square. */
export const defaultSpacing: Volt = 1e-4;

/**
 * All gates of a cell, one row per voltage and advance. Row layout, four numbers per gate at column 4·gate:
 * e, its difference to the next row, b, its difference to the next row.
 */
export interface GateRows {
  readonly gates: readonly Gate[];
  /** Rates' factor by temperature, per gate. */
  readonly factors: readonly number[];
  readonly width: number;
  readonly values: Float64Array;
  readonly rows: number;
  readonly perVolt: number;
  /** Advances that have a table, and where each table starts. */
  readonly tabulated: readonly { readonly advance: Second; readonly start: number }[];
  /** Where the rows start that are computed on the spot, one per compartment. */
  readonly spot: number;
}

/** q10^((T − reference)/10), the factor on a gate's rates. T in °C. */
export function rateFactor(gate: Gate, temperature: number): number {
  return gate.q10 ** ((temperature - gate.q10Reference) / 10);
}

/**
 * Tables for the given advances, and room for a computed row per compartment.
 *
 * @source The exponential gate step: Rush S, Larsen H (1978), IEEE Trans Biomed Eng 25:389–392 (from memory).
 */
export function gateRows(
  gates: readonly Gate[],
  options: {
    readonly temperature: number;
    readonly advances: readonly Second[];
    readonly compartments: number;
    readonly spacing: Volt;
  },
): GateRows {
  const factors = gates.map((gate) => rateFactor(gate, options.temperature));
  const width = 4 * gates.length;
  const rows = Math.round((highest - lowest) / options.spacing);
  const perVolt = rows / (highest - lowest);
  const spot = options.advances.length * rows * width;
  const values = new Float64Array(spot + options.compartments * width);
  const tabulated = options.advances.map((advance, a) => ({ advance, start: a * rows * width }));
  const inf = new Float64Array(rows + 1);
  const tau = new Float64Array(rows + 1);
  gates.forEach((gate, g) => {
    const factor = factors[g]!;
    for (let i = 0; i <= rows; i++) {
      const V = 1e3 * (lowest + i / perVolt);
      inf[i] = gate.inf(V);
      tau[i] = gate.tau(V);
    }
    for (const { advance, start } of tabulated) {
      const span = -1e3 * advance * factor;
      let e = Math.exp(span / tau[0]!);
      let b = -Math.expm1(span / tau[0]!) * inf[0]!;
      for (let i = 0; i < rows; i++) {
        const nextE = Math.exp(span / tau[i + 1]!);
        const nextB = -Math.expm1(span / tau[i + 1]!) * inf[i + 1]!;
        const at = start + i * width + 4 * g;
        values[at] = e;
        values[at + 1] = nextE - e;
        values[at + 2] = b;
        values[at + 3] = nextB - b;
        e = nextE;
        b = nextB;
      }
    }
  });
  return { gates, factors, width, values, rows, perVolt, tabulated, spot };
}

/** A gate's value after `advance` at a fixed voltage (V), computed directly. */
export function advancedGate(gate: Gate, factor: number, x: number, V: Volt, advance: Second): number {
  const rate = (-1e3 * advance * factor) / gate.tau(1e3 * V);
  return x * Math.exp(rate) - Math.expm1(rate) * gate.inf(1e3 * V);
}

/**
 * Finds every compartment's row for one advance: `row[k]` is the row's start in `values`, `part[k]` the way to the
 * next one, 0…1. Looked up where there is a table and the voltage is within it; else computed on the spot.
 */
export function chooseRows(
  table: GateRows,
  advance: Second,
  V: Float64Array,
  row: Int32Array,
  part: Float64Array,
): void {
  const { width, rows, perVolt, spot } = table;
  const found = table.tabulated.find((entry) => entry.advance === advance);
  const top = found === undefined ? -1 : rows;
  const start = found?.start ?? 0;
  for (let k = 0; k < V.length; k++) {
    const place = (V[k]! - lowest) * perVolt;
    if (place >= 0 && place < top) {
      const i = place | 0;
      row[k] = start + i * width;
      part[k] = place - i;
    } else {
      row[k] = spot + k * width;
      part[k] = 0;
      computeRow(table, spot + k * width, V[k]!, advance);
    }
  }
}

function computeRow(table: GateRows, start: number, V: Volt, advance: Second): void {
  for (let g = 0; g < table.gates.length; g++) {
    const gate = table.gates[g]!;
    const rate = (-1e3 * advance * table.factors[g]!) / gate.tau(1e3 * V);
    const at = start + 4 * g;
    table.values[at] = Math.exp(rate);
    table.values[at + 1] = 0;
    table.values[at + 2] = -Math.expm1(rate) * gate.inf(1e3 * V);
    table.values[at + 3] = 0;
  }
}
