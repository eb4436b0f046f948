import type { AddProtocolAction } from 'maplibre-gl';
import { shadedRelief } from './relief-shading.ts';

/**
 * Shaded ground under a protocol of its own. Heights come as terrarium tiles from our own server; each is shaded once, when it
 * comes: a map that shades them in every frame waits longest for just that where it is drawn without a graphics processor.
 */
export const RELIEF_PROTOCOL = 'relief';

export function reliefTiles(origin: string): string {
  return `${BEFORE_ADDRESS}${origin}/relief/{z}/{x}/{y}.png`;
}

const BEFORE_ADDRESS = `${RELIEF_PROTOCOL}://`;

const BELOW_ALL_M = 32_768;

export const loadShadedRelief: AddProtocolAction = async ({ url }, { signal }) => {
  const address = url.slice(BEFORE_ADDRESS.length);
  const [, zoom, , row] = /\/(\d+)\/(\d+)\/(\d+)\.png$/.exec(address) ?? [];
  const answer = await fetch(address, { signal });
  if (!answer.ok) throw new Error(`The relief answered ${answer.status}.`);
  const { heightsM, size } = await heightsOf(await answer.blob());
  const shaded = new ImageData(shadedRelief({ heightsM, size, zoom: Number(zoom), row: Number(row) }), size, size);
  return { data: await createImageBitmap(shaded) };
};

/** Terrarium: height + 32768 m in red x 256 + green + blue / 256. */
async function heightsOf(png: Blob): Promise<{ heightsM: Float32Array; size: number }> {
  const picture = await createImageBitmap(png, { premultiplyAlpha: 'none', colorSpaceConversion: 'none' });
  const size = picture.width;
  const sheet = new OffscreenCanvas(size, size).getContext('2d', { willReadFrequently: true });
  if (sheet === null) throw new Error('There is no canvas to read the relief from.');
  sheet.drawImage(picture, 0, 0);
  const { data } = sheet.getImageData(0, 0, size, size);
  const heightsM = new Float32Array(size * size);
  for (let at = 0; at < heightsM.length; at++) {
    heightsM[at] = 256 * (data[4 * at] ?? 0) + (data[4 * at + 1] ?? 0) + (data[4 * at + 2] ?? 0) / 256 - BELOW_ALL_M;
  }
  picture.close();
  return { heightsM, size };
}
