import italicLatin from '@fontsource/newsreader/files/newsreader-latin-300-italic.woff2?url';
import romanLatin from '@fontsource/newsreader/files/newsreader-latin-400-normal.woff2?url';
import mediumLatin from '@fontsource/newsreader/files/newsreader-latin-500-normal.woff2?url';
import italicLatinExt from '@fontsource/newsreader/files/newsreader-latin-ext-300-italic.woff2?url';
import romanLatinExt from '@fontsource/newsreader/files/newsreader-latin-ext-400-normal.woff2?url';
import mediumLatinExt from '@fontsource/newsreader/files/newsreader-latin-ext-500-normal.woff2?url';
import romanVietnamese from '@fontsource/newsreader/files/newsreader-vietnamese-400-normal.woff2?url';
import type { FontFacesSpecification } from 'maplibre-gl';

/** Faces by the name that the style calls them: roman for land, medium for what is chosen, light italic for water. */
export const ROMAN = 'Newsreader';
export const MEDIUM = 'Newsreader Medium';
export const ITALIC = 'Newsreader Light Italic';

/**
 * The fonts of the map's labels, from our own origin; no glyph server is asked. MapLibre draws from static files (a
 * variable one comes out at its regular weight) and wants whole addresses, because a worker asks for them.
 */
export function mapFonts(base: string): FontFacesSpecification {
  const latin = (path: string) => ({ url: new URL(path, base).href, 'unicode-range': ['U+0000-00FF', 'U+2000-206F'] });
  const latinExt = (path: string) => ({
    url: new URL(path, base).href,
    'unicode-range': ['U+0100-02BA', 'U+1E00-1E9F'],
  });
  const vietnamese = { url: new URL(romanVietnamese, base).href, 'unicode-range': ['U+1EA0-1EF9'] };
  return {
    [ROMAN]: [latin(romanLatin), latinExt(romanLatinExt), vietnamese],
    [MEDIUM]: [latin(mediumLatin), latinExt(mediumLatinExt)],
    [ITALIC]: [latin(italicLatin), latinExt(italicLatinExt)],
  };
}
