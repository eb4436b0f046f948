const LONGEST_NAME = 200;

/** Kept when a long name is cut: a dot and at most 12 letters or digits. */
const EXTENSION = /\.[\p{L}\p{N}]{1,12}$/u;

/**
 * The base name of an uploaded file, fit to be shown and stored: no folders, no control or direction-changing characters,
 * no line breaks, at most 200 characters.
 */
export function cleanUploadName(sent: string): string {
  const plain = sent
    .replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu, ' ')
    .replace(/^.*[/\\]/s, '')
    .replace(/\s+/gu, ' ')
    .trim();
  if (plain === '' || plain === '.' || plain === '..') return 'unnamed file';
  const letters = [...plain];
  if (letters.length <= LONGEST_NAME) return plain;
  const extension = EXTENSION.exec(plain)?.[0] ?? '';
  return `${letters.slice(0, LONGEST_NAME - [...extension].length).join('')}${extension}`;
}
