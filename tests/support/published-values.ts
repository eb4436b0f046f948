import { readdirSync, readFileSync } from 'node:fs';
import * as z from 'zod/mini';

const folder = new URL('../../data/checks/', import.meta.url);
const CheckFile = z.object({
  checks: z.array(
    z.object({
      id: z.string(),
      what: z.string(),
      source: z.string(),
      cases: z.array(z.record(z.string(), z.unknown())),
    }),
  ),
});

/** Every check of data/checks, whatever its file: what the method page runs as well. */
export const publishedChecks = checksOf(folder);

/** Checks on weather files that are not shipped. */
export const realFileChecks = checksOf(new URL('real-files/', folder));

function checksOf(of: URL) {
  return readdirSync(of)
    .filter((name) => name.endsWith('.json'))
    .flatMap((file) =>
      CheckFile.parse(JSON.parse(readFileSync(new URL(file, of), 'utf8'))).checks.map((check) => ({ ...check, file })),
    );
}

/** The cases of a check, each of the shape that its test wants. */
export function casesOf<Shape extends z.core.$ZodLooseShape>(id: string, shape: Shape) {
  const check = [...publishedChecks, ...realFileChecks].find((each) => each.id === id);
  if (check === undefined) throw new Error(`no check ${id} in data/checks`);
  return check.cases.map((each) => z.object(shape).parse(each));
}
