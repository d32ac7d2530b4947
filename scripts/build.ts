// Bundles what runs outside the page: node scripts/build.ts [--smoke]
// --smoke lowers the syntax for the old runtime that the Electron tests use, and adds their entry.
import { bundle } from './bundle.ts';

const smoke = process.argv.includes('--smoke');
const outDir = smoke ? 'out-smoke/main' : 'out/main';

const forElectron: Readonly<Record<string, string>> = {
  main: 'src-main/shells/electron/main.ts',
  preload: 'src-main/shells/electron/preload.ts',
  engine: 'src-main/engine/process.ts',
  worker: 'src-main/engine/worker.ts',
  ...(smoke ? { 'main-smoke': 'tests/e2e/electron/main-smoke.ts' } : {}),
};
const forNode: Readonly<Record<string, string>> = {
  browser: 'src-main/shells/browser/main.ts',
  cli: 'src-main/cli/main.ts',
};

const target = smoke ? 'node18' : 'node24';
for (const [name, entry] of Object.entries(forElectron)) await bundle({ name, entry, format: 'cjs', outDir, target });
if (!smoke) {
  for (const [name, entry] of Object.entries(forNode)) await bundle({ name, entry, format: 'es', outDir, target });
}
