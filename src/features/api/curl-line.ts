import type { ApiOperation } from '../../contract/api.ts';

/** What a program would send, as a line for a shell; the example's ids, but for those that the reader has. */
export function curlLine(input: {
  origin: string;
  method: string;
  path: string;
  operation: ApiOperation;
  own: Readonly<Record<string, string>>;
}): string {
  const { origin, method, path, operation, own } = input;
  const query = new URLSearchParams();
  let address = path;
  for (const { name, in: place, example } of operation.parameters) {
    if (place === 'path') address = address.replace(`{${name}}`, own[name] ?? String(example ?? name));
    else if (example !== undefined) query.set(name, String(example));
  }
  const url = `${origin}${address}${query.size > 0 ? `?${query}` : ''}`;
  const parts = ['curl', ...(method === 'get' || method === 'post' ? [] : ['-X', method.toUpperCase()])];
  parts.push('-H', quoted('Authorization: Bearer TOKEN'));
  const content = operation.requestBody?.content ?? {};
  const json = content['application/json'];
  if (json !== undefined)
    parts.push('-H', quoted('Content-Type: application/json'), '-d', quoted(JSON.stringify(json.example ?? {})));
  else if (content['multipart/form-data'] !== undefined) parts.push('-F', quoted(`file=@${fileName(path)}`));
  else if (method === 'post') parts.push('-X', 'POST');
  if (operation.responses['200']?.content?.['text/event-stream'] !== undefined) parts.push('-N');
  return [...parts, quoted(url)].join(' ');
}

function fileName(path: string): string {
  return path.endsWith('/archives') ? 'files.zip' : 'year.epw';
}

/** In single quotes of a POSIX shell. */
function quoted(text: string): string {
  return `'${text.replaceAll("'", `'\\''`)}'`;
}
