/** Companions of weather files as their publishers pack them, and what computers add by themselves (formats: common practice). */
const COMPANION = /\.(ddy|stat|rain|wea|clm)$/i;
const DOCUMENT = /\.(pdf|html?|docx?|xlsx?|pptx?|png|jpe?g|gif|svg|kmz?|xml|json|md|rtf|sql|exe|dll|js|py)$/i;
const LICENCE = /(^|\/)[^/]*(licen[cs]e|terms|copying|copyright|readme|lisez|liesmich)[^/]*\.(txt|text)$/i;
const SYSTEM = /(^|\/)(__MACOSX\/|\.DS_Store$|Thumbs\.db$|desktop\.ini$|\._)/i;

/** Why a member of an archive is no weather file, by its name; null when only its content can say. */
export function whyNoWeatherFile(memberPath: string): string | null {
  if (SYSTEM.test(memberPath)) return 'A file that a computer adds by itself.';
  if (COMPANION.test(memberPath)) return 'A companion of a weather file; it holds no hours.';
  if (LICENCE.test(memberPath)) return 'A text about the files, not a weather file.';
  if (DOCUMENT.test(memberPath)) return 'A document, a picture or a program, not a weather file.';
  return null;
}
