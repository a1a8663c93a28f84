/** `rimflow check` */
import { caseCautions } from '../sweep/index.ts';
import { caseJson, caseText } from '../writers/index.ts';
import { inputCase } from './input-case.ts';
import type { Io } from './io.ts';
import type { CommonOptions, QuickOptions } from './options.ts';
import { checkOut, deliver, sayCautions } from './output.ts';

/** @returns exit status; problems of the file are thrown */
export async function runCheck(
  file: string | undefined,
  options: CommonOptions & QuickOptions,
  io: Io,
): Promise<number> {
  checkOut(file, options, io);
  const { case: c } = await inputCase(file, options, io);
  const understood = { ...c, cautions: caseCautions(c) };
  const json = options.format === 'json';
  await deliver(json ? caseJson(understood) : caseText(understood), 'what was understood', options, io);
  return sayCautions(understood.cautions, true, options, io);
}
