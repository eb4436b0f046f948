import type { ApiToken, TokenScope } from '../../../contract/tokens.ts';

export const scopeWords: Readonly<Record<TokenScope, { title: string; meaning: string }>> = {
  'weather:upload': { title: 'Upload weather', meaning: 'files, several at once, and zip archives' },
  'weather:read': { title: 'Read weather', meaning: 'status and findings of files, years and stations' },
  'results:read': {
    title: 'Read results',
    meaning: 'programmes, briefs, sites, scores, ledgers and runs, with their tables',
  },
};

export const stateWord: Readonly<Record<ApiToken['state'], string>> = {
  valid: 'Valid',
  expired: 'Expired',
  revoked: 'Revoked',
};

/** A line for a shell that uploads one file with the token. */
export function uploadLine(input: { origin: string; path: string; token: string }): string {
  const { origin, path, token } = input;
  return `curl -H 'Authorization: Bearer ${token}' -F 'file=@year.epw' '${origin}${path}'`;
}
