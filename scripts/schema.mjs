// Writes src/input/case.schema.json, the JSON Schema (2020-12) of a cross-section file for editors, from the zod schema.
// With --check it writes nothing and fails when the committed file is not what it would write.
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { rolldown } from 'rolldown';

const root = fileURLToPath(new URL('..', import.meta.url));
const target = `${root}/src/input/case.schema.json`;

// TypeScript is bundled on the fly: the schema is made from the source, not from a build that may be old
const entry = '\0schema-entry';
const bundle = await rolldown({
  input: entry,
  platform: 'node',
  logLevel: 'silent',
  plugins: [
    {
      name: 'schema-entry',
      resolveId: (id) => (id === entry ? entry : undefined),
      load: (id) =>
        id === entry
          ? `export { z } from '${root}/node_modules/zod/index.js';\nexport { caseSchema, FAMILY_KEY } from '${root}/src/input/case-schema.ts';`
          : undefined,
    },
  ],
});
const { output } = await bundle.generate({ format: 'esm' });
await bundle.close();
const code = Buffer.from(output[0].code).toString('base64');
const { z, caseSchema, FAMILY_KEY } = await import(`data:text/javascript;base64,${code}`);

const schema = z.toJSONSchema(caseSchema, {
  io: 'input',
  override: ({ jsonSchema }) => {
    const family = jsonSchema[FAMILY_KEY];
    delete jsonSchema[FAMILY_KEY];
    // the program takes bare numbers to explain what is missing; an editor should refuse them at once
    if (family !== undefined && family !== 'number' && family !== 'ratio') {
      delete jsonSchema.anyOf;
      jsonSchema.type = 'string';
    }
  },
});
schema.title = 'rimflow cross-section';
const text = `${JSON.stringify(schema, null, 1)}\n`;

if (process.argv.includes('--check')) {
  if (readFileSync(target, 'utf8') !== text) {
    process.stderr.write('src/input/case.schema.json is not up to date: run node scripts/schema.mjs\n');
    process.exitCode = 1;
  }
} else {
  writeFileSync(target, text);
}
