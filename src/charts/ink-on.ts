import { channelsOf } from './hour-class-colours.ts';

/** Black or white, whichever stands out more on a colour: at least 4.5 to 1 on any (WCAG 2 contrast). */
export function inkOn(colour: string): '#000000' | '#ffffff' {
  const [red, green, blue] = channelsOf(colour).map(linearOf);
  const luminance = 0.2126 * (red ?? 0) + 0.7152 * (green ?? 0) + 0.0722 * (blue ?? 0);
  return (luminance + 0.05) / 0.05 >= 1.05 / (luminance + 0.05) ? '#000000' : '#ffffff';
}

/** IEC 61966-2-1: an sRGB channel, 0 to 255, as linear light, 0 to 1. */
function linearOf(channel: number): number {
  const encoded = channel / 255;
  return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4;
}
