/** Builds dist/ once before the tests that start the command as a process. */
import { execFileSync } from 'node:child_process';

export default function setup(): void {
  execFileSync(process.execPath, ['scripts/build.mjs'], {
    stdio: 'inherit',
    cwd: new URL('..', import.meta.url),
  });
}
