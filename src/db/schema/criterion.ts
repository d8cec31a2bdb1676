import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
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
import { study, targetOrbit } from './study.ts';

export const criterionSource = pgEnum('criterion_source', ['computed', 'entered', 'text', 'rating']);
export const direction = pgEnum('direction', ['more', 'less']);
export const levelMode = pgEnum('level_mode', ['candidates', 'fixed']);
export const limitKind = pgEnum('limit_kind', ['at-least', 'at-most']);

/** Criteria that are weighed together: a criterion's weight is its group's times its own within the group. */
export const criterionGroup = pgTable(
  'criterion_group',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    name: text('name').notNull(),
    /** The name with case and spacing folded. */
    nameKey: text('name_key').notNull(),
    version: integer('version').notNull().default(1),
  },
  (t) => [uniqueIndex('criterion_group_study_name_idx').on(t.studyId, t.nameKey)],
);

/** How value grows between a criterion's levels; a knot is [position from worst 0 to best 1, value]. */
export type ShapeColumn =
  | { kind: 'straight' }
  | { kind: 'exponential'; curvature: number }
  | { kind: 'piecewise'; knots: [number, number][] };

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
    shape: jsonb('shape').notNull().$type<ShapeColumn>().default({ kind: 'straight' }),
    groupId: uuid('group_id').references(() => criterionGroup.id),
    /** Ratings: the names of the five steps 0 to 4. */
    ratingSteps: jsonb('rating_steps').$type<string[]>(),
    limitKind: limitKind('limit_kind'),
    limitValue: doublePrecision('limit_value'),
    version: integer('version').notNull().default(1),
  },
  (t) => [
    uniqueIndex('criterion_study_name_idx').on(t.studyId, t.nameKey),
    check('criterion_quantity', sql`(${t.quantity} is not null) = (${t.source} = 'computed')`),
    // Compared as text: a value added to the type cannot be named in the migration that adds it.
    check('criterion_steps', sql`(${t.ratingSteps} is not null) = (${t.source}::text = 'rating')`),
    check('criterion_limit', sql`(${t.limitKind} is null) = (${t.limitValue} is null)`),
    check(
      'criterion_levels',
      sql`${t.levelMode} = 'candidates' or (${t.worst} is not null and ${t.best} is not null and ${t.worst} <> ${t.best})`,
    ),
  ],
);

export const weightMethod = pgEnum('weight_method', ['points', 'swing', 'pairwise', 'centroid']);

/** Where the study's weights come from. */
export type WeightOriginColumn = { by?: { userId: string; name: string } | undefined } & (
  | { kind: 'apart' }
  | { kind: 'member'; userId: string; name: string }
  | { kind: 'mean'; members: { userId: string; name: string }[] }
);

/** A statement of weights: the study's (no person) or a member's own. */
export const weightSet = pgTable(
  'weight_set',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    userId: text('user_id').references(() => user.id),
    method: weightMethod('method').notNull().default('points'),
    /** Points and swing: by criterion id and by group id. */
    points: jsonb('points').notNull().$type<Record<string, number>>().default({}),
    /** Rank-order centroid: ids of criteria and groups, the most important first. */
    order: jsonb('order').notNull().$type<string[]>().default([]),
    /** Pairwise: how many times the first outweighs the second. */
    judgements: jsonb('judgements').notNull().$type<[string, string, number][]>().default([]),
    /** A member's own: whether the study's other members may see it. */
    shared: boolean('shared').notNull().default(false),
    /** The study's alone. */
    origin: jsonb('origin').$type<WeightOriginColumn>(),
    /** Why these weights, in words; the study's alone. */
    reason: text('reason').notNull().default(''),
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

/** Changes a member tries beside the study's ranking; they touch the study only when a lead adopts them. */
export const whatIf = pgTable(
  'what_if',
  {
    id: idColumn(),
    studyId: uuid('study_id')
      .notNull()
      .references(() => study.id),
    userId: text('user_id')
      .notNull()
      .references(() => user.id),
    name: text('name').notNull(),
    shared: boolean('shared').notNull().default(false),
    /** Weights, limits, figures and sites left out, as the contract's WhatIfChanges. */
    changes: jsonb('changes').notNull().$type<Record<string, unknown>>(),
    version: integer('version').notNull().default(1),
    createdAt: instant('created_at').notNull().defaultNow(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [index('what_if_study_idx').on(t.studyId, t.userId)],
);
