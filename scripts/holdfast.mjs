#!/usr/bin/env node
// The command line: npx holdfast COMMAND ... Uses the bundle where it is up to date, else the sources.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { isStale } from './fresh-build.mjs';
import { needNewerNode, projectFolder } from './newer-node.mjs';

needNewerNode();
const file = isStale('out') ? 'src-main/cli/main.ts' : 'out/main/cli.mjs';
const { main } = await import(pathToFileURL(join(projectFolder, file)).href);
process.exitCode = await main(process.argv.slice(2));
