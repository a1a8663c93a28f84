/** Reading with a bound, writing whole or not at all. */
import { randomBytes } from 'node:crypto';
import {
  closeSync,
  fsyncSync,
  lstatSync,
  openSync,
  realpathSync,
  renameSync,
  type Stats,
  statSync,
  unlinkSync,
  writeSync,
} from 'node:fs';
import { open } from 'node:fs/promises';
import { dirname } from 'node:path';
import { Problem } from '../problem.ts';
import type { Files } from './io.ts';

export function nodeFiles(): Files {
  return { read, checkTarget, same, writeWhole: async (path, text) => writeWhole(path, text) };
}

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'no such file or folder; check the name',
  ENOTDIR: 'a part of the path is no folder; check the name',
  EISDIR: 'this is a folder; name a file',
  EACCES: 'permission denied; choose another place or change the permissions',
  EPERM: 'permission denied; choose another place or change the permissions',
  EROFS: 'a read-only file system; choose another place',
  ENOSPC: 'no space left on the device; make room or choose another place',
  EDQUOT: 'the disk quota is used up; make room or choose another place',
  EFBIG: 'the file is larger than the system allows',
  ENAMETOOLONG: 'the name is too long; choose a shorter one',
  EIO: 'the device reports an input/output error',
};

/** In words, with what to do. */
export function reason(error: unknown): string {
  const { code, message } = error as NodeJS.ErrnoException;
  return REASONS[code ?? ''] ?? `the system reports ${code ?? message}`;
}

async function read(path: string, limit: number): Promise<Uint8Array> {
  try {
    const file = await open(path, 'r');
    try {
      const status = await file.stat();
      if (status.isDirectory()) throw Object.assign(new Error(), { code: 'EISDIR' });
      if (status.size > limit) throw tooLarge(path, limit, status.size);
      return await readUpTo(file, path, limit);
    } finally {
      await file.close();
    }
  } catch (error) {
    if (error instanceof Problem) throw error;
    throw new Problem('READ_FAILED', `can not be read: ${reason(error)}`, { file: path });
  }
}

/** Devices and pipes have no size: they are read until they end or pass the limit. */
async function readUpTo(
  file: Awaited<ReturnType<typeof open>>,
  path: string,
  limit: number,
): Promise<Uint8Array> {
  const parts: Uint8Array[] = [];
  let total = 0;
  for (;;) {
    const part = new Uint8Array(1 << 16);
    const { bytesRead } = await file.read(part, 0, part.length, null);
    if (bytesRead === 0) return Buffer.concat(parts);
    total += bytesRead;
    if (total > limit) throw tooLarge(path, limit);
    parts.push(part.subarray(0, bytesRead));
  }
}

export function tooLarge(file: string, limit: number, size?: number): Problem {
  const found = size === undefined ? 'this is' : `${(size / 1e6).toFixed(1)} MB are`;
  return new Problem(
    'TOO_LARGE',
    `${found} more than a cross-section file may have; the limit is ${limit / 1e6} MB`,
    {
      file,
    },
  );
}

function status(path: string): Stats | undefined {
  return statSync(path, { throwIfNoEntry: false });
}

function writeProblem(path: string, error: unknown): Problem {
  return new Problem('WRITE_FAILED', `can not be written: ${reason(error)}`, { file: path });
}

function checkTarget(path: string): void {
  try {
    if (status(path)?.isDirectory()) throw Object.assign(new Error(), { code: 'EISDIR' });
    const folder = dirname(path);
    const found = status(folder);
    if (found === undefined || !found.isDirectory()) {
      throw new Problem('WRITE_FAILED', `the folder ${folder} is not there; make it first (mkdir -p)`, {
        file: path,
      });
    }
  } catch (error) {
    throw error instanceof Problem ? error : writeProblem(path, error);
  }
}

function same(a: string, b: string): boolean {
  try {
    return realpathSync(a) === realpathSync(b);
  } catch {
    return false;
  }
}

/** A pipe or a device is written as it is; a file is written beside, under a name that says so, and renamed. */
function writeWhole(path: string, text: string): void {
  try {
    const found = status(path);
    if (found !== undefined && !found.isFile()) {
      writeAndClose(openSync(path, 'w'), text, false);
      return;
    }
    if (found === undefined && lstatSync(path, { throwIfNoEntry: false }) !== undefined) {
      throw new Problem(
        'WRITE_FAILED',
        'is a link to a file that is not there; make that file, or name another',
        {
          file: path,
        },
      );
    }
    // behind a link stands the file that is meant
    const target = found === undefined ? path : realpathSync(path);
    const beside = `${target}.${randomBytes(4).toString('hex')}.unfinished`;
    const descriptor = openSync(beside, 'wx', found === undefined ? 0o666 : found.mode & 0o777);
    try {
      writeAndClose(descriptor, text, true);
      renameSync(beside, target);
    } catch (error) {
      unlinkSync(beside);
      throw error;
    }
  } catch (error) {
    throw error instanceof Problem ? error : writeProblem(path, error);
  }
}

function writeAndClose(descriptor: number, text: string, toDisk: boolean): void {
  try {
    const bytes = Buffer.from(text);
    for (let at = 0; at < bytes.length; ) at += writeSync(descriptor, bytes, at);
    if (toDisk) fsyncSync(descriptor);
  } finally {
    closeSync(descriptor);
  }
}
