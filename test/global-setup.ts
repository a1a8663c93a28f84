/** Builds dist/ before the tests that start the command as a process, unless it was made of the same files. */
import { execFileSync } from 'node:child_process';

export default function setup(): void {
  execFileSync(process.execPath, ['scripts/build.mjs', '--if-stale'], {
    stdio: 'inherit',
    cwd: new URL('..', import.meta.url),
  });
}
