import { gzipSync } from 'node:zlib';
import { Compression, TileType, zxyToTileId } from 'pmtiles';
import type { Tile } from './cut.ts';

/** One run of tiles in a directory: `run` tiles from `id` on share the bytes at `offset`. */
interface Entry {
  readonly id: number;
  run: number;
  readonly offset: number;
  readonly length: number;
}

/** Header and root directory must lie within the first 16 KiB (PMTiles specification v3, section 4). */
const headerBytes = 127;
const rootLimit = 16_384 - headerBytes;

function varint(value: number, out: number[]): void {
  let rest = value;
  for (; rest >= 0x80; rest = Math.floor(rest / 0x80)) out.push((rest % 0x80) | 0x80);
  out.push(rest);
}

/** A directory column by column: count, id steps, runs, lengths, offsets (0 = right behind the one before). */
function directory(entries: readonly Entry[]): Buffer {
  const out: number[] = [];
  varint(entries.length, out);
  entries.forEach(({ id }, index) => varint(id - (entries[index - 1]?.id ?? 0), out));
  entries.forEach(({ run }) => varint(run, out));
  entries.forEach(({ length }) => varint(length, out));
  entries.forEach(({ offset }, index) => {
    const before = entries[index - 1];
    varint(before && offset === before.offset + before.length ? 0 : offset + 1, out);
  });
  return gzipSync(Buffer.from(out), { level: 9 });
}

/** Tiles in Hilbert order, equal contents kept once. */
function pack(tiles: readonly Tile[]): { entries: Entry[]; contents: Buffer[] } {
  const entries: Entry[] = [];
  const contents: Buffer[] = [];
  const places = new Map<string, { offset: number; length: number }>();
  let end = 0;
  const ordered = tiles.map((tile) => ({ id: zxyToTileId(tile.z, tile.x, tile.y), data: tile.data }));
  for (const { id, data } of ordered.sort((a, b) => a.id - b.id)) {
    const key = data.toString('base64');
    const place = places.get(key) ?? { offset: end, length: data.length };
    if (!places.has(key)) {
      places.set(key, place);
      contents.push(data);
      end += data.length;
    }
    const last = entries.at(-1);
    if (last && last.offset === place.offset && last.id + last.run === id) last.run += 1;
    else entries.push({ id, run: 1, ...place });
  }
  return { entries, contents };
}

interface Sections {
  readonly root: number;
  readonly metadata: number;
  readonly tiles: number;
}

function header(sections: Sections, counts: readonly [number, number, number], maxZoom: number): Buffer {
  const head = Buffer.alloc(headerBytes);
  head.write('PMTiles', 0, 'ascii');
  head.writeUInt8(3, 7);
  const afterRoot = headerBytes + sections.root;
  const afterMetadata = afterRoot + sections.metadata;
  // Offset and length of root, metadata, leaf directories (none) and tiles; then tiles, entries, contents.
  const longs = [headerBytes, sections.root, afterRoot, sections.metadata, afterMetadata, 0, afterMetadata];
  [...longs, sections.tiles, ...counts].forEach((value, index) =>
    head.writeBigUInt64LE(BigInt(value), 8 + 8 * index),
  );
  const flags = [1, Compression.Gzip, Compression.Gzip, TileType.Mvt, 0, maxZoom];
  flags.forEach((value, index) => head.writeUInt8(value, 96 + index));
  [-180, -85.051129, 180, 85.051129].forEach((degrees, index) =>
    head.writeInt32LE(Math.round(degrees * 1e7), 102 + 4 * index),
  );
  return head;
}

/**
 * A PMTiles v3 archive of the tiles, as bytes.
 * @throws RangeError when the root directory outgrows the first 16 KiB; leaf directories are not written.
 */
export function archive(tiles: readonly Tile[], metadata: object, maxZoom: number): Buffer {
  const { entries, contents } = pack(tiles);
  const root = directory(entries);
  if (root.length > rootLimit) throw new RangeError(`archive: root directory of ${root.length} bytes`);
  const about = gzipSync(JSON.stringify(metadata), { level: 9 });
  const body = Buffer.concat(contents);
  const sections = { root: root.length, metadata: about.length, tiles: body.length };
  const counts = [tiles.length, entries.length, contents.length] as const;
  return Buffer.concat([header(sections, counts, maxZoom), root, about, body]);
}
