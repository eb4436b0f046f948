import * as z from 'zod/mini';

/**
 * A schema of the contract as JSON Schema, draft 2020-12, which is that of OpenAPI 3.1.
 * @param io what a caller may send, or what the server answers
 */
export function schemaOf(schema: z.ZodMiniType, io: 'input' | 'output'): Record<string, unknown> {
  const { $schema: _draft, ...made } = z.toJSONSchema(schema, {
    io,
    target: 'draft-2020-12',
    override: ({ jsonSchema }) => {
      // The format says it; the pattern beside it would say the same at length.
      if (jsonSchema.format === 'uuid' || jsonSchema.format === 'date-time' || jsonSchema.format === 'date')
        delete jsonSchema.pattern;
    },
  });
  return made;
}
