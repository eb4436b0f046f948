const browsers = [
  ['Edg', 'Edge'],
  ['OPR', 'Opera'],
  ['Firefox', 'Firefox'],
  ['Chrome', 'Chromium'],
  ['Safari', 'Safari'],
] as const;
const systems = [
  ['Android', 'Android'],
  ['iPhone', 'iPhone'],
  ['iPad', 'iPad'],
  ['Windows', 'Windows'],
  ['Mac OS X', 'macOS'],
  ['Linux', 'Linux'],
] as const;

/** What a browser calls itself, told short: "Firefox on Linux". Enough to know one's own telephone again. */
export function browserWords(calledItself: string | null): string {
  if (calledItself === null) return 'A browser';
  const browser = browsers.find(([word]) => calledItself.includes(word))?.[1];
  const system = systems.find(([word]) => calledItself.includes(word))?.[1];
  if (browser === undefined && system === undefined) return calledItself.slice(0, 40);
  return `${browser ?? 'A browser'}${system === undefined ? '' : ` on ${system}`}`;
}
