// holdfast rehearse, as a person runs it: a process of its own.
import { spawn } from 'node:child_process';
import { readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { openNotebook } from '../../src-main/notebook/open.ts';
import { notebookOverview } from '../../src-main/notebook/overview.ts';
import { testFolder } from '../support/folder.ts';
import { longPlan, smallPlan } from '../support/small-plans.ts';

const at = testFolder();
const main = fileURLToPath(new URL('../../src-main/cli/main.ts', import.meta.url));
const program = `import { main } from ${JSON.stringify(main)}; process.exitCode = await main(process.argv.slice(1));`;

function holdfast(...args: string[]): Promise<{ code: number | null; out: string; errors: string }> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, ['--input-type=module', '-e', program, ...args]);
    let out = '';
    let errors = '';
    child.stdout.on('data', (data: Buffer) => (out += data.toString()));
    child.stderr.on('data', (data: Buffer) => (errors += data.toString()));
    child.once('close', (code) => resolve({ code, out, errors }));
  });
}

function planFile(name: string, plan: unknown = smallPlan()): string {
  writeFileSync(at(name), JSON.stringify(plan));
  return at(name);
}

describe('holdfast rehearse', () => {
  it('writes traces, forecast and figure, and says the forecast in short', async () => {
    const { code, out, errors } = await holdfast('rehearse', planFile('a.plan.json'), '--out', at('out'));
    expect({ code, errors: errors.replaceAll(/^(?:sweeps|numerical uncertainty): .*\n/gm, '') }).toEqual({
      code: 0,
      errors: '',
    });
    expect(errors).toContain('sweeps: 0 %');
    expect(readdirSync(at('out')).toSorted()).toEqual([
      'three-steps-forecast.json',
      'three-steps-sweep-1.csv',
      'three-steps-sweep-2.csv',
      'three-steps-sweep-3.csv',
      'three-steps.svg',
    ]);
    expect(out).toMatch(/Reach +\S+\u2009% of the membrane within 5\.00\u2009mV/);
    expect(out).toMatch(/Trust distance/);
    expect(out).toMatch(/Access error +−?\d/);
    expect(out).toMatch(/Numerical uncertainty +\d/);
    expect(out).toContain('Current at the end, pA');
    const rows = readFileSync(at('out/three-steps-sweep-1.csv'), 'utf8').trim().split('\r\n');
    // 30 ms at 50 µs, both ends, and the names of the columns.
    expect(rows).toHaveLength(602);
    const { forecast } = JSON.parse(readFileSync(at('out/three-steps-forecast.json'), 'utf8')) as {
      forecast: { numerical: { state: string } };
    };
    expect(forecast.numerical.state).toBe('computed');
  });

  it('writes over nothing unless told to', async () => {
    const plan = planFile('a.plan.json');
    await holdfast('rehearse', plan, '--out', at('out'));
    writeFileSync(at('out/three-steps.svg'), 'mine');
    const again = await holdfast('rehearse', plan, '--out', at('out'));
    expect(again.code).toBe(2);
    expect(again.errors).toContain('add --replace');
    expect(readFileSync(at('out/three-steps.svg'), 'utf8')).toBe('mine');
    const replaced = await holdfast('rehearse', plan, '--out', at('out'), '--replace');
    expect(replaced.code).toBe(0);
    expect(readFileSync(at('out/three-steps.svg'), 'utf8')).toContain('<svg');
  });

  it('keeps plan and rehearsal in a notebook when one is named', async () => {
    const args = ['--out', at('out'), '--notebook', at('n.holdfast')];
    expect((await holdfast('rehearse', planFile('a.plan.json'), ...args)).code).toBe(0);
    const notebook = openNotebook(at('n.holdfast'));
    const plans = notebookOverview(notebook).cells.flatMap((cell) => cell.plans);
    expect(plans).toEqual([expect.objectContaining({ name: 'Three steps', rehearsedAt: expect.any(String) })]);
    notebook.close();
  });

  it.runIf(process.platform !== 'win32')(
    'writes a finished rehearsal when it is interrupted over the numerical uncertainty',
    async () => {
      const plan = planFile('long.plan.json', longPlan(4));
      const child = spawn(process.execPath, [
        '--input-type=module',
        '-e',
        program,
        'rehearse',
        plan,
        '--out',
        at('out'),
      ]);
      let out = '';
      let interrupted = false;
      child.stdout.on('data', (data: Buffer) => (out += data.toString()));
      child.stderr.on('data', (data: Buffer) => {
        if (interrupted || !data.toString().includes('numerical uncertainty: ')) return;
        interrupted = child.kill('SIGINT');
      });
      const code = await new Promise<number | null>((resolve) => child.once('close', resolve));
      expect({ code, interrupted }).toEqual({ code: 0, interrupted: true });
      // Computed or not: the finer run may end while files are written.
      expect(out).toMatch(/Numerical uncertainty +\S/);
      expect(readdirSync(at('out'))).toContain('long-steps-forecast.json');
    },
  );

  it('refuses a plan with every fault in words, and exits with 2', async () => {
    const bad = { ...smallPlan(), tolerance: { unit: 'mV', value: -1 }, rig: { file: 'rig.json' }, mood: 'good' };
    const found = await holdfast('rehearse', planFile('bad.plan.json', bad), '--out', at('out'));
    expect(found.code).toBe(2);
    expect(found.errors.trim().split('\n')).toEqual([
      'value at bad.plan.json: tolerance.value is -1: give a value above 0',
      'field "mood" at bad.plan.json: mood is "good": remove it, or correct its name',
    ]);
    const missing = { ...smallPlan(), rig: { file: 'rig.json' } };
    const without = await holdfast('rehearse', planFile('b.plan.json', missing), '--out', at('out'));
    expect(without.code).toBe(2);
    expect(without.errors).toContain(`file at ${at('rig.json')} is missing`);
  });

  it.each([
    [[], 'No plan is named.'],
    [['a.json'], '--out FOLDER is missing'],
    [['a.json', '--out'], '--out'],
    [['a.json', '--out', 'x', '--fast'], '--fast'],
    [['a.json', 'b.json', '--out', 'x'], 'b.json'],
  ])('says what is wrong with the line %j, and how it is used', async (args, fault) => {
    const { code, errors } = await holdfast('rehearse', ...args);
    expect(code).toBe(2);
    expect(errors.split('\n')[0]).toContain(fault);
    expect(errors).toContain('usage: holdfast rehearse PLAN.json --out FOLDER');
  });
});
