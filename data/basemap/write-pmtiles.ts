import { createHash } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { zxyToTileId } from 'pmtiles';

export type Tile = { readonly z: number; readonly x: number; readonly y: number; readonly bytes: Uint8Array };

export type Archive = {
  readonly tiles: readonly Tile[];
  readonly maxZoom: number;
  readonly metadata: Readonly<Record<string, unknown>>;
};

/** One row of a PMTiles directory: `run` tiles from `id` on share the same bytes; run 0 points to a leaf directory. */
type Entry = { readonly id: number; run: number; readonly offset: number; readonly length: number };

const HEADER_BYTES = 127;
/** Header and root directory have to fit into the first 16 kB. */
const ROOT_LIMIT_BYTES = 16_384 - HEADER_BYTES;
const LEAF_ENTRIES = 2048;
const GZIP = 2;
const VECTOR_TILES = 1;

/**
 * A PMTiles archive, version 3 of the format: tiles in the order of the Hilbert curve, equal ones stored once, each
 * gzipped. The npm package pmtiles only reads, hence this writer. The same tiles give the same bytes.
 */
export function pmtilesArchive({ tiles, maxZoom, metadata }: Archive): Buffer {
  const { entries, blobs } = laidOut(tiles);
  const { root, leaves } = directories(entries);
  const notes = gzipped(Buffer.from(JSON.stringify(metadata)));
  const data = Buffer.concat(blobs);
  const header = headerOf({
    sections: [root, notes, leaves, data].map((section) => section.length),
    counts: [tiles.length, entries.length, blobs.length],
    maxZoom,
  });
  return Buffer.concat([header, root, notes, leaves, data]);
}

function laidOut(tiles: readonly Tile[]): { entries: Entry[]; blobs: Buffer[] } {
  const ordered = tiles
    .map((tile) => ({ id: zxyToTileId(tile.z, tile.x, tile.y), bytes: tile.bytes }))
    .sort((a, b) => a.id - b.id);
  const stored = new Map<string, { offset: number; length: number }>();
  const entries: Entry[] = [];
  const blobs: Buffer[] = [];
  let offset = 0;
  for (const { id, bytes } of ordered) {
    const fingerprint = createHash('sha256').update(bytes).digest('base64');
    let place = stored.get(fingerprint);
    if (place === undefined) {
      const blob = gzipped(bytes);
      place = { offset, length: blob.length };
      stored.set(fingerprint, place);
      blobs.push(blob);
      offset += blob.length;
    }
    const last = entries.at(-1);
    if (last !== undefined && last.offset === place.offset && last.id + last.run === id) last.run += 1;
    else entries.push({ id, run: 1, ...place });
  }
  return { entries, blobs };
}

function directories(entries: readonly Entry[]): { root: Buffer; leaves: Buffer } {
  const whole = directoryBytes(entries);
  if (whole.length <= ROOT_LIMIT_BYTES) return { root: whole, leaves: Buffer.alloc(0) };
  const rootEntries: Entry[] = [];
  const leaves: Buffer[] = [];
  let offset = 0;
  for (let start = 0; start < entries.length; start += LEAF_ENTRIES) {
    const leaf = directoryBytes(entries.slice(start, start + LEAF_ENTRIES));
    rootEntries.push({ id: entries[start]?.id ?? 0, run: 0, offset, length: leaf.length });
    leaves.push(leaf);
    offset += leaf.length;
  }
  return { root: directoryBytes(rootEntries), leaves: Buffer.concat(leaves) };
}

/** Column by column as variable-length integers: ids as differences, runs, lengths, offsets (0 = right after the last). */
function directoryBytes(entries: readonly Entry[]): Buffer {
  const bytes: number[] = [];
  pushVarint(bytes, entries.length);
  let lastId = 0;
  for (const entry of entries) {
    pushVarint(bytes, entry.id - lastId);
    lastId = entry.id;
  }
  for (const entry of entries) pushVarint(bytes, entry.run);
  for (const entry of entries) pushVarint(bytes, entry.length);
  for (const [index, entry] of entries.entries()) {
    const previous = entries[index - 1];
    const follows = previous !== undefined && previous.offset + previous.length === entry.offset;
    pushVarint(bytes, follows ? 0 : entry.offset + 1);
  }
  return gzipped(Buffer.from(bytes));
}

function pushVarint(bytes: number[], value: number): void {
  let rest = value;
  while (rest >= 128) {
    bytes.push((rest % 128) + 128);
    rest = Math.floor(rest / 128);
  }
  bytes.push(rest);
}

function headerOf({
  sections,
  counts,
  maxZoom,
}: {
  sections: readonly number[];
  counts: readonly number[];
  maxZoom: number;
}): Buffer {
  const header = Buffer.alloc(HEADER_BYTES);
  header.write('PMTiles', 0, 'ascii');
  header.writeUInt8(3, 7);
  let start = HEADER_BYTES;
  for (const [index, length] of sections.entries()) {
    header.writeBigUInt64LE(BigInt(start), 8 + index * 16);
    header.writeBigUInt64LE(BigInt(length), 16 + index * 16);
    start += length;
  }
  for (const [index, count] of counts.entries()) header.writeBigUInt64LE(BigInt(count), 72 + index * 8);
  // Clustered, directories gzipped, tiles gzipped, tile type, smallest and largest zoom.
  for (const [index, byte] of [1, GZIP, GZIP, VECTOR_TILES, 0, maxZoom].entries()) header.writeUInt8(byte, 96 + index);
  for (const [index, degrees] of [-180, -85.0511287, 180, 85.0511287].entries()) {
    header.writeInt32LE(Math.round(degrees * 1e7), 102 + index * 4);
  }
  header.writeUInt8(2, 118);
  return header;
}

function gzipped(bytes: Uint8Array): Buffer {
  return gzipSync(bytes, { level: 9 });
}
