/**
 * CIE L* (0 black to 100 white) of an `#rrggbb` colour.
 * sRGB to linear light by IEC 61966-2-1, Y for D65, L* = 116 f(Y) - 16 by CIE 15 (formulas from memory).
 */
export function lightnessOf(colour: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((start) => {
    const encoded = Number.parseInt(colour.slice(start, start + 2), 16) / 255;
    return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4;
  });
  const luminance = 0.2126 * red + 0.7152 * green + 0.0722 * blue;
  return luminance > 216 / 24389 ? 116 * Math.cbrt(luminance) - 16 : (luminance * 24389) / 27;
}
