import {
  customType,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import { instant } from '../columns.ts';
import { user } from './auth.ts';
import { site } from './site.ts';
import { study } from './study.ts';

const bytea = customType<{ data: Buffer }>({ dataType: () => 'bytea' });

type Json = Record<string, unknown>;

/** Why an attempt came to nothing, and when (ISO 8601, UTC). */
export interface AscentFailure {
  at: string;
  reason: string;
}

/** A vehicle as ascents are flown with it, kept once however many sites and orbits it flies. */
export const ascentVehicle = pgTable('ascent_vehicle', {
  /** SHA-256 of what of it a flight follows from. */
  hash: text('hash').primaryKey(),
  vehicle: jsonb('vehicle').notNull().$type<Json>(),
});

export const ascentState = pgEnum('ascent_state', ['waiting', 'flying', 'done', 'failed', 'cancelled']);

/** A flown ascent: one row for the same inputs, whichever studies ask, so that nothing is flown twice. */
export const ascent = pgTable(
  'ascent',
  {
    /** SHA-256 of the canonical inputs and the method's version. */
    hash: text('hash').primaryKey(),
    vehicleHash: text('vehicle_hash')
      .notNull()
      .references(() => ascentVehicle.hash),
    /** The rest of the inputs: site and orbit, as the interface takes them. */
    task: jsonb('task').notNull().$type<Json>(),
    method: integer('method').notNull(),
    state: ascentState('state').notNull().default('waiting'),
    /** The highest of those who asked. */
    priority: integer('priority').notNull().default(0),
    /** The job that carries it; only that job may take it up. */
    batchId: uuid('batch_id'),
    attempts: integer('attempts').notNull().default(0),
    failures: jsonb('failures').notNull().$type<AscentFailure[]>().default([]),
    askedAt: instant('asked_at').notNull().defaultNow(),
    finishedAt: instant('finished_at'),
    tookS: doublePrecision('took_s'),
    /** The answer without its trajectory. */
    outcome: jsonb('outcome').$type<Json>(),
    /** The trajectory as gzipped JSON. */
    trajectory: bytea('trajectory'),
  },
  (t) => [
    index('ascent_state_idx').on(t.state, t.priority, t.askedAt),
    index('ascent_finished_at_idx').on(t.finishedAt),
    index('ascent_batch_idx').on(t.batchId),
  ],
);

/** That a study asked for a site and an orbit as they were then; an earlier row is what an old result is found by. */
export const ascentRequest = pgTable(
  'ascent_request',
  {
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    siteId: uuid('site_id')
      .notNull()
      .references(() => site.id),
    /** No reference: an orbit can be removed. */
    orbitId: uuid('orbit_id').notNull(),
    hash: text('hash')
      .notNull()
      .references(() => ascent.hash),
    priority: integer('priority').notNull(),
    requestedBy: text('requested_by')
      .notNull()
      .references(() => user.id),
    requestedAt: instant('requested_at').notNull().defaultNow(),
    cancelledAt: instant('cancelled_at'),
  },
  (t) => [
    primaryKey({ columns: [t.studyId, t.siteId, t.orbitId, t.hash] }),
    index('ascent_request_hash_idx').on(t.hash),
  ],
);
