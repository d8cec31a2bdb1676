import fs from 'node:fs';
import { fileURLToPath } from 'node:url';
import Papa from 'papaparse';

/** The columns of each file of published rows, beside those that every file has. */
const columns = {
  geodesy: ['quantity', 'latitude_deg', 'longitude_deg', 'height_m'],
  orbit: ['quantity', 'perigee_km', 'apogee_km'],
  azimuth: ['quantity', 'latitude_deg', 'inclination_deg', 'altitude_km', 'branch', 'azimuth_deg'],
  'plane-change': ['quantity', 'low_km', 'high_km', 'change_deg'],
  'sun-synchronous': ['quantity', 'perigee_km', 'inclination_deg'],
  rocket: ['quantity', 'payload_kg', 'delta_v_mps'],
  atmosphere: ['quantity', 'altitude_km'],
  'ascent-sounding': ['quantity'],
  'ascent-gravity-turn': ['mass_ratio', 'quantity'],
  'ascent-benchmark': ['time_s', 'quantity'],
  'ascent-optimum': ['quantity'],
  'impact-point': [
    'quantity',
    'latitude_deg',
    'longitude_deg',
    'altitude_km',
    'speed_mps',
    'path_deg',
    'heading_deg',
  ],
  'decision-weights': ['points', 'place'],
  'decision-swing': ['points', 'place'],
  'decision-centroid': ['count', 'place'],
  'decision-office': ['points', 'values'],
  'decision-additive': ['figures', 'rank'],
  'decision-shapes': ['function', 'figure'],
  'decision-pairwise': ['judgements', 'quantity', 'place'],
  'decision-topsis': ['rows', 'weights', 'place'],
  'decision-acceptability': ['rows', 'model', 'quantity', 'site', 'place'],
  'decision-concordance': ['rankings'],
  corridor: ['quantity', 'class', 'at_nm'],
  'downrange-geodesic': ['quantity', 'latitude_deg', 'longitude_deg', 'azimuth_deg', 'range_nm'],
  'downrange-casualty': ['case', 'step'],
  'downrange-data': ['quantity', 'latitude_deg', 'longitude_deg'],
  'random-streams': ['generator', 'place'],
} as const satisfies Record<string, readonly string[]>;

export type Topic = keyof typeof columns;
export const topics = Object.keys(columns) as Topic[];

/** How far a value may lie from the published one: `abs`olutely, `rel`atively, or not at all. */
export interface Tolerance {
  readonly kind: 'abs' | 'rel' | 'exact';
  readonly value: number;
}

interface Shared {
  readonly id: string;
  readonly expected: number;
  /** As printed, for its number of digits. */
  readonly printed: string;
  readonly unit: string;
  readonly tolerance: Tolerance;
  readonly reason: string;
  readonly source: string;
  readonly confidence: string;
}

export type ReferenceRow<T extends Topic> = Shared & Readonly<Record<(typeof columns)[T][number], string>>;

const SHARED = ['expected', 'unit', 'tolerance', 'reason', 'source', 'confidence'];
const FOLDER = fileURLToPath(new URL('../reference/', import.meta.url));

/** The data files of tests/reference, by name. */
export const referenceFiles = (): string[] => fs.readdirSync(FOLDER).filter((name) => name.endsWith('.csv'));

/** The rows of a file as they stand, every field a string. @throws where a row has too few or too many fields */
export function rowsOf(name: string): Record<string, string>[] {
  const text = fs.readFileSync(FOLDER + name, 'utf8');
  const { data, errors } = Papa.parse<Record<string, string>>(text.trim(), { header: true });
  if (errors[0]) throw new Error(`${name}, row ${errors[0].row}: ${errors[0].message}`);
  return data;
}

function toleranceOf(text: string, place: string): Tolerance {
  if (text === 'exact') return { kind: 'exact', value: 0 };
  const [kind, value] = text.split(':');
  if ((kind !== 'abs' && kind !== 'rel') || !(Number(value) > 0)) {
    throw new Error(`${place}: the tolerance ${text} is none`);
  }
  return { kind, value: Number(value) };
}

/** A file of published rows. @throws where a column is missing, an id repeats, or a figure is none */
export function reference<T extends Topic>(topic: T): ReferenceRow<T>[] {
  const rows = rowsOf(`${topic}.csv`);
  const expectedColumns = ['id', ...columns[topic], ...SHARED];
  const seen = new Set<string>();
  return rows.map((row, index) => {
    const place = `${topic}.csv, row ${index + 2}`;
    const missing = expectedColumns.filter((column) => row[column] === undefined);
    if (missing.length > 0) throw new Error(`${place}: no ${missing.join(', ')}`);
    const { id = '', expected = '', tolerance = '', source = '', confidence = '' } = row;
    if (id === '' || seen.has(id)) throw new Error(`${place}: the id "${id}" is empty or repeats`);
    seen.add(id);
    if (expected === '' || !Number.isFinite(Number(expected))) throw new Error(`${place}: no figure`);
    if (source === '' || confidence === '') throw new Error(`${place}: no source, or not how it is known`);
    return {
      ...row,
      printed: expected,
      expected: Number(expected),
      tolerance: toleranceOf(tolerance, place),
    } as ReferenceRow<T>;
  });
}
