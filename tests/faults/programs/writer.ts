// A program that opens a notebook and keeps writing until it is killed: writer.ts NOTEBOOK commit | hold | stay
//   commit  cell after cell, each in a transaction of its own; says the number of each once it is committed
//   hold    many cells in one transaction that never ends; says "inside" when it is deep in it
//   stay    writes nothing; says "open" and stays
import { keepCell } from '../../../src-main/notebook/cells.ts';
import { change, openNotebook, type Notebook } from '../../../src-main/notebook/open.ts';
import { written } from '../../../src-main/engine/written.ts';
import { smallPlan } from '../../support/small-plans.ts';

const [path, what] = process.argv.slice(2);
if (path === undefined) throw new Error('no notebook named');
const notebook = openNotebook(path);
if (notebook.readOnlyReason !== null) throw new Error(notebook.readOnlyReason);

if (what === 'commit') {
  for (let n = 1; ; n += 1) {
    keep(notebook, n);
    process.stdout.write(`${n}\n`);
  }
} else if (what === 'hold') {
  change(notebook, () => {
    for (let n = 1; n <= 600; n += 1) keep(notebook, n);
    process.stdout.write('inside\n');
    for (;;) Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 1000);
  });
} else {
  process.stdout.write('open\n');
  setInterval(() => undefined, 1000);
}

/** A note long enough to fill pages, so that a transaction spills into the file before it ends. */
function keep(into: Notebook, n: number): void {
  keepCell(into, written({ ...smallPlan().cell, name: `cell ${n}`, note: 'note '.repeat(1000) }));
}
