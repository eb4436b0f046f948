import type * as z from 'zod/mini';
import type { Problem } from '#contract/errors.ts';
import { AppError } from './app-error.ts';

interface Part {
  /** First word of the path of its problems: params, query, body. */
  readonly name: string;
  readonly schema: z.ZodMiniType;
  readonly value: unknown;
}

/** Parses every part before it complains, so that all faults are told at once, each with its path. */
export function parseInput(parts: readonly Part[]): Record<string, unknown> {
  const problems: Problem[] = [];
  const parsed: Record<string, unknown> = {};
  for (const part of parts) {
    const result = part.schema.safeParse(part.value);
    if (result.success) {
      parsed[part.name] = result.data;
      problems.push(...unstorableText(result.data, part.name));
    } else problems.push(...result.error.issues.flatMap((issue) => problemsOf(issue, part)));
  }
  if (problems.length > 0) throw new AppError('invalid_input', summaryOf(problems), problems);
  return parsed;
}

function summaryOf(problems: readonly Problem[]): string {
  const [only] = problems;
  if (problems.length === 1 && only !== undefined) return `The request has a fault at ${only.path}: ${only.message}`;
  return `The request has ${problems.length} faults.`;
}

function problemsOf(issue: z.core.$ZodIssue, part: Part): Problem[] {
  const path = [part.name, ...issue.path].join('.');
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) => ({ path: `${path}.${key}`.slice(0, 300), message: 'This is not asked for here.' }));
  return [{ path: path.slice(0, 300), message: messageOf(issue, valueAt(part.value, issue.path)) }];
}

/** Checks of the contract bring their own words; what zod finds by itself gets its words here. */
function messageOf(issue: z.core.$ZodIssue, value: unknown): string {
  if (issue.message !== 'Invalid input') return issue.message;
  if (value === undefined) return 'This is missing.';
  switch (issue.code) {
    case 'invalid_type':
      return `This must be ${nameOfType(issue.expected)}.`;
    case 'invalid_value':
      return `This must be one of: ${issue.values.map(String).join(', ')}.`;
    case 'invalid_format':
      return issue.format === 'uuid' ? 'This is not an id.' : `This is not written as ${issue.format} should be.`;
    case 'too_big':
      return `This must be at most ${issue.maximum}${lengthUnit(issue.origin)}.`;
    case 'too_small':
      return `This must be at least ${issue.minimum}${lengthUnit(issue.origin)}.`;
    default:
      return 'This is not what is asked for here.';
  }
}

function nameOfType(expected: string): string {
  const names: Readonly<Record<string, string>> = {
    string: 'text',
    number: 'a number',
    int: 'a whole number',
    boolean: 'true or false',
    array: 'a list',
    object: 'an object',
  };
  return names[expected] ?? expected;
}

function lengthUnit(origin: string): string {
  if (origin === 'string') return ' characters long';
  return origin === 'array' ? ' items long' : '';
}

function valueAt(value: unknown, path: readonly PropertyKey[]): unknown {
  let found = value;
  for (const key of path) {
    if (typeof found !== 'object' || found === null) return undefined;
    found = Reflect.get(found, key);
  }
  return found;
}

/** PostgreSQL keeps no NUL character in text; said here, with its place, rather than met as a fault of the database. */
function unstorableText(value: unknown, path: string): Problem[] {
  if (typeof value === 'string')
    return value.includes('\0') ? [{ path, message: 'This holds a character (NUL) that cannot be kept.' }] : [];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => unstorableText(inner, `${path}.${key}`));
}
