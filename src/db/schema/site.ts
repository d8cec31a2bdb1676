import { sql } from 'drizzle-orm';
import {
  check,
  customType,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { idColumn, instant } from '../columns.ts';
import { user } from './auth.ts';
import { study } from './study.ts';

const bytea = customType<{ data: Buffer }>({ dataType: () => 'bytea' });

export const uploadState = pgEnum('upload_state', ['read', 'committed', 'undone']);

/** A file of candidates: its bytes are kept as they came, whatever becomes of its rows. */
export const upload = pgTable(
  'upload',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    fileName: text('file_name').notNull(),
    bytes: bytea('bytes').notNull(),
    sha256: text('sha256').notNull(),
    /** What was recognised or chosen: columns, delimiter, encoding. */
    reading: jsonb('reading').notNull().$type<Record<string, unknown>>(),
    state: uploadState('state').notNull().default('read'),
    /** What the commit did, so that it can be undone: made and changed sites, criteria made. */
    effect: jsonb('effect').$type<Record<string, unknown>>(),
    createdBy: text('created_by')
      .notNull()
      .references(() => user.id),
    createdAt: instant('created_at').notNull().defaultNow(),
    committedAt: instant('committed_at'),
    undoneAt: instant('undone_at'),
  },
  (t) => [index('upload_study_idx').on(t.studyId, t.createdAt)],
);

/** Uncertainty and provenance of an entered figure; what is not known is left out. */
export interface FigureParticulars {
  low?: number | undefined;
  high?: number | undefined;
  source?: string | undefined;
  /** ISO 8601 day the figure is of. */
  date?: string | undefined;
  confidence?: 'low' | 'medium' | 'high' | undefined;
}

/** A candidate site. Latitude is geodetic (WGS 84), elevation is above the ellipsoid. */
export const site = pgTable(
  'site',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    code: text('code').notNull(),
    name: text('name').notNull(),
    /** The name with case and spacing folded: what makes a duplicate. */
    nameKey: text('name_key').notNull(),
    latitudeDeg: doublePrecision('latitude_deg').notNull(),
    longitudeDeg: doublePrecision('longitude_deg').notNull(),
    elevationM: doublePrecision('elevation_m').notNull().default(0),
    permittedAzimuthsDeg: jsonb('permitted_azimuths_deg').notNull().$type<[number, number][]>().default([]),
    notes: text('notes').notNull().default(''),
    /** Entered figures by criterion id: a number, or text kept as given. */
    values: jsonb('values').notNull().$type<Record<string, number | string>>().default({}),
    /** What is known of an entered figure beside its likely value, by criterion id. */
    particulars: jsonb('particulars').notNull().$type<Record<string, FigureParticulars>>().default({}),
    version: integer('version').notNull().default(1),
    uploadId: uuid('upload_id').references(() => upload.id),
    createdAt: instant('created_at').notNull().defaultNow(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
    /** A deleted site is kept for undo and for the record; it counts nowhere. */
    deletedAt: instant('deleted_at'),
  },
  (t) => [
    uniqueIndex('site_study_code_idx')
      .on(t.studyId, t.code)
      .where(sql`deleted_at is null`),
    uniqueIndex('site_study_name_idx')
      .on(t.studyId, t.nameKey)
      .where(sql`deleted_at is null`),
    index('site_study_idx').on(t.studyId),
    check('site_latitude', sql`${t.latitudeDeg} between -90 and 90`),
    check('site_longitude', sql`${t.longitudeDeg} > -180 and ${t.longitudeDeg} <= 180`),
  ],
);

/** A file that supports an entered figure. Taken away it stays in the record's sight and is listed nowhere else. */
export const evidence = pgTable(
  'evidence',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    siteId: uuid('site_id')
      .notNull()
      .references(() => site.id),
    /** No reference: a criterion can be removed, and its evidence with it. */
    criterionId: uuid('criterion_id').notNull(),
    fileName: text('file_name').notNull(),
    mediaType: text('media_type').notNull(),
    bytes: bytea('bytes').notNull(),
    sha256: text('sha256').notNull(),
    createdBy: text('created_by')
      .notNull()
      .references(() => user.id),
    createdAt: instant('created_at').notNull().defaultNow(),
    removedAt: instant('removed_at'),
  },
  (t) => [index('evidence_study_idx').on(t.studyId, t.siteId, t.criterionId)],
);
