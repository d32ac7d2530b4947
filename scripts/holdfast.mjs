#!/usr/bin/env node
// The command line: npx holdfast COMMAND ... Uses the bundle where it is up to date, else the sources.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { needNewerNode, projectFolder } from './newer-node.mjs';

needNewerNode();
// TypeScript, which an old Node could not read.
const { isStale } = await import('./fresh-build.ts');
const file = isStale('out') ? 'src-main/cli/main.ts' : 'out/main/cli.mjs';
const { main } = await import(pathToFileURL(join(projectFolder, file)).href);
process.exitCode = await main(process.argv.slice(2));
