// Writes the example cells' shapes, assets/examples/cells/*.swc, as the generators make them.
import { writeFileSync } from 'node:fs';
import { generatedSwc } from '../src-main/cell/generators.ts';
import { exampleShapes } from './example-shapes.ts';

for (const [name, generator] of Object.entries(exampleShapes))
  writeFileSync(new URL(`../assets/examples/cells/${name}.swc`, import.meta.url), generatedSwc(generator));
