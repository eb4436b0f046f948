/**
 * How a colour looks to an eye that lacks one kind of cone, as `#rrggbb`.
 * Matrices for severity 1.0 of Machado, Oliveira and Fernandes, A Physiologically-based Model for Simulation of Color Vision
 * Deficiency, IEEE Transactions on Visualization and Computer Graphics 15 (2009) 1291, applied to linear light (figures from memory).
 */
export const deficiencies = ['protanopia', 'deuteranopia', 'tritanopia'] as const;
export type Deficiency = (typeof deficiencies)[number];

type Row = readonly [number, number, number];

const matrices: Readonly<Record<Deficiency, readonly [Row, Row, Row]>> = {
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanopia: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

export function seenWith(deficiency: Deficiency, colour: string): string {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((start) =>
    toLinear(Number.parseInt(colour.slice(start, start + 2), 16)),
  );
  const channels = matrices[deficiency].map(([r, g, b]) => r * red + g * green + b * blue);
  return `#${channels.map((channel) => toByte(channel).toString(16).padStart(2, '0')).join('')}`;
}

/** IEC 61966-2-1, channels 0 to 255 and linear light 0 to 1. */
function toLinear(channel: number): number {
  const encoded = channel / 255;
  return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4;
}

function toByte(linear: number): number {
  const held = Math.min(1, Math.max(0, linear));
  const encoded = held <= 0.0031308 ? 12.92 * held : 1.055 * held ** (1 / 2.4) - 0.055;
  return Math.round(encoded * 255);
}
