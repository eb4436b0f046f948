import type * as z from 'zod/mini';

interface Issue {
  readonly path: readonly PropertyKey[];
  readonly message: string;
}

/** What a contract's schema finds wrong with a form, before anything is sent. */
export function issuesOf(schema: z.ZodMiniType, values: unknown): readonly Issue[] {
  return schema.safeParse(values).error?.issues ?? [];
}
