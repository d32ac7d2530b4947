// Bundles what runs outside the page: node scripts/build.ts [--smoke]
// Everything but the externals goes into the bundles, so that the packaged application has one runtime dependency.
import { builtinModules } from 'node:module';
import { build, type InlineConfig } from 'vite';

// --smoke lowers the syntax for the old runtime that the Electron tests use, and adds their entry.
const smoke = process.argv.includes('--smoke');
const outDir = smoke ? 'out/smoke/main' : 'out/main';
const external = ['electron', 'better-sqlite3', /^node:/, ...builtinModules];

function bundle(name: string, entry: string, format: 'cjs' | 'es'): InlineConfig {
  return {
    configFile: false,
    logLevel: 'warn',
    ssr: { noExternal: true, target: 'node' },
    resolve: { conditions: ['node', 'import', 'module', 'default'] },
    build: {
      ssr: true,
      target: smoke && format === 'cjs' ? 'node18' : 'node24',
      outDir,
      emptyOutDir: false,
      minify: false,
      sourcemap: true,
      rolldownOptions: {
        input: { [name]: entry },
        external,
        output: {
          format,
          entryFileNames: format === 'cjs' ? '[name].cjs' : '[name].mjs',
          // A sandboxed preload cannot require a neighbouring chunk.
          codeSplitting: false,
        },
      },
    },
  };
}

// CommonJS for all that Electron loads: a sandboxed preload takes nothing else, and an engine that is a utility process
// then loads in any version.
await build(bundle('main', 'src-main/shells/electron/main.ts', 'cjs'));
await build(bundle('preload', 'src-main/shells/electron/preload.ts', 'cjs'));
await build(bundle('engine', 'src-main/engine/process.ts', 'cjs'));
await build(bundle('worker', 'src-main/engine/worker.ts', 'cjs'));
if (smoke) {
  await build(bundle('main-smoke', 'tests/e2e/electron/main-smoke.ts', 'cjs'));
} else {
  await build(bundle('browser', 'src-main/shells/browser/main.ts', 'es'));
  await build(bundle('cli', 'src-main/cli/main.ts', 'es'));
}
