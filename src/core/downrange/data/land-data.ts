import { PbfReader, PbfWriter } from 'pbf';
import { cellRing, cornerOf } from './cells.ts';

export interface Country {
  /** Two letters, as the gazetteer has them. */
  readonly code: string;
  readonly name: string;
  /** All its people in the year of the totals; null where no total is known. */
  readonly people: number | null;
  /** All its land, m². */
  readonly land: number;
}

/** What one country has of one cell. */
export interface LandPiece {
  /** Place in the list of countries. */
  readonly country: number;
  /** Closed rings without the repeated last point: longitude, latitude, … in units; inside by the even-odd rule. */
  readonly rings: readonly Int32Array[];
  /** Whether the piece is the whole cell. */
  readonly whole: boolean;
}

export interface LandData {
  /** The year the countries' totals are of. */
  readonly totalsYear: number;
  readonly countries: readonly Country[];
  /** The cells that hold land, by number. */
  readonly cells: ReadonlyMap<number, readonly LandPiece[]>;
}

function writeCountry({ code, name, people, land }: Country, pbf: PbfWriter): void {
  pbf.writeStringField(1, code);
  pbf.writeStringField(2, name);
  if (people !== null) pbf.writeVarintField(3, people);
  pbf.writeVarintField(4, Math.round(land));
}

/** Ring by ring, each point as steps from the one before, the first from the cell's corner. */
function stepsOf(cell: number, rings: readonly Int32Array[]): number[] {
  const [west, south] = cornerOf(cell);
  return rings.flatMap((ring) =>
    Array.from(ring, (value, at) => value - (at < 2 ? (at === 0 ? west : south) : (ring[at - 2] as number))),
  );
}

function writePiece(of: { cell: number; piece: LandPiece }, pbf: PbfWriter): void {
  pbf.writeVarintField(1, of.piece.country);
  if (of.piece.whole) return;
  pbf.writePackedVarint(
    2,
    of.piece.rings.map((ring) => ring.length / 2),
  );
  pbf.writePackedSVarint(3, stepsOf(of.cell, of.piece.rings));
}

function writeCell([cell, pieces]: readonly [number, readonly LandPiece[]], pbf: PbfWriter): void {
  pbf.writeVarintField(1, cell);
  for (const piece of pieces) pbf.writeMessage(2, writePiece, { cell, piece });
}

/** The bytes of a land file, in Protocol Buffers' wire format. */
export function encodeLand(data: LandData): Uint8Array {
  const pbf = new PbfWriter();
  pbf.writeVarintField(1, data.totalsYear);
  for (const country of data.countries) pbf.writeMessage(2, writeCountry, country);
  for (const cell of data.cells) pbf.writeMessage(3, writeCell, cell);
  return pbf.finish();
}

function readCountry(pbf: PbfReader): Country {
  const read = { code: '', name: '', people: null as number | null, land: 0 };
  return pbf.readMessage((tag, into) => {
    if (tag === 1) into.code = pbf.readString();
    if (tag === 2) into.name = pbf.readString();
    if (tag === 3) into.people = pbf.readVarint();
    if (tag === 4) into.land = pbf.readVarint();
  }, read);
}

function ringsOf(cell: number, lengths: readonly number[], steps: readonly number[]): Int32Array[] {
  const corner = cornerOf(cell);
  let from = 0;
  return lengths.map((points) => {
    const ring = new Int32Array(2 * points);
    for (let at = 0; at < ring.length; at += 1) {
      const before = at < 2 ? (corner[at as 0 | 1] as number) : (ring[at - 2] as number);
      ring[at] = before + (steps[from + at] as number);
    }
    from += ring.length;
    return ring;
  });
}

function readPiece(pbf: PbfReader, cell: number): LandPiece {
  const read = { country: 0, lengths: [] as number[], steps: [] as number[] };
  pbf.readMessage((tag, into) => {
    if (tag === 1) into.country = pbf.readVarint();
    if (tag === 2) into.lengths = pbf.readPackedVarint();
    if (tag === 3) into.steps = pbf.readPackedSVarint();
  }, read);
  const whole = read.lengths.length === 0;
  const rings = whole ? [cellRing(cell)] : ringsOf(cell, read.lengths, read.steps);
  return { country: read.country, rings, whole };
}

function readCell(pbf: PbfReader): readonly [number, readonly LandPiece[]] {
  const read = { cell: 0, pieces: [] as LandPiece[] };
  pbf.readMessage((tag, into) => {
    // The writer puts the cell's number before its pieces, which count from the cell's corner.
    if (tag === 1) into.cell = pbf.readVarint();
    if (tag === 2) into.pieces.push(readPiece(pbf, into.cell));
  }, read);
  return [read.cell, read.pieces];
}

/** Land as it was encoded. */
export function decodeLand(bytes: Uint8Array): LandData {
  const cells = new Map<number, readonly LandPiece[]>();
  const pbf = new PbfReader(bytes);
  const read = { totalsYear: 0, countries: [] as Country[] };
  pbf.readFields((tag, into) => {
    if (tag === 1) into.totalsYear = pbf.readVarint();
    if (tag === 2) into.countries.push(readCountry(pbf));
    if (tag === 3) cells.set(...readCell(pbf));
  }, read);
  return { ...read, cells };
}
