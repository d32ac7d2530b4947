// An SWC file, read tolerantly: what can be repaired is repaired and reported, what cannot is refused with its line.
import type { SwcReport } from '../contract/results.ts';
import { connect } from './swc-connect.ts';
import { Findings, refusals, SwcFault, type RefusedCode } from './swc-findings.ts';
import { measuresOf, repeatedTips, type SwcTree } from './swc-measures.ts';
import { judgeUnits, repairRadii } from './swc-radii.ts';
import { readRows } from './swc-rows.ts';
import { gap, kidsOf, preorder, type Kids, type SwcSample } from './swc-sample.ts';
import { settleSomata, somaSolid } from './swc-soma.ts';
import { decodeSwc, lineOf } from './swc-text.ts';
import { repairTypes } from './swc-types.ts';

export type SwcReading = SwcRead | SwcRefused;
export interface SwcRead {
  readonly kind: 'read';
  readonly report: SwcReport;
  /** File order, repaired. */
  readonly samples: readonly SwcSample[];
  readonly kids: Kids;
  readonly trees: readonly SwcTree[];
  /** The tree with a soma and the most samples. */
  readonly main: SwcTree;
  /** 1 where a sample repeats the tip before it. */
  readonly gone: Uint8Array;
}
export interface SwcRefused {
  readonly kind: 'refused';
  readonly report: SwcReport;
  readonly code: RefusedCode;
  /** From 1; 0 when it is the file as a whole. */
  readonly line: number;
  /** The line as written. */
  readonly text: string;
  readonly remedy: string;
}

/**
 * Reads an SWC file whole. Lengths stay in the file's micrometres; header fields such as SCALE are kept, never applied.
 *
 * @source INCF SWC specification 1.0.3 for format and types; what is tolerated beyond it is common practice or a design
 *         choice and stands in the report.
 */
export function readSwc(bytes: Uint8Array): SwcReading {
  let text = '';
  try {
    const findings = new Findings();
    text = decodeSwc(bytes, findings);
    return read(text, findings);
  } catch (fault) {
    if (!(fault instanceof SwcFault)) throw fault;
    return refused(fault, text);
  }
}

function read(text: string, findings: Findings): SwcRead {
  const { rows, header } = readRows(text, findings);
  const samples = connect(rows, findings);
  const asWritten = kidsOf(samples);
  const firstRoots = samples.flatMap((s, i) => (s.parent < 0 ? [i] : []));
  repairTypes(
    samples,
    asWritten,
    firstRoots.flatMap((root) => preorder(asWritten, root)),
    findings,
  );
  const roots = settleSomata(samples, findings);
  const kids = kidsOf(samples);
  const orders = roots.map((root) => preorder(kids, root));
  repairRadii(samples, kids, orders.flat(), findings);
  judgeUnits(samples, findings);
  const trees = roots.map((root, n): SwcTree => {
    const order = orders[n]!;
    const group = order.filter((i) => samples[i]!.soma).sort((a, b) => a - b);
    return { root, order, soma: group.length === 0 ? null : somaSolid(samples, kids, group, findings) };
  });
  if (trees.every((tree) => tree.soma === null)) findings.note('W_NO_SOMA');
  const main = mainTree(trees);
  if (trees.length > 1) noteTrees(samples, trees, main, findings);
  const gone = repeatedTips(samples, kids, trees, findings);
  const measures = { ...measuresOf(samples, kids, trees, gone, findings), main_tree_samples: main.order.length };
  const list = findings.list();
  const report: SwcReport = {
    outcome: list.length === 0 ? 'accept' : 'report',
    codes: list.map((finding) => finding.code),
    findings: list,
    measures,
    header,
  };
  return { kind: 'read', report, samples, kids, trees, main, gone };
}

function mainTree(trees: readonly SwcTree[]): SwcTree {
  return trees.reduce((best, tree) => {
    const wins = (tree.soma === null) === (best.soma === null) ? tree.order.length > best.order.length : tree.soma;
    return wins ? tree : best;
  });
}

function noteTrees(samples: readonly SwcSample[], trees: readonly SwcTree[], main: SwcTree, findings: Findings): void {
  const centre = main.soma?.sphere ?? samples[main.root]!;
  const others = trees.filter((tree) => tree !== main);
  const told = others.slice(0, 5).map((tree) => {
    const nearest = tree.order.reduce((least, i) => Math.min(least, gap(samples[i]!, centre)), Infinity);
    const count = `${tree.order.length} sample${tree.order.length === 1 ? '' : 's'}`;
    return `${count} from line ${samples[tree.root]!.line}, ${nearest.toFixed(1)} µm from the main tree's centre`;
  });
  const more = others.length > told.length ? `; and ${others.length - told.length} more` : '';
  const words = `The file holds ${trees.length} trees; only the main one is computed. Left out: ${told.join('; ')}${more}.`;
  for (const tree of others) findings.note('W_TREES', samples[tree.root]!.line, words);
}

function refused(fault: SwcFault, text: string): SwcRefused {
  const words = lineOf(text, fault.line);
  const remedy = refusals[fault.code];
  const where = fault.line === 0 ? 'The file' : `Line ${fault.line}`;
  const finding = {
    code: fault.code,
    words: `${where} cannot be read: ${remedy}.`,
    count: 1,
    lines: fault.line === 0 ? [] : [fault.line],
  };
  const report: SwcReport = { outcome: 'refuse', codes: [fault.code], findings: [finding], header: [] };
  return { kind: 'refused', report, code: fault.code, line: fault.line, text: words, remedy };
}
