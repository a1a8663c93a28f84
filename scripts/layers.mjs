// The layers of src/: which folder may import which, the two walls (only `skin` knows Bessel functions, only `cli`
// touches the machine), no rings of files, named exports only, and units beside the numbers of results.
// `node scripts/layers.mjs [FOLDER]` prints file:line and the rule broken, and exits 1 when there are any.
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { builtinModules } from 'node:module';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import ts from 'typescript';

/** Files directly in src/ that any folder may import; they import nothing but each other's kind. */
export const LEAVES = ['problem.ts', 'version.ts'];

/** Folder -> the folders it may import. `cli` and src/index.ts may import any. */
const CORE = ['complex', 'model', 'skin', 'proximity', 'loops', 'sweep'];
export const ARROWS = {
  ...Object.fromEntries(CORE.map((folder, k) => [folder, CORE.slice(0, k)])),
  fit: CORE,
  budget: CORE,
  writers: [...CORE, 'fit', 'budget'],
  draw: [...CORE, 'fit', 'budget'],
  input: ['model'],
  cli: [...CORE, 'fit', 'budget', 'writers', 'draw', 'input'],
};

/** Folders whose public interfaces (named in their index.ts) are results or cases, so that their numbers need units. */
const WITH_UNITS = ['model', 'skin', 'proximity', 'loops', 'sweep', 'fit', 'budget', 'writers', 'draw'];

/** Global names of a machine: process, clock, randomness, network, timers. */
const MACHINE = new Set(
  (
    'process Date performance fetch setTimeout setInterval setImmediate clearTimeout clearInterval crypto ' +
    'Buffer console require globalThis navigator XMLHttpRequest WebSocket Worker Deno Bun'
  ).split(' '),
);

const NUMBERS = /^(number|Float64Array|Float32Array|(readonly )?\[(number(, )?)+\])( \| (undefined|null))?$/;

/** @returns {{file: string, line: number, text: string}[]} every break, by file and line */
export function checkLayers(src) {
  const files = readdirSync(src, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && entry.name.endsWith('.ts'))
    .map((entry) => relative(src, join(entry.parentPath, entry.name)).replaceAll('\\', '/'))
    .sort();
  const breaks = [];
  const graph = new Map();
  for (const file of files) {
    const source = ts.createSourceFile(
      file,
      readFileSync(join(src, file), 'utf8'),
      ts.ScriptTarget.ES2022,
      true,
    );
    const say = (node, text) => {
      const { line } = source.getLineAndCharacterOfPosition(node.getStart(source));
      breaks.push({ file, line: line + 1, text });
    };
    graph.set(file, checkFile(src, file, source, say));
  }
  breaks.push(...rings(graph));
  return breaks.sort((a, b) => a.file.localeCompare(b.file) || a.line - b.line);
}

const folderOf = (file) => (file.includes('/') ? file.slice(0, file.indexOf('/')) : '');

/** Says all breaks of one file; returns its imports within src/. */
function checkFile(src, file, source, say) {
  const folder = folderOf(file);
  const edges = [];
  const inPublic = WITH_UNITS.includes(folder) ? publicNames(join(src, folder, 'index.ts')) : [];
  if (folder === '' && file !== 'index.ts' && !LEAVES.includes(file)) {
    say(source, `no file of src/ itself: index.ts and the leaves ${LEAVES.join(', ')} alone stand there`);
  }
  if (folder !== '' && !(folder in ARROWS)) say(source, `folder "${folder}" is not in the arrow table`);
  if (folder === 'utils') say(source, 'no folder called utils');
  const visit = (node) => {
    const specifier = specifierOf(node);
    if (specifier !== undefined) {
      const target = checkImport(src, file, specifier.text, (text) => say(node, text));
      if (target !== undefined) edges.push({ target, line: lineOf(source, node) });
    }
    checkForm(node, say);
    checkWalls(folder, node, say);
    if (inPublic.length > 0) checkUnits(node, inPublic, source, say);
    ts.forEachChild(node, visit);
  };
  visit(source);
  return edges;
}

const lineOf = (source, node) => source.getLineAndCharacterOfPosition(node.getStart(source)).line + 1;

/** The module that an import, an export .. from, an import() or an import type names. */
function specifierOf(node) {
  if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) return node.moduleSpecifier;
  if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword)
    return node.arguments[0];
  if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) return node.argument.literal;
  return undefined;
}

/** Says what an import breaks; returns the file it leads to within src/. */
function checkImport(src, file, specifier, say) {
  const folder = folderOf(file);
  if (specifier === undefined) {
    say('import() of a computed name: name the module');
    return undefined;
  }
  if (!specifier.startsWith('.')) {
    const bare = specifier.replace(/^node:/, '').split('/')[0];
    if ((specifier.startsWith('node:') || builtinModules.includes(bare)) && folder !== 'cli') {
      say(`"${specifier}": only cli touches the machine`);
    }
    if (/bessel/i.test(specifier) && folder !== 'skin')
      say(`"${specifier}": only skin knows Bessel functions`);
    return undefined;
  }
  if (!specifier.endsWith('.ts') && !specifier.endsWith('.json'))
    say(`"${specifier}": relative imports end in .ts`);
  const target = relative(src, resolve(src, dirname(file), specifier)).replaceAll('\\', '/');
  if (target.startsWith('..')) {
    say(`"${specifier}" lies outside of src/`);
    return undefined;
  }
  if (!existsSync(join(src, target))) say(`"${specifier}" is not there`);
  const to = folderOf(target);
  if (to === '' && !LEAVES.includes(target))
    say(`${folder || 'src'} -> ${target}: of src/ itself only leaves are imported`);
  if (to === '' || to === folder) {
    if (LEAVES.includes(file)) say(`${file} is a leaf: it imports nothing`);
    return target;
  }
  if (target.split('/').length !== 2 || !target.endsWith('/index.ts')) {
    say(`${folder || 'index.ts'} -> ${target}: across folders only index.ts is imported`);
  }
  if (folder === '') {
    if (file !== 'index.ts') say(`${file} is a leaf: it imports nothing`);
    if (to === 'cli') say('index.ts -> cli: the library knows no command line');
    return target;
  }
  if (!(ARROWS[folder] ?? []).includes(to)) say(`${folder} -> ${to}: no such arrow`);
  return target;
}

function checkForm(node, say) {
  if (ts.isExportAssignment(node)) say(node, 'no default exports');
  const words = ts.canHaveModifiers(node) ? (ts.getModifiers(node) ?? []) : [];
  if (words.some((word) => word.kind === ts.SyntaxKind.DefaultKeyword)) say(node, 'no default exports');
  if (!ts.isExportDeclaration(node)) return;
  if (node.exportClause === undefined || ts.isNamespaceExport(node.exportClause)) {
    say(node, 'no export *: name what is exported');
  } else if (node.exportClause.elements.some((element) => element.name.text === 'default')) {
    say(node, 'no default exports');
  }
}

function checkWalls(folder, node, say) {
  if (!ts.isIdentifier(node)) return;
  const name = node.text;
  // the library hands them out, it does not use them
  const passedOn = folder === '' && ts.isExportSpecifier(node.parent);
  if (folder !== 'skin' && !passedOn && /bessel/i.test(name))
    say(node, `"${name}": only skin knows Bessel functions`);
  if (folder === 'cli') return;
  const { parent } = node;
  const isMember = ts.isPropertyAccessExpression(parent) && parent.name === node;
  if (isMember) {
    if (name === 'random' && parent.expression.getText() === 'Math') {
      say(node, 'Math.random: only cli touches the machine');
    }
    return;
  }
  if (!MACHINE.has(name) || declaresName(node)) return;
  say(node, `${name}: only cli touches the machine`);
}

/** True where the identifier is the name of a member, not a use of a global. */
function declaresName({ parent }) {
  return (
    ts.isPropertyAssignment(parent) ||
    ts.isPropertySignature(parent) ||
    ts.isPropertyDeclaration(parent) ||
    ts.isMethodSignature(parent) ||
    ts.isMethodDeclaration(parent)
  );
}

/** Names in the exports of an index file. */
function publicNames(index) {
  if (!existsSync(index)) return [];
  const source = ts.createSourceFile(index, readFileSync(index, 'utf8'), ts.ScriptTarget.ES2022, true);
  return source.statements
    .filter(
      (node) => ts.isExportDeclaration(node) && node.exportClause && ts.isNamedExports(node.exportClause),
    )
    .flatMap((node) =>
      node.exportClause.elements.map((element) => (element.propertyName ?? element.name).text),
    );
}

/** The comment of a number in a public interface holds its unit in brackets: [m], [ohm/m], [1]. */
function checkUnits(node, names, source, say) {
  if (!ts.isInterfaceDeclaration(node) || !names.includes(node.name.text)) return;
  const visit = (members, path) => {
    for (const member of members) {
      if (!ts.isPropertySignature(member) || member.type === undefined) continue;
      const name = `${path}.${member.name.getText(source)}`;
      if (ts.isTypeLiteralNode(member.type)) visit(member.type.members, name);
      if (!NUMBERS.test(member.type.getText(source))) continue;
      const comments = ts.getLeadingCommentRanges(source.text, member.pos) ?? [];
      const text = comments.map(({ pos, end }) => source.text.slice(pos, end)).join(' ');
      if (!/\[[^\]]+\]/.test(text))
        say(member, `${name} is a number without a unit: begin its comment with [unit]`);
    }
  };
  visit(node.members, node.name.text);
}

/** One break for each ring of files, at an import that closes it. */
function rings(graph) {
  const breaks = [];
  const state = new Map();
  const walk = (file, trail) => {
    state.set(file, 'open');
    for (const { target, line } of graph.get(file) ?? []) {
      if (state.get(target) === 'open') {
        const ring = [...trail, file].slice([...trail, file].indexOf(target));
        breaks.push({ file, line, text: `a ring of files: ${[...ring, target].join(' -> ')}` });
      } else if (!state.has(target)) {
        walk(target, [...trail, file]);
      }
    }
    state.set(file, 'done');
  };
  for (const file of graph.keys()) if (!state.has(file)) walk(file, []);
  return breaks;
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const src = process.argv[2] ?? fileURLToPath(new URL('../src', import.meta.url));
  const breaks = checkLayers(src);
  for (const { file, line, text } of breaks) process.stderr.write(`src/${file}:${line} ${text}\n`);
  if (breaks.length > 0) process.exitCode = 1;
}
