/** Faults of the shape of a file (zod issues) as problems with a place. */
import type { z } from 'zod';
import { type ErrorCode, Problem } from '../problem.ts';
import { caseSchema } from './case-schema.ts';
import { isLaterKey } from './later-keys.ts';
import { didYouMean } from './nearest.ts';
import { describeValue, quote } from './quote.ts';
import { type Path, type Source, valueAt } from './source.ts';

/** Faults of shape that are put into words; a file with more is no cross-section. */
const MOST_ISSUES = 1000;

type Issue = z.core.$ZodIssue;

/** All faults of shape; reading goes on afterwards with what is well formed. */
export function checkStructure(source: Source): Problem[] {
  // one parse does not repay the compiled form that zod makes by default
  const result = caseSchema.safeParse(source.data, { jitless: true });
  if (result.success) return [];
  return result.error.issues.slice(0, MOST_ISSUES).flatMap((issue) => toProblems(issue, [], source));
}

function toProblems(issue: Issue, outer: Path, source: Source): Problem[] {
  const path = [...outer, ...issue.path] as Path;
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.slice(0, MOST_ISSUES).map((key) => unknownKey(path, key, source));
  }
  if (issue.code === 'invalid_union') {
    const branch = likeliestBranch(issue.errors);
    if (branch !== undefined)
      return branch.slice(0, MOST_ISSUES).flatMap((inner) => toProblems(inner, path, source));
  }
  const value = valueAt(source.data, path);
  const found = describeValue(value);
  if (path.length === 1 && path[0] === 'rimflow') {
    const what = `format version ${value === undefined ? 'is missing' : `${found} is unknown`}`;
    return [new Problem('FORMAT_VERSION', `${what}; the file must say rimflow: 1`, source.place(path))];
  }
  if (path.length === 1 && path[0] === 'frequencies' && (value === undefined || value === null)) {
    const what = 'no frequencies; add frequencies: { from: 10 Hz, to: 10 MHz, per_decade: 10 } or a list';
    return [new Problem('NO_FREQUENCIES', what, source.place(path))];
  }
  const missing = value === undefined || value === null;
  const code: ErrorCode = missing ? 'MISSING' : 'WRONG_TYPE';
  if (path.length === 0 && missing) {
    return [new Problem('MISSING', `the file is empty; ${issue.message}`, source.place(path))];
  }
  const key = path.length === 0 ? 'the file' : quote(path.at(-1));
  const expected = issue.message.startsWith('expected') ? issue.message : 'see the format';
  return [
    new Problem(code, `${key} ${missing ? 'is missing' : `is ${found}`}; ${expected}`, source.place(path)),
  ];
}

/** Of the ways that a value may be written, the one whose kind (list, map, ..) was used. */
function likeliestBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] | undefined {
  const ofThatKind = branches.filter(
    (issues) => !issues.some((issue) => issue.path.length === 0 && issue.code === 'invalid_type'),
  );
  return ofThatKind.length === 1 ? ofThatKind[0] : undefined;
}

function unknownKey(parent: Path, key: string, source: Source): Problem {
  const place = source.keyPlace([...parent, key]);
  if (isLaterKey(parent, key)) {
    return new Problem('NOT_SUPPORTED', `${quote(key)} is not supported yet; remove it`, place);
  }
  const known = knownKeys(parent);
  const near = didYouMean(key, known);
  return new Problem(
    'UNKNOWN_KEY',
    `unknown key ${quote(key)}${near}; known here: ${known.join(', ')}`,
    place,
  );
}

/** Keys that the schema knows for the map at a path. */
function knownKeys(parent: Path): string[] {
  const keys = new Set<string>();
  let level: unknown[] = [caseSchema];
  for (const step of parent) level = level.flatMap((schema) => below(schema, step));
  for (const schema of level.flatMap(unwrap)) {
    const shape = (schema as { shape?: Record<string, unknown> }).shape;
    for (const key of Object.keys(shape ?? {})) keys.add(key);
  }
  return Array.from(keys);
}

/** Optional and union schemas taken apart. */
function unwrap(schema: unknown): unknown[] {
  const def = (schema as z.core.$ZodType)._zod.def as {
    type: string;
    innerType?: unknown;
    options?: unknown[];
  };
  if (def.type === 'optional') return unwrap(def.innerType);
  if (def.type === 'union') return (def.options ?? []).flatMap(unwrap);
  return [schema];
}

function below(schema: unknown, step: string | number): unknown[] {
  return unwrap(schema).flatMap((inner) => {
    const def = (inner as z.core.$ZodType)._zod.def as {
      type: string;
      shape?: Record<string, unknown>;
      valueType?: unknown;
      element?: unknown;
    };
    if (def.type === 'object') return Object.hasOwn(def.shape ?? {}, step) ? [def.shape![step]] : [];
    if (def.type === 'record') return [def.valueType];
    return def.type === 'array' ? [def.element] : [];
  });
}
