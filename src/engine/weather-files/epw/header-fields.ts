/** Fields of a header record: split at commas, except within double quotes; trimmed, quotes taken off. */
export function headerFields(record: string): readonly string[] {
  const fields: string[] = [];
  let field = '';
  let quoted = false;
  for (const char of record) {
    if (char === '"') quoted = !quoted;
    else if (char === ',' && !quoted) {
      fields.push(field.trim());
      field = '';
    } else field += char;
  }
  fields.push(field.trim());
  return fields;
}

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)$/;

/** The number in a header field, or null. */
export function headerNumber(field: string | undefined): number | null {
  return field !== undefined && NUMBER.test(field) ? Number(field) : null;
}
