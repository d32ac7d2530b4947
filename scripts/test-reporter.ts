// What npm test shows: each file as it ends, failures in full, skipped tests with their reason. The counts go to a file,
// because the runner prints the last line after everything else has spoken.
import { writeFileSync } from 'node:fs';
import { relative } from 'node:path';
import type { Reporter, SerializedError, TestCase, TestModule, TestRunEndReason } from 'vitest/node';

export interface Counts {
  readonly passed: number;
  readonly failed: number;
  readonly skipped: number;
}

export default class PlainReporter implements Reporter {
  onTestModuleEnd(module: TestModule): void {
    const counts = count([module]);
    const mark = counts.failed > 0 ? 'FAILED' : 'ok';
    const name = relative(process.cwd(), module.moduleId);
    const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : '';
    console.log(
      `${mark.padEnd(7)}${name} (${counts.passed} passed${counts.failed > 0 ? `, ${counts.failed} failed` : ''}${skipped})`,
    );
  }

  onTestRunEnd(modules: readonly TestModule[], errors: readonly SerializedError[], reason: TestRunEndReason): void {
    const tests = modules.flatMap((module) => [...module.children.allTests()]);
    for (const test of tests) if (test.result().state === 'failed') showFailure(test);
    for (const module of modules) {
      for (const error of [...module.errors(), ...suiteErrors(module)]) {
        showError(relative(process.cwd(), module.moduleId), error);
      }
    }
    for (const error of errors) showError('outside of any test', error);
    const left = tests.filter((test) => test.result().state === 'skipped');
    if (left.length > 0) console.log('\nSkipped:');
    for (const test of left) console.log(`  ${test.fullName}: ${reasonOf(test)}`);

    const counts = count(modules);
    const failed = counts.failed + errors.length;
    // Stopped half-way, or without a test to its name, a run has not passed.
    const incomplete = reason === 'interrupted' || tests.length === 0 ? 1 : 0;
    const file = process.env['HOLDFAST_TEST_COUNTS'];
    if (file) writeFileSync(file, JSON.stringify({ ...counts, failed: failed + incomplete } satisfies Counts));
  }
}

/** A file that could not be loaded, or whose preparation failed, counts as one failure. */
function count(modules: readonly TestModule[]): Counts {
  const states = modules.flatMap((module) => [...module.children.allTests()].map((test) => test.result().state));
  const broken = modules.filter((module) => module.errors().length + suiteErrors(module).length > 0).length;
  const having = (state: string): number => states.filter((each) => each === state).length;
  return { passed: having('passed'), failed: having('failed') + broken, skipped: having('skipped') };
}

function suiteErrors(module: TestModule): SerializedError[] {
  return [...module.children.allSuites()].flatMap((suite) => [...suite.errors()]);
}

function reasonOf(test: TestCase): string {
  const result = test.result();
  return (result.state === 'skipped' && result.note) || 'no reason given';
}

function showFailure(test: TestCase): void {
  const name = `${relative(process.cwd(), test.module.moduleId)}: ${test.fullName}`;
  for (const error of test.result().errors ?? []) showError(name, error);
}

function showError(name: string, error: SerializedError): void {
  console.log(`\nFAILED ${name}`);
  console.log(error.stack ?? error.message);
  if (typeof error['diff'] === 'string') console.log(error['diff']);
}
