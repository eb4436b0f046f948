/**
 * One text for one value: keys sorted by code unit, no spaces, numbers as ECMAScript prints them (shortest form that reads
 * back to the same double), fields that are undefined left out. Hashes of briefs, clocks and results are taken over it.
 * @throws RangeError for what JSON cannot hold: NaN, infinities, functions, typed arrays, a bare undefined
 */
export function canonicalJson(value: unknown): string {
  return write(value, '');
}

function write(value: unknown, path: string): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value);
  if (typeof value === 'number' && Number.isFinite(value)) return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map((entry, index) => write(entry, `${path}[${index}]`)).join(',')}]`;
  if (isPlainObject(value)) {
    const fields = Object.entries(value).filter(([, field]) => field !== undefined);
    fields.sort(([one], [other]) => (one < other ? -1 : 1));
    return `{${fields.map(([name, field]) => `${JSON.stringify(name)}:${write(field, `${path}.${name}`)}`).join(',')}}`;
  }
  throw new RangeError(`no JSON for ${String(value)} at ${path === '' ? 'the value itself' : path}`);
}

function isPlainObject(value: unknown): value is Readonly<Record<string, unknown>> {
  if (typeof value !== 'object' || value === null) return false;
  const prototype: unknown = Object.getPrototypeOf(value);
  return prototype === Object.prototype || prototype === null;
}
