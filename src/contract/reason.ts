import * as z from 'zod/mini';

/** Why somebody does what changes a record; it stands beside the act for good. */
export const Reason = z
  .string()
  .check(z.trim(), z.minLength(1, 'Say why.'), z.maxLength(500, 'Use 500 characters or fewer.'));
