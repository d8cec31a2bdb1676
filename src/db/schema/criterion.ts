import { sql } from 'drizzle-orm';
import {
  check,
  doublePrecision,
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
import { study, targetOrbit } from './study.ts';

export const criterionSource = pgEnum('criterion_source', ['computed', 'entered', 'text']);
export const direction = pgEnum('direction', ['more', 'less']);
export const levelMode = pgEnum('level_mode', ['candidates', 'fixed']);
export const limitKind = pgEnum('limit_kind', ['at-least', 'at-most']);

/** What sites are weighed by. A text criterion is kept and shown, never weighed. */
export const criterion = pgTable(
  'criterion',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    position: integer('position').notNull(),
    name: text('name').notNull(),
    /** The name with case and spacing folded: what an uploaded column is matched with. */
    nameKey: text('name_key').notNull(),
    unit: text('unit').notNull().default(''),
    direction: direction('direction').notNull(),
    source: criterionSource('source').notNull(),
    /** Computed criteria: the quantity's key, and the orbit it is for (null: the whole manifest). */
    quantity: text('quantity'),
    orbitId: uuid('orbit_id').references(() => targetOrbit.id),
    levelMode: levelMode('level_mode').notNull().default('candidates'),
    worst: doublePrecision('worst'),
    best: doublePrecision('best'),
    limitKind: limitKind('limit_kind'),
    limitValue: doublePrecision('limit_value'),
    version: integer('version').notNull().default(1),
  },
  (t) => [
    uniqueIndex('criterion_study_name_idx').on(t.studyId, t.nameKey),
    check('criterion_quantity', sql`(${t.quantity} is not null) = (${t.source} = 'computed')`),
    check('criterion_limit', sql`(${t.limitKind} is null) = (${t.limitValue} is null)`),
    check(
      'criterion_levels',
      sql`${t.levelMode} = 'candidates' or (${t.worst} is not null and ${t.best} is not null and ${t.worst} <> ${t.best})`,
    ),
  ],
);

/** Points by criterion id: the study's set (no person) or a member's own. */
export const weightSet = pgTable(
  'weight_set',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    userId: text('user_id').references(() => user.id),
    points: jsonb('points').notNull().$type<Record<string, number>>().default({}),
    version: integer('version').notNull().default(1),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [
    uniqueIndex('weight_set_study_idx')
      .on(t.studyId)
      .where(sql`user_id is null`),
    uniqueIndex('weight_set_member_idx')
      .on(t.studyId, t.userId)
      .where(sql`user_id is not null`),
  ],
);
