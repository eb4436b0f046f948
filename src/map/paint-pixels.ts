/** Small pictures for the map, painted pixel by pixel: no sprite file is asked for and none has to be kept in step. */

/** Channels 0 to 255, alpha 0 to 1. */
export type Colour = { readonly red: number; readonly green: number; readonly blue: number; readonly alpha: number };

/** Straight (not premultiplied) RGBA, row by row. */
export type Pixels = { readonly width: number; readonly height: number; readonly data: Uint8Array };

export const NOTHING: Colour = { red: 0, green: 0, blue: 0, alpha: 0 };

type Sheet = { readonly sizePx: number; readonly pixelRatio: number };

/** A square picture from a function of the distance in CSS pixels right of and below its middle. */
export function paintPixels({ sizePx, pixelRatio }: Sheet, colourAt: (x: number, y: number) => Colour): Pixels {
  const size = Math.round(sizePx * pixelRatio);
  const data = new Uint8Array(size * size * 4);
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column < size; column += 1) {
      const x = (column + 0.5) / pixelRatio - sizePx / 2;
      const y = (row + 0.5) / pixelRatio - sizePx / 2;
      const { red, green, blue, alpha } = colourAt(x, y);
      data.set([red, green, blue, alpha * 255].map(Math.round), (row * size + column) * 4);
    }
  }
  return { width: size, height: size, data };
}

/** Texels from an edge to where a distance field ends, and the alpha that stands for the edge: what MapLibre expects. */
const FIELD_REACH = 8;
const FIELD_EDGE = 0.75;

/** A distance field from a signed distance in CSS pixels, negative inside; the map gives it its colour. */
export function paintDistance({ sizePx, pixelRatio }: Sheet, distance: (x: number, y: number) => number): Pixels {
  return paintPixels({ sizePx, pixelRatio }, (x, y) => {
    const alpha = FIELD_EDGE - (distance(x, y) * pixelRatio) / FIELD_REACH;
    return { ...NOTHING, alpha: Math.min(1, Math.max(0, alpha)) };
  });
}

/** How much of a pixel lies inside an edge that is `insidePx` away: soft over one device pixel. */
export function softEdge(insidePx: number, pixelRatio: number): number {
  return Math.min(1, Math.max(0, insidePx * pixelRatio + 0.5));
}

/** `top` laid over `below`, covering `share` of it. */
export function over(below: Colour, top: Colour, share: number): Colour {
  const alpha = share + below.alpha * (1 - share);
  if (alpha === 0) return NOTHING;
  const mixed = (a: number, b: number) => (b * share + a * below.alpha * (1 - share)) / alpha;
  return {
    red: mixed(below.red, top.red),
    green: mixed(below.green, top.green),
    blue: mixed(below.blue, top.blue),
    alpha,
  };
}

/** From one colour to the other, their transparency with them. */
export function blend(from: Colour, to: Colour, share: number): Colour {
  const alpha = from.alpha + (to.alpha - from.alpha) * share;
  if (alpha === 0) return NOTHING;
  const mixed = (a: number, b: number) => (a * from.alpha * (1 - share) + b * to.alpha * share) / alpha;
  return { red: mixed(from.red, to.red), green: mixed(from.green, to.green), blue: mixed(from.blue, to.blue), alpha };
}

export function opaque(colour: string): Colour {
  const channel = (start: number) => Number.parseInt(colour.slice(start, start + 2), 16);
  return { red: channel(1), green: channel(3), blue: channel(5), alpha: 1 };
}
