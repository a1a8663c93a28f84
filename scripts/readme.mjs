// Runs the examples of README.md: the YAML block is the file lead.yaml, lines behind `$ ` in console blocks run in a shell
// with `rimflow` as a word, the JavaScript block prints what the text block behind it says.
// `node scripts/readme.mjs` writes the real output into README.md; test/house/docs.test.ts compares.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));

/** The text with the output of every example in place. */
export function refresh(text) {
  const folder = mkdtempSync(join(tmpdir(), 'rimflow-readme-'));
  try {
    writeFileSync(join(folder, 'lead.yaml'), /```yaml\n([^`]*)```/.exec(text)[1]);
    const run = (program, args, cwd) => {
      const env = { ...process.env, NODE: process.execPath, BIN: join(root, 'dist/cli/bin.js') };
      const { stdout, stderr } = spawnSync(program, args, { cwd, env, encoding: 'utf8', timeout: 60_000 });
      return `${stdout}${stderr}`.replaceAll('\r\n', '\n');
    };
    const word = 'rimflow() { "$NODE" "$BIN" "$@"; }\nexec 2>&1\n';
    return text
      .replace(/```console\n\$ (.*)\n[^`]*```/g, (_, line) => {
        return `\`\`\`console\n$ ${line}\n${run('bash', ['-c', `${word}${line}`], folder)}\`\`\``;
      })
      .replace(/```js\n([\s\S]*?)```([\s\S]*?)```text\n[^`]*```/g, (_, script, between) => {
        const printed = run(process.execPath, ['--input-type=module', '-e', script], root);
        return `\`\`\`js\n${script}\`\`\`${between}\`\`\`text\n${printed}\`\`\``;
      });
  } finally {
    rmSync(folder, { recursive: true });
  }
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const file = join(root, 'README.md');
  writeFileSync(file, refresh(readFileSync(file, 'utf8')));
}
