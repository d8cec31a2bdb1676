import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  date,
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

export const studyState = pgEnum('study_state', ['draft', 'in-review', 'baselined']);
export const memberRole = pgEnum('member_role', ['lead', 'engineer', 'reviewer', 'reader']);
export const injectionProfile = pgEnum('injection_profile', ['auto', 'direct', 'parking']);
export const lossesSource = pgEnum('losses_source', ['entered', 'flown']);

export const study = pgTable(
  'study',
  {
    id: idColumn(),
    title: text('title').notNull(),
    organisation: text('organisation').notNull().default(''),
    /** The question to decide, and by when. */
    question: text('question').notNull().default(''),
    decideBy: date('decide_by', { mode: 'string' }),
    state: studyState('state').notNull().default('draft'),
    archivedAt: instant('archived_at'),
    /** One more at each committed change of the inputs or of the study's weights. */
    revision: integer('revision').notNull().default(1),
    /** When the revision last moved. */
    savedAt: instant('saved_at').notNull().defaultNow(),
    /** Version of title, organisation, question, decision date and archive flag, for stale writes. */
    version: integer('version').notNull().default(1),
    /** Share of the injection speed flown when a dogleg turns early (flight-mechanics setting). */
    turnSpeedFraction: doublePrecision('turn_speed_fraction').notNull().default(0.6),
    /** Whether the budget takes the vehicle's entered losses or those of flown ascents. */
    losses: lossesSource('losses').notNull().default('entered'),
    settingsVersion: integer('settings_version').notNull().default(1),
    createdBy: text('created_by')
      .notNull()
      .references(() => user.id),
    createdAt: instant('created_at').notNull().defaultNow(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [
    index('study_updated_at_idx').on(t.updatedAt),
    check('study_turn_speed_fraction', sql`${t.turnSpeedFraction} > 0 and ${t.turnSpeedFraction} <= 1`),
  ],
);

/** A member, or a pending one: an address without an account yet. */
export const member = pgTable(
  'member',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    /** Lower case. */
    email: text('email').notNull(),
    userId: text('user_id').references(() => user.id),
    role: memberRole('role').notNull(),
    version: integer('version').notNull().default(1),
    addedBy: text('added_by').references(() => user.id),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (t) => [
    uniqueIndex('member_study_email_idx').on(t.studyId, t.email),
    uniqueIndex('member_study_user_idx').on(t.studyId, t.userId),
    index('member_user_idx').on(t.userId),
  ],
);

/** A target orbit of the launch manifest. Altitudes are above the equatorial radius. */
export const targetOrbit = pgTable(
  'target_orbit',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    position: integer('position').notNull(),
    code: text('code').notNull(),
    name: text('name').notNull().default(''),
    perigeeM: doublePrecision('perigee_m').notNull(),
    apogeeM: doublePrecision('apogee_m').notNull(),
    /** Null where the orbit is sun-synchronous: the inclination follows. Degrees, so that 51.6 stays 51.6. */
    inclinationDeg: doublePrecision('inclination_deg'),
    sunSynchronous: boolean('sun_synchronous').notNull().default(false),
    profile: injectionProfile('profile').notNull().default('auto'),
    parkingM: doublePrecision('parking_m').notNull().default(185_000),
    flightsPerYear: doublePrecision('flights_per_year').notNull().default(0),
    version: integer('version').notNull().default(1),
  },
  (t) => [
    uniqueIndex('target_orbit_study_code_idx').on(t.studyId, t.code),
    check('target_orbit_altitudes', sql`${t.perigeeM} <= ${t.apogeeM}`),
    check('target_orbit_inclination', sql`(${t.inclinationDeg} is null) = ${t.sunSynchronous}`),
  ],
);

/** The shared vehicle library, kept by administrators. `spec` is the interface's vehicle (units in its names). */
export const libraryVehicle = pgTable('library_vehicle', {
  id: idColumn(),
  code: text('code').notNull().unique(),
  name: text('name').notNull(),
  spec: jsonb('spec').notNull().$type<Record<string, unknown>>(),
  version: integer('version').notNull().default(1),
  archivedAt: instant('archived_at'),
  createdAt: instant('created_at').notNull().defaultNow(),
  updatedAt: instant('updated_at').notNull().defaultNow(),
});

/** The one vehicle of a study: a copy, so that a change of the library never moves a study. */
export const studyVehicle = pgTable('study_vehicle', {
  studyId: uuid('study_id')
    .primaryKey()
    .references(() => study.id),
  libraryVehicleId: uuid('library_vehicle_id').references(() => libraryVehicle.id),
  spec: jsonb('spec').notNull().$type<Record<string, unknown>>(),
  version: integer('version').notNull().default(1),
});
