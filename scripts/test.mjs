// npm test: builds, finds a browser, and runs every test in one Vitest run. npm test -- WORDS hands words to Vitest.
// The last line is always "N passed, N failed", with ", N skipped" where there are any.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { needNewerNode, projectFolder } from './newer-node.mjs';

needNewerNode();
// TypeScript, which an old Node could not read.
const { buildIfStale } = await import('./fresh-build.ts');
const { chromiumObstacle } = await import('./test-chromium.ts');
const { passed, failed, skipped } = run();
console.log(`\n${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`);
process.exitCode = failed > 0 ? 1 : 0;

function run() {
  const notRun = { passed: 0, failed: 1, skipped: 0 };
  if (!buildIfStale('out') || !buildIfStale('out-smoke')) {
    console.error('The program could not be built; what failed stands above.');
    return notRun;
  }
  const obstacle = chromiumObstacle();
  if (obstacle) {
    console.error(obstacle);
    return notRun;
  }
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-test-'));
  const counts = join(folder, 'counts.json');
  try {
    const { status } = spawnSync(
      process.execPath,
      ['node_modules/vitest/vitest.mjs', 'run', '--reporter', './scripts/test-reporter.ts', ...process.argv.slice(2)],
      { cwd: projectFolder, stdio: 'inherit', env: { ...process.env, HOLDFAST_TEST_COUNTS: counts } },
    );
    const found = JSON.parse(readFileSync(counts, 'utf8'));
    return status === 0 || found.failed > 0 ? found : { ...found, failed: 1 };
  } catch {
    console.error('The tests ended without a result.');
    return notRun;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
