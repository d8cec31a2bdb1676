import { bigint, index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { instant } from '../columns.ts';
import { user } from './auth.ts';
import { study } from './study.ts';

/** Everything anyone changed: who, when, what, from, to. Nobody updates or deletes a row (migration 0001). */
export const record = pgTable(
  'record',
  {
    id: bigint('id', { mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    /** Null for changes outside any study (people, vehicle library). */
    studyId: uuid('study_id').references(() => study.id),
    userId: text('user_id').references(() => user.id),
    at: instant('at').notNull().defaultNow(),
    /** The study's revision after the change. */
    revision: integer('revision'),
    object: text('object').notNull(),
    objectId: text('object_id').notNull(),
    action: text('action').notNull(),
    from: jsonb('from'),
    to: jsonb('to'),
  },
  (t) => [index('record_study_idx').on(t.studyId, t.id), index('record_object_idx').on(t.object, t.objectId)],
);
