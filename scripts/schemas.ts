// Writes assets/schemas/*.schema.json from the contract's own schemas: npx node scripts/schemas.ts
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { publishedSchemas } from './published-schemas.ts';

const folder = join(import.meta.dirname, '../assets/schemas');
mkdirSync(folder, { recursive: true });
for (const [file, schema] of publishedSchemas())
  writeFileSync(join(folder, file), `${JSON.stringify(schema, null, 2)}\n`);
