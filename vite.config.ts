// The page. scripts/build.ts builds everything else.
import { svelte } from '@sveltejs/vite-plugin-svelte';
import { defineConfig } from 'vite';

export default defineConfig({
  root: 'src-renderer',
  base: '/',
  plugins: [svelte({ configFile: false })],
  build: {
    // SMOKE=1 lowers the syntax for the old runtime the Electron tests use.
    outDir: process.env['SMOKE'] ? '../out-smoke/renderer' : '../out/renderer',
    emptyOutDir: true,
    target: process.env['SMOKE'] ? 'chrome114' : 'chrome140',
    // No font or picture becomes a data: address, which the content security policy refuses.
    assetsInlineLimit: 0,
    modulePreload: false,
    // How long each plugin took is of no use to somebody who starts the program.
    rolldownOptions: { checks: { bundlerTimings: false } },
  },
});
