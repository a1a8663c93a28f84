/** scripts/layers: the tree of this repo is clean, and each kind of broken tree is caught at its line. */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, describe, expect, it } from 'vitest';
import { checkLayers } from '../../scripts/layers.mjs';

const made: string[] = [];
afterEach(() => {
  for (const folder of made.splice(0)) rmSync(folder, { recursive: true });
});

/** Breaks of a tree of these files, as `file:line text`. */
function breaks(files: Record<string, string>): string[] {
  const src = mkdtempSync(join(tmpdir(), 'layers-'));
  made.push(src);
  for (const [name, text] of Object.entries(files)) {
    mkdirSync(dirname(join(src, name)), { recursive: true });
    writeFileSync(join(src, name), text);
  }
  return checkLayers(src).map(({ file, line, text }) => `${file}:${line} ${text}`);
}

/** A small tree in order; the files given come on top. */
function tree(files: Record<string, string>): Record<string, string> {
  return {
    'problem.ts': 'export class Problem extends Error {}\n',
    'model/index.ts': "export { MU0 } from './constants.ts';\n",
    'model/constants.ts': '/** [H/m] */\nexport const MU0 = 4e-7 * Math.PI;\n',
    'skin/index.ts': "export { besselRatio, solid } from './solid.ts';\n",
    'skin/solid.ts':
      "import { MU0 } from '../model/index.ts';\nimport { Problem } from '../problem.ts';\nexport const besselRatio = MU0;\nexport const solid = () => new Problem();\n",
    'cli/bin.ts':
      "import { solid } from '../skin/index.ts';\nimport { argv } from 'node:process';\nsolid();\nprocess.exit(argv.length);\n",
    'index.ts': "export { besselRatio, solid } from './skin/index.ts';\n",
    ...files,
  };
}

describe('scripts/layers', () => {
  it('finds nothing to say about src/', () => {
    expect(checkLayers(fileURLToPath(new URL('../../src', import.meta.url)))).toEqual([]);
  });
  it('finds nothing to say about a tree in order', () => {
    expect(breaks(tree({}))).toEqual([]);
  });

  const cases: [string, Record<string, string>, string][] = [
    [
      'an arrow upwards',
      { 'model/bad.ts': "\nimport { solid } from '../skin/index.ts';\nsolid();\n" },
      'model/bad.ts:2 model -> skin: no such arrow',
    ],
    [
      'an arrow of types alone',
      { 'model/bad.ts': "export type { S } from '../skin/index.ts';\n" },
      'model/bad.ts:1 model -> skin: no such arrow',
    ],
    [
      'an arrow by import()',
      { 'model/bad.ts': "export const later = () => import('../skin/index.ts');\n" },
      'model/bad.ts:1 model -> skin: no such arrow',
    ],
    [
      'input -> skin',
      { 'input/index.ts': "export { solid } from '../skin/index.ts';\n" },
      'input/index.ts:1 input -> skin: no such arrow',
    ],
    [
      'a way past index.ts',
      { 'cli/x.ts': "import { solid } from '../skin/solid.ts';\nsolid();\n" },
      'cli/x.ts:1 cli -> skin/solid.ts: across folders only index.ts is imported',
    ],
    [
      'a leaf that imports',
      { 'problem.ts': "export { MU0 } from './model/index.ts';\n" },
      'problem.ts:1 problem.ts is a leaf: it imports nothing',
    ],
    [
      'the library on the command line',
      { 'index.ts': "export { x } from './cli/index.ts';\n", 'cli/index.ts': 'export const x = 1;\n' },
      'index.ts:1 index.ts -> cli: the library knows no command line',
    ],
    [
      'src/index.ts as a source',
      { 'cli/x.ts': "import { solid } from '../index.ts';\nsolid();\n" },
      'cli/x.ts:1 cli -> index.ts: of src/ itself only leaves are imported',
    ],
    [
      'a ring of files',
      {
        'skin/a.ts': "import { b } from './b.ts';\nexport const a = b;\n",
        'skin/b.ts': "\nimport { a } from './a.ts';\nexport const b = a;\n",
      },
      'skin/b.ts:2 a ring of files: skin/a.ts -> skin/b.ts -> skin/a.ts',
    ],
    [
      'a file of the machine',
      { 'model/x.ts': "import { readFileSync } from 'node:fs';\nreadFileSync('x');\n" },
      'model/x.ts:1 "node:fs": only cli touches the machine',
    ],
    [
      'the same without its prefix',
      { 'model/x.ts': "import 'fs';\n" },
      'model/x.ts:1 "fs": only cli touches the machine',
    ],
    [
      'a clock',
      { 'model/x.ts': '\nexport const now = () => Date.now();\n' },
      'model/x.ts:2 Date: only cli touches the machine',
    ],
    [
      'a timer',
      { 'model/x.ts': 'setTimeout(() => 1, 2);\n' },
      'model/x.ts:1 setTimeout: only cli touches the machine',
    ],
    [
      'the environment',
      { 'model/x.ts': 'export const home = process.env.HOME;\n' },
      'model/x.ts:1 process: only cli touches the machine',
    ],
    [
      'chance',
      { 'model/x.ts': 'export const r = Math.random();\n' },
      'model/x.ts:1 Math.random: only cli touches the machine',
    ],
    [
      'Bessel outside of skin',
      { 'model/x.ts': 'export const besselI = 1;\n' },
      'model/x.ts:1 "besselI": only skin knows Bessel functions',
    ],
    [
      'Bessel used by the library itself',
      { 'index.ts': "import { besselRatio } from './skin/index.ts';\nexport const r = besselRatio;\n" },
      'index.ts:1 "besselRatio": only skin knows Bessel functions',
    ],
    [
      'the package of that name',
      { 'model/x.ts': "import { besseli } from 'bessel';\n" },
      'model/x.ts:1 "bessel": only skin knows Bessel functions',
    ],
    [
      'export *',
      { 'model/x.ts': "export * from './constants.ts';\n" },
      'model/x.ts:1 no export *: name what is exported',
    ],
    ['a default export', { 'model/x.ts': 'export default 1;\n' }, 'model/x.ts:1 no default exports'],
    [
      'a default function',
      { 'model/x.ts': 'export default function f() {}\n' },
      'model/x.ts:1 no default exports',
    ],
    [
      'a default by name',
      { 'model/x.ts': 'const a = 1;\nexport { a as default };\n' },
      'model/x.ts:2 no default exports',
    ],
    [
      'an import without .ts',
      { 'model/x.ts': "import './constants.js';\n" },
      'model/x.ts:1 "./constants.js": relative imports end in .ts',
    ],
    [
      'a folder out of the table',
      { 'helpers/x.ts': 'export const a = 1;\n' },
      'helpers/x.ts:1 folder "helpers" is not in the arrow table',
    ],
    [
      'a file beside index.ts',
      { 'other.ts': 'export const a = 1;\n' },
      'other.ts:1 no file of src/ itself: index.ts and the leaves problem.ts, version.ts alone stand there',
    ],
    [
      'a number without unit',
      {
        'sweep/index.ts': "export type { T } from './t.ts';\n",
        'sweep/t.ts':
          'export interface T {\n  /** [m] */\n  a: number;\n  /** the other */\n  b: Float64Array;\n}\n',
      },
      'sweep/t.ts:5 T.b is a number without a unit: begin its comment with [unit]',
    ],
  ];
  it.each(cases)('catches %s', (_, files, expected) => {
    expect(breaks(tree(files))).toContain(expected);
  });
});
