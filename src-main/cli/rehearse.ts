// holdfast rehearse PLAN.json --out FOLDER [--notebook FILE] [--replace]: runs a plan and writes what it forecasts.
import { mkdirSync, readdirSync, rmSync, writeFileSync, existsSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join, resolve } from 'node:path';
import { parseArgs } from 'node:util';
import type { RefusalData } from '../contract/refusal.ts';
import type { Answer, TextFile } from '../contract/requests.ts';
import { createEngine, type Engine } from '../engine/engine.ts';
import { readPlanWhole } from '../engine/read-plan.ts';
import { forecastWords, refusalsOf, refusalWords } from '../engine/words.ts';
import { ProgressLine } from './progress-line.ts';

const usage = `usage: holdfast rehearse PLAN.json --out FOLDER [--notebook FILE] [--replace]

  PLAN.json        a plan, its parts in it or named as files beside it
  --out FOLDER     where traces (CSV), forecast (JSON) and figure (SVG) go; made when it is not there
  --notebook FILE  keeps plan and rehearsal in this notebook; made when it is not there
  --replace        writes over files of the same names in FOLDER`;

interface Wishes {
  readonly plan: string;
  readonly out: string;
  readonly notebook: string | undefined;
  readonly replace: boolean;
}

/** Answers that were refused, carried to the one place that prints them. */
class Refused extends Error {
  readonly refusals: readonly RefusalData[];
  constructor(refusals: readonly RefusalData[]) {
    super(refusalWords(refusals));
    this.refusals = refusals;
  }
}

/**
 * Runs the command. Progress with the time left goes to standard error, the forecast in short to standard output.
 *
 * Interrupted before the sweeps are done it writes nothing; after that it writes what it has, without the uncertainty.
 *
 * @returns the exit code: 0 done; 1 the run stopped or was interrupted; 2 the command line, the plan or a file was refused.
 */
export async function rehearse(args: string[]): Promise<number> {
  const wishes = wishesFrom(args);
  if (typeof wishes === 'string') {
    process.stderr.write(`${wishes}\n\n${usage}\n`);
    return 2;
  }
  const scratch = mkdtempSync(join(tmpdir(), 'holdfast-'));
  const engine = createEngine({ log: (text) => process.stderr.write(`${text}\n`) });
  try {
    return await run(engine, wishes, scratch);
  } catch (error) {
    const refusals = error instanceof Refused ? error.refusals : refusalsOf(error);
    if (!refusals) throw error;
    process.stderr.write(`${refusalWords(refusals)}\n`);
    return 2;
  } finally {
    await engine.close();
    rmSync(scratch, { recursive: true, force: true });
  }
}

/** What the command line asks for, or what is wrong with it. */
function wishesFrom(args: string[]): Wishes | string {
  try {
    const { values, positionals } = parseArgs({
      args,
      allowPositionals: true,
      options: {
        out: { type: 'string' },
        notebook: { type: 'string' },
        replace: { type: 'boolean', default: false },
      },
    });
    const [plan, ...more] = positionals;
    if (plan === undefined) return 'No plan is named.';
    if (more.length > 0) return `One plan at a time: "${more[0]}" is one too many.`;
    if (values.out === undefined || values.out === '') return 'No folder is named: --out FOLDER is missing.';
    return { plan, out: values.out, notebook: values.notebook, replace: values.replace };
  } catch (error) {
    // An option that does not exist, or one without its value: Node says which in its first sentence.
    if (!(error instanceof TypeError)) throw error;
    return `${error.message.split('. ')[0]}.`;
  }
}

async function run(engine: Engine, wishes: Wishes, scratch: string): Promise<number> {
  const plan = readPlanWhole(wishes.plan);
  // Before the run, so that nobody waits for what cannot be written.
  const planFile = accepted(await engine.ask('export plan', { plan }));
  refuseTaken(wishes, planFile.name.replace(/\.plan\.json$/, ''));
  const path = wishes.notebook ?? join(scratch, 'scratch.holdfast');
  accepted(await engine.ask(existsSync(path) ? 'notebook open' : 'notebook create', { path: resolve(path) }));
  const { planId } = accepted(await engine.ask('plan create', { plan }));

  const line = new ProgressLine(process.stderr);
  const jobId = 'command';
  const settled = numericalSettled(engine, line);
  const interrupted = new Promise<void>((resolve) => process.once('SIGINT', () => resolve()));
  void interrupted.then(() => engine.ask('job cancel', { jobId }));
  const outcome = accepted(await engine.ask('rehearsal start', { jobId, planId, plan }));
  if (outcome.kind !== 'finished') {
    line.end();
    const words = outcome.kind === 'cancelled' ? 'interrupted: nothing was written' : refusalWords([outcome.refusal]);
    process.stderr.write(`${words}\n`);
    return 1;
  }
  // What is finished is not thrown away with what was still to come: it says "not computed" instead.
  await Promise.race([settled, interrupted]);
  line.end();
  await write(engine, wishes, outcome.rehearsalId);
  return 0;
}

/** Shows progress meanwhile. Asked for before the run starts, because it may settle at any time after. */
function numericalSettled(engine: Engine, line: ProgressLine): Promise<void> {
  return new Promise((done) => {
    engine.onEvent((event) => {
      if (event.event === 'progress') line.show(event.what, event.done, event.left_s);
      if (event.event === 'numerical') done();
    });
  });
}

async function write(engine: Engine, wishes: Wishes, rehearsalId: number): Promise<void> {
  const files = [
    ...accepted(await engine.ask('export traces', { rehearsalId })),
    accepted(await engine.ask('export forecast', { rehearsalId })),
    accepted(await engine.ask('export figure', { rehearsalId })),
  ];
  for (const file of files) writeFile(wishes, file);
  process.stdout.write(forecastWords(accepted(await engine.ask('rehearsal read', { rehearsalId }))));
  process.stdout.write(`${files.length} files in ${wishes.out}\n`);
}

function accepted<T>(answer: Answer<T>): T {
  if (answer.ok) return answer.value;
  if ('refusals' in answer) throw new Refused(answer.refusals);
  throw new Error(answer.fault);
}

/** All that is written begins with the plan's name. */
function refuseTaken(wishes: Wishes, stem: string): void {
  if (wishes.replace || !existsSync(wishes.out)) return;
  const taken = readdirSync(wishes.out).find((name) => name.startsWith(stem) && /\.(?:csv|json|svg)$/.test(name));
  if (taken !== undefined) throw new Refused([inTheWay(join(wishes.out, taken))]);
}

function writeFile({ out, replace }: Wishes, { name, text }: TextFile): void {
  const path = join(out, basename(name));
  try {
    mkdirSync(out, { recursive: true });
    writeFileSync(path, text, { flag: replace ? 'w' : 'wx' });
  } catch (cause) {
    const code = (cause as NodeJS.ErrnoException).code ?? 'not written';
    if (code === 'EEXIST') throw new Refused([inTheWay(path)]);
    const remedy = 'check the folder, its permissions and the space left';
    throw new Refused([{ code: 'file-unwritable', thing: 'file', place: path, value: code, remedy }]);
  }
}

function inTheWay(path: string): RefusalData {
  const remedy = 'name another folder with --out, or add --replace';
  return { code: 'file-exists', thing: 'file', place: path, value: 'there already', remedy };
}
