import { PbfReader, PbfWriter } from 'pbf';

/** Positions are kept to 0.00001° (1 m), as the gazetteer has them. */
const UNITS_PER_DEG = 100_000;

/** Settlements, column by column; the same place in each is one settlement. */
export interface SettlementData {
  /** Degrees, north positive. */
  readonly latitudesDeg: Float64Array;
  /** Degrees, −180…180, east positive. */
  readonly longitudesDeg: Float64Array;
  /** People; 0 where the gazetteer has no figure. */
  readonly people: Uint32Array;
  /** Two-letter codes, and each settlement's place among them. */
  readonly countryCodes: readonly string[];
  readonly countries: Uint16Array;
  readonly names: readonly string[];
}

const stepsOf = (column: Float64Array): number[] => {
  const units = Array.from(column, (degrees) => Math.round(degrees * UNITS_PER_DEG));
  return units.map((value, at) => value - (at === 0 ? 0 : (units[at - 1] as number)));
};

function columnOf(steps: readonly number[]): Float64Array {
  const column = new Float64Array(steps.length);
  let units = 0;
  for (const [at, step] of steps.entries()) {
    units += step;
    column[at] = units / UNITS_PER_DEG;
  }
  return column;
}

/** The bytes of a settlement file, in Protocol Buffers' wire format. No name holds a line break. */
export function encodeSettlements(data: SettlementData): Uint8Array {
  const pbf = new PbfWriter();
  pbf.writePackedSVarint(1, stepsOf(data.latitudesDeg));
  pbf.writePackedSVarint(2, stepsOf(data.longitudesDeg));
  pbf.writePackedVarint(3, Array.from(data.people));
  pbf.writeStringField(4, data.countryCodes.join('\n'));
  pbf.writePackedVarint(5, Array.from(data.countries));
  pbf.writeStringField(6, data.names.join('\n'));
  return pbf.finish();
}

/** Settlements as they were encoded. */
export function decodeSettlements(bytes: Uint8Array): SettlementData {
  const pbf = new PbfReader(bytes);
  const read = {
    latitudes: [] as number[],
    longitudes: [] as number[],
    people: [] as number[],
    codes: '',
    countries: [] as number[],
    names: '',
  };
  pbf.readFields((tag, into) => {
    if (tag === 1) into.latitudes = pbf.readPackedSVarint();
    if (tag === 2) into.longitudes = pbf.readPackedSVarint();
    if (tag === 3) into.people = pbf.readPackedVarint();
    if (tag === 4) into.codes = pbf.readString();
    if (tag === 5) into.countries = pbf.readPackedVarint();
    if (tag === 6) into.names = pbf.readString();
  }, read);
  return {
    latitudesDeg: columnOf(read.latitudes),
    longitudesDeg: columnOf(read.longitudes),
    people: Uint32Array.from(read.people),
    countryCodes: read.codes.split('\n'),
    countries: Uint16Array.from(read.countries),
    names: read.names.split('\n'),
  };
}
