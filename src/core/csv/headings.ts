/** The fields of a site that a column can fill; the same keys as a site has in JSON. */
export const SITE_FIELDS = [
  'name',
  'code',
  'latitudeDeg',
  'longitudeDeg',
  'elevationM',
  'permittedAzimuthsDeg',
  'notes',
] as const;
export type SiteField = (typeof SITE_FIELDS)[number];

/** What a column is read as: a field of the site, an entered criterion's figures, or nothing. */
export const COLUMN_FIELDS = [...SITE_FIELDS, 'criterion', 'unused'] as const;
export type ColumnField = (typeof COLUMN_FIELDS)[number];

export interface Recognised {
  readonly field: SiteField;
  /** Among headings for one field the one with the lower rank is meant. */
  readonly rank: number;
  readonly unit: 'm' | 'ft' | null;
}

/** Usual headings, the surest first; compared after folding, so spelt in lower case with single spaces. */
const SYNONYMS: Readonly<Record<SiteField, readonly string[]>> = {
  name: [
    'name',
    'site name',
    'site',
    'candidate site',
    'candidate',
    'candidate name',
    'place',
    'place name',
    'location name',
    'location',
    'pad',
    'title',
    'label',
    'nom',
    'nombre',
    'nome',
    'naam',
    'standort',
  ],
  code: ['code', 'site code', 'short code', 'key', 'abbreviation', 'abbr', 'site id', 'id'],
  latitudeDeg: [
    'latitude',
    'lat',
    'site latitude',
    'geodetic latitude',
    'latitud',
    'breite',
    'breitengrad',
    'y',
  ],
  longitudeDeg: [
    'longitude',
    'lon',
    'long',
    'lng',
    'site longitude',
    'longitud',
    'lange',
    'laenge',
    'langengrad',
    'laengengrad',
    'x',
  ],
  elevationM: [
    'elevation',
    'elev',
    'site elevation',
    'altitude',
    'alt',
    'height',
    'ellipsoidal height',
    'hohe',
  ],
  permittedAzimuthsDeg: [
    'permitted azimuths',
    'permitted azimuth',
    'azimuths',
    'azimuth',
    'permitted sectors',
    'permitted sector',
    'sectors',
    'sector',
    'launch azimuths',
    'launch azimuth',
    'allowed azimuths',
    'azimuth sectors',
    'azimuth range',
    'az ok',
    'az permitted',
    'az',
    'permitted azimuths from to',
  ],
  notes: ['notes', 'note', 'remarks', 'remark', 'comments', 'comment', 'description', 'notas', 'bemerkung'],
};

const KNOWN: ReadonlyMap<string, { field: SiteField; rank: number }> = new Map(
  SITE_FIELDS.flatMap((field) => SYNONYMS[field].map((word, rank) => [word, { field, rank }] as const)),
);

/** Columns that a file of refused rows carries for people; they are read as nothing. */
export const REFUSED_HEADINGS = ['Line in the file', 'Why it was refused'] as const;

export function isRefusedHeading(heading: string): boolean {
  return REFUSED_HEADINGS.some((known) => known === heading);
}

/** Words in a heading that name a unit or a datum and not the thing itself. */
const QUALIFIERS = new Set(
  'deg degs degree degrees dd dms decimal wgs wgs84 84 m metre metres meter meters ft feet foot msl amsl asl'.split(
    ' ',
  ),
);
const FEET = new Set(['ft', 'feet', 'foot']);

/**
 * Tells which field of a site a heading names, whatever its case, spacing, punctuation and accents.
 *
 * @returns the field, how sure, and for elevation its unit (metres unless the heading says feet); undefined where
 * the heading is none of the known ones
 */
export function recognise(heading: string): Recognised | undefined {
  const words = foldHeading(heading);
  const bare = words.filter((word) => !QUALIFIERS.has(word));
  const found = KNOWN.get(bare.join(' '));
  if (found === undefined) return undefined;
  const unit = found.field !== 'elevationM' ? null : words.some((word) => FEET.has(word)) ? 'ft' : 'm';
  return { ...found, unit };
}

function foldHeading(heading: string): string[] {
  return heading
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== '');
}
