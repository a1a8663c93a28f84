/** Bytes of a file to text, refused with a reason where they are no text or too many. */
import { Problem } from '../problem.ts';
import { MAX_FILE_BYTES } from './limits.ts';

/** Control characters that no text file holds: all but tab, line feed and carriage return. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const CONTROL = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/;

const MEGABYTE = 1e6;

/** Line and column, from 1, of a character of a text. */
function placeOf(text: string, index: number, file: string) {
  const before = text.slice(0, index);
  const line = before.split('\n').length;
  return { file, line, column: index - before.lastIndexOf('\n') };
}

/**
 * The text of a file: UTF-8 with or without byte order mark, or UTF-16 with one.
 * @param file name for messages
 * @throws Problem TOO_LARGE beyond 10 MB; NOT_TEXT for other encodings and binary data
 */
export function decodeText(bytes: Uint8Array, file: string): string {
  if (bytes.length > MAX_FILE_BYTES) {
    const size = (bytes.length / MEGABYTE).toFixed(1);
    throw new Problem(
      'TOO_LARGE',
      `${size} MB; a cross-section file has at most ${MAX_FILE_BYTES / MEGABYTE} MB`,
      {
        file,
      },
    );
  }
  const [first, second] = bytes;
  let encoding = 'utf-8';
  if (first === 0xff && second === 0xfe) encoding = 'utf-16le';
  if (first === 0xfe && second === 0xff) encoding = 'utf-16be';
  // the decoder drops the byte order mark itself
  const text = new TextDecoder(encoding).decode(bytes);
  checkText(text, file);
  const damaged = text.indexOf('\ufffd');
  if (damaged >= 0 && !isValid(bytes, encoding)) {
    const place = placeOf(text, damaged, file);
    throw new Problem('NOT_TEXT', 'bytes that are not UTF-8 text; save the file as UTF-8', place);
  }
  return text;
}

function isValid(bytes: Uint8Array, encoding: string): boolean {
  try {
    new TextDecoder(encoding, { fatal: true }).decode(bytes);
    return true;
  } catch {
    return false;
  }
}

/** @throws Problem TOO_LARGE or NOT_TEXT */
export function checkText(text: string, file: string): void {
  if (text.length > MAX_FILE_BYTES) {
    throw new Problem('TOO_LARGE', `over ${MAX_FILE_BYTES / MEGABYTE} MB of text, which is the limit`, {
      file,
    });
  }
  const found = CONTROL.exec(text);
  if (found !== null) {
    const code = found[0].charCodeAt(0).toString(16).padStart(2, '0');
    const what = `binary data (character 0x${code}); a cross-section file is UTF-8 text`;
    throw new Problem('NOT_TEXT', what, placeOf(text, found.index, file));
  }
}
