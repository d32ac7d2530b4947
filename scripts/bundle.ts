// How one program is bundled. Everything but the externals goes in, so that the packaged application has one runtime
// dependency.
import { builtinModules } from 'node:module';
import { build } from 'vite';

export interface Bundle {
  /** Of the output, without ending. */
  readonly name: string;
  readonly entry: string;
  /** CommonJS for all that Electron loads: a sandboxed preload takes nothing else, nor does an old utility process. */
  readonly format: 'cjs' | 'es';
  readonly outDir: string;
  readonly target: 'node18' | 'node24';
}

export async function bundle({ name, entry, format, outDir, target }: Bundle): Promise<void> {
  await build({
    configFile: false,
    logLevel: 'warn',
    ssr: { noExternal: true, target: 'node' },
    resolve: { conditions: ['node', 'import', 'module', 'default'] },
    build: {
      ssr: true,
      target,
      outDir,
      emptyOutDir: false,
      minify: false,
      sourcemap: true,
      rolldownOptions: {
        input: { [name]: entry },
        external: ['electron', 'better-sqlite3', /^node:/, ...builtinModules],
        output: {
          format,
          entryFileNames: format === 'cjs' ? '[name].cjs' : '[name].mjs',
          // A sandboxed preload cannot require a neighbouring chunk.
          codeSplitting: false,
        },
      },
    },
  });
}
