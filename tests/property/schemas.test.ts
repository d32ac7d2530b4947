// The published JSON Schemas: what the program itself checks by, and every example document obeys.
import { Ajv2020 } from 'ajv/dist/2020.js';
import { readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { publishedSchemas } from '../../scripts/published-schemas.ts';

const assets = join(import.meta.dirname, '../../assets');
const json = (path: string): unknown => JSON.parse(readFileSync(path, 'utf8'));
const examples = readdirSync(join(assets, 'examples'), { recursive: true, encoding: 'utf8' }).filter((file) =>
  file.endsWith('.json'),
);

function validator(kind: string) {
  const ajv = new Ajv2020({ strict: false, allErrors: true });
  return ajv.compile(json(join(assets, 'schemas', `${kind}.schema.json`)) as object);
}

describe('published schemas', () => {
  it.each([...publishedSchemas()])(
    '%s is what the contract says (npx node scripts/schemas.ts writes it)',
    (file, schema) => {
      expect(json(join(assets, 'schemas', file))).toEqual(JSON.parse(JSON.stringify(schema)));
    },
  );

  it('has four cells and six plans to check', () => {
    expect(examples.filter((file) => file.endsWith('.cell.json')).length).toBeGreaterThanOrEqual(4);
    expect(examples.filter((file) => file.endsWith('.plan.json')).length).toBeGreaterThanOrEqual(6);
  });

  it.each(examples)('example %s obeys its schema', (file) => {
    const document = json(join(assets, 'examples', file)) as { kind: string };
    const validate = validator(document.kind);
    validate(document);
    expect(validate.errors, basename(file)).toBeNull();
  });

  it('refuses an unknown field', () => {
    const file = examples.find((name) => name.endsWith('.plan.json')) ?? '';
    const document = json(join(assets, 'examples', file)) as object;
    expect(validator('plan')({ ...document, accessResistance_kOhm: 3 })).toBe(false);
  });
});
