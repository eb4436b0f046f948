import { promisify } from 'node:util';
import { crc32, deflate } from 'node:zlib';

const deflateLater = promisify(deflate);

const SIGNATURE = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
const BYTES_PER_PIXEL = 3;
/** PNG's second filter: each byte less the one above it. */
const FILTER_UP = 2;

/**
 * A picture without transparency as PNG (ISO/IEC 15948), 8 bits a channel.
 * @param rgb red, green, blue of each pixel, row by row
 */
export async function rgbPng(rgb: Uint8Array, size: { width: number; height: number }): Promise<Buffer> {
  const { width, height } = size;
  const stride = width * BYTES_PER_PIXEL;
  const filtered = Buffer.alloc(height * (stride + 1));
  for (let row = 0; row < height; row++) {
    const start = row * (stride + 1);
    filtered[start] = FILTER_UP;
    for (let at = 0; at < stride; at++) {
      const above = row === 0 ? 0 : (rgb[(row - 1) * stride + at] ?? 0);
      filtered[start + 1 + at] = (rgb[row * stride + at] ?? 0) - above;
    }
  }
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  // 8 bits, true colour, deflate, adaptive filters, not interlaced.
  header.set([8, 2, 0, 0, 0], 8);
  const data = await deflateLater(filtered, { level: 6 });
  return Buffer.concat([SIGNATURE, chunk('IHDR', header), chunk('IDAT', data), chunk('IEND', Buffer.alloc(0))]);
}

function chunk(type: string, data: Buffer): Buffer {
  const named = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const length = Buffer.alloc(4);
  length.writeUInt32BE(data.length);
  const check = Buffer.alloc(4);
  check.writeUInt32BE(crc32(named));
  return Buffer.concat([length, named, check]);
}
