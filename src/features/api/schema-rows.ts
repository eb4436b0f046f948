/** A JSON Schema as rows that people read: one for each field, however deep, with its type and what may stand in it. */

export interface SchemaRow {
  /** "stations[].name". */
  readonly name: string;
  readonly type: string;
  readonly required: boolean;
  /** "1 to 200, 50 when left out". */
  readonly limits: string;
}

type Schema = Readonly<Record<string, unknown>>;

const DEEPEST = 6;

function isSchema(value: unknown): value is Schema {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function listOf(value: unknown): readonly Schema[] {
  return Array.isArray(value) ? value.filter(isSchema) : [];
}

/** @param of what stands at the top: an object's fields, or a list's */
export function schemaRows(of: Schema): readonly SchemaRow[] {
  return insideOf(plain(of), '', 0);
}

function insideOf(schema: Schema, path: string, depth: number): readonly SchemaRow[] {
  if (depth > DEEPEST) return [];
  if (isSchema(schema.items)) return insideOf(plain(schema.items), `${path}[]`, depth + 1);
  const several = listOf(schema.anyOf ?? schema.oneOf);
  if (several.length > 0) return withoutDoubles(several.flatMap((each) => insideOf(plain(each), path, depth)));
  const { properties } = schema;
  if (!isSchema(properties)) return [];
  const required = Array.isArray(schema.required) ? schema.required : [];
  return Object.entries(properties).flatMap(([key, value]): SchemaRow[] => {
    if (!isSchema(value)) return [];
    const name = path === '' ? key : `${path}.${key}`;
    const row = { name, type: typeWords(value), required: required.includes(key), limits: limitWords(value) };
    return [row, ...insideOf(plain(value), name, depth + 1)];
  });
}

/** Fields that several shapes share are told once. */
function withoutDoubles(rows: readonly SchemaRow[]): readonly SchemaRow[] {
  const known = new Set<string>();
  return rows.filter(({ name, type }) => {
    const key = `${name} ${type}`;
    return known.has(key) ? false : known.add(key);
  });
}

/** What it is apart from null. */
function plain(schema: Schema): Schema {
  const others = listOf(schema.anyOf).filter(({ type }) => type !== 'null');
  const [only] = others;
  return others.length === 1 && only !== undefined ? only : schema;
}

function isNullable(schema: Schema): boolean {
  return listOf(schema.anyOf).some(({ type }) => type === 'null');
}

const typeNames: Readonly<Record<string, string>> = {
  string: 'text',
  integer: 'whole number',
  number: 'number',
  boolean: 'true or false',
  object: 'object',
  null: 'null',
};
const formatNames: Readonly<Record<string, string>> = {
  uuid: 'id',
  'date-time': 'time',
  date: 'day',
  email: 'e-mail address',
};

export function typeWords(given: Schema): string {
  const schema = plain(given);
  const orNull = isNullable(given) ? ' or null' : '';
  return `${bareType(schema)}${orNull}`;
}

function bareType(schema: Schema): string {
  if (isSchema(schema.items)) return `list of ${typeWords(schema.items)}`;
  const several = listOf(schema.anyOf ?? schema.oneOf);
  if (several.length > 0) return [...new Set(several.map(typeWords))].join(' or ');
  if (Array.isArray(schema.enum)) return 'one of';
  if (schema.const !== undefined) return JSON.stringify(schema.const);
  const format = typeof schema.format === 'string' ? formatNames[schema.format] : undefined;
  if (schema.contentMediaType === 'application/octet-stream') return 'file';
  return format ?? (typeof schema.type === 'string' ? (typeNames[schema.type] ?? schema.type) : 'any JSON');
}

export function limitWords(given: Schema): string {
  const schema = plain(given);
  const parts = [
    enumWords(schema),
    between(schema.minimum ?? schema.exclusiveMinimum, schema.maximum ?? schema.exclusiveMaximum, ''),
    between(schema.minLength, schema.maxLength, ' characters'),
    between(schema.minItems, schema.maxItems, ' items'),
    given.default === undefined ? '' : `${plainText(given.default)} when left out`,
  ];
  return parts.filter((part) => part !== '').join(', ');
}

function enumWords({ enum: values, items }: Schema): string {
  const listed = Array.isArray(values) ? values : isSchema(items) && Array.isArray(items.enum) ? items.enum : [];
  return listed.map(plainText).join(', ');
}

/** Numbers that only say how far numbers reach in JavaScript are no limits. */
function between(least: unknown, most: unknown, unit: string): string {
  const low = typeof least === 'number' && Math.abs(least) < Number.MAX_SAFE_INTEGER ? least : null;
  const high = typeof most === 'number' && Math.abs(most) < Number.MAX_SAFE_INTEGER ? most : null;
  if (low === null && high === null) return '';
  if (low === null) return `up to ${high}${unit}`;
  return high === null ? `from ${low}${unit}` : `${low} to ${high}${unit}`;
}

function plainText(value: unknown): string {
  return typeof value === 'string' ? value : JSON.stringify(value);
}
