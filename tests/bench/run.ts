// Solver speed as ratios within one run: npm run bench. Prints a table and writes docs/bench.md.
// Model: unbranched cable, 20 µm compartments of 2 µm diameter, squid sodium, potassium and leak in each (Hodgkin and
// Huxley 1952, J Physiol 117:500–544), 0.5 nA into the first from 1 ms; the best of several runs counts.
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { storedChannels } from '../../src-main/channels/library.ts';
import { runSweep } from '../../src-main/solver/sweep.ts';
import type { SweepInput } from '../../src-main/solver/run.ts';
import { uniformCable } from '../support/uniform-cable.ts';

const runs = 9;
const step = 25e-6;

/** Best wall time of a run, in ns per compartment and step. */
function cost(count: number, duration: number, active: boolean): number {
  const input: SweepInput = {
    grid: uniformCable({ count, compartmentLength: 20e-6, diameter: 2e-6, axial: 1, active }),
    kinetics: storedChannels,
    temperature: 6.3,
    pipettes: [
      {
        letter: 'A',
        compartment: 0,
        mode: 'current clamp',
        access: 0,
        stray: 0,
        bridge: 0,
        command: [
          { start: 0, end: 1e-3, v0: 0, v1: 0 },
          { start: 1e-3, end: duration, v0: 0.5e-9, v1: 0.5e-9 },
        ],
      },
    ],
    duration,
    sampling: step,
    step,
    start: { V: new Float64Array(count).fill(-0.065) },
    probes: [0],
  };
  let best = Infinity;
  for (let run = 0; run < runs; run++) {
    const begun = performance.now();
    const result = runSweep(input);
    const ns = (performance.now() - begun) * 1e6;
    if (result.kind !== 'done') throw new Error(`the bench sweep ended as ${result.kind}`);
    best = Math.min(best, ns / (count * Math.round(duration / step)));
  }
  return best;
}

// Once for the compiler: the first runs of a program are slower than all later ones.
cost(1000, 0.1, true);
const squid1000 = cost(1000, 0.04, true);
const rows: (readonly [string, string])[] = [
  ['1000 compartments, sodium + potassium + leak', `1 (${squid1000.toFixed(0)} ns per compartment and step here)`],
  ['100 compartments', (cost(100, 0.2, true) / squid1000).toFixed(2)],
  ['5000 compartments', (cost(5000, 0.02, true) / squid1000).toFixed(2)],
  ['1000 compartments, leak only', (cost(1000, 0.04, false) / squid1000).toFixed(2)],
  ['1000 compartments, five times the simulated time', (cost(1000, 0.2, true) / squid1000).toFixed(2)],
];
const table = [
  '| case | cost per compartment and step, ratio |',
  '| --- | --- |',
  ...rows.map((row) => `| ${row[0]} | ${row[1]} |`),
];
const page = [
  '# Solver speed',
  '',
  'Written by `npm run bench`: ratios within one run, the best of nine, on whatever machine ran it last.',
  `Step ${step * 1e6} µs.`,
  '',
  ...table,
  '',
].join('\n');
mkdirSync(join(import.meta.dirname, '../../docs'), { recursive: true });
writeFileSync(join(import.meta.dirname, '../../docs/bench.md'), page);
console.log(table.join('\n'));
