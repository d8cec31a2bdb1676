import { isCode } from '#core/csv/codes.ts';
import { lengthOf, MAX_NAME_LENGTH, MAX_TEXT_LENGTH } from '#core/csv/limits.ts';
import { ElevationM, LatitudeDeg, LongitudeDeg, PermittedAzimuthsDeg } from './geography.ts';
import { listFields, listOf } from './list.ts';
import { z } from './zod.ts';

/** The most sites that one call removes or restores. */
export const MAX_SITES_AT_ONCE = 10_000;

export const SiteCode = z
  .string()
  .trim()
  .toUpperCase()
  .refine(isCode, 'A code has 2 to 8 letters or digits.')
  .meta({ description: '2 to 8 letters or digits, unique in the study', examples: ['PV'] });

export const SiteName = z
  .string()
  .trim()
  .min(1, 'A site has a name.')
  .refine((name) => lengthOf(name) <= MAX_NAME_LENGTH, `A name has up to ${MAX_NAME_LENGTH} characters.`)
  .meta({ description: 'Unique in the study, whatever its case and spacing', examples: ['Ponta do Vigia'] });

const kept = (text: string): boolean => lengthOf(text) <= MAX_TEXT_LENGTH;

export const SiteNotes = z.string().refine(kept, 'Notes have up to 2,000 characters.');

/** A figure entered for a criterion: a number, or text kept as given. */
export const EnteredValue = z.union([
  z.number(),
  z.string().refine(kept, 'A text has up to 2,000 characters.'),
]);
export type EnteredValue = z.infer<typeof EnteredValue>;

const Values = z
  .record(z.uuid(), EnteredValue)
  .meta({ description: 'Entered figures by criterion id; a number, or text for a text criterion' });

const FIGURE_FINITE = z.number('Enter a number.');
const provenanceText = z.string().trim().max(500, 'A source has up to 500 characters.');

/** What is known of an entered figure beside its likely value; what is not known is left out. */
export const FigureParticulars = z
  .strictObject({
    low: FIGURE_FINITE.optional(),
    high: FIGURE_FINITE.optional(),
    source: provenanceText.optional(),
    date: z.iso.date('A day, such as 2026-11-30.').optional(),
    confidence: z.enum(['low', 'medium', 'high']).optional(),
  })
  .meta({ id: 'FigureParticulars' });
export type FigureParticulars = z.infer<typeof FigureParticulars>;

const Particulars = z.record(z.uuid(), FigureParticulars).meta({
  description:
    'Low, high, source, date and confidence of entered figures, by criterion id; low ≤ figure ≤ high',
});

export const Site = z
  .object({
    id: z.uuid(),
    code: z.string(),
    name: z.string(),
    latitudeDeg: LatitudeDeg,
    longitudeDeg: LongitudeDeg,
    elevationM: ElevationM,
    permittedAzimuthsDeg: PermittedAzimuthsDeg,
    notes: z.string(),
    values: Values,
    particulars: Particulars,
    version: z.int(),
  })
  .meta({ id: 'Site' });
export type Site = z.infer<typeof Site>;

export const SiteListQuery = z.object(listFields);
export type SiteListQuery = z.infer<typeof SiteListQuery>;

export const SiteList = listOf(Site);
export type SiteList = z.infer<typeof SiteList>;

/** A new candidate; without a code it gets one made from its name. */
export const SiteInput = z
  .strictObject({
    code: SiteCode.optional(),
    name: SiteName,
    latitudeDeg: LatitudeDeg,
    longitudeDeg: LongitudeDeg,
    elevationM: ElevationM.default(0),
    permittedAzimuthsDeg: PermittedAzimuthsDeg.default([]),
    notes: SiteNotes.default(''),
    values: Values.default({}),
    particulars: Particulars.default({}),
  })
  .meta({ id: 'SiteInput' });
export type SiteInput = z.output<typeof SiteInput>;
export type SiteDraft = z.input<typeof SiteInput>;

/** Only what is sent changes. In `values` a null takes a figure away and what is not named stays. */
export const SitePatch = z
  .strictObject({
    code: SiteCode.optional(),
    name: SiteName.optional(),
    latitudeDeg: LatitudeDeg.optional(),
    longitudeDeg: LongitudeDeg.optional(),
    elevationM: ElevationM.optional(),
    permittedAzimuthsDeg: PermittedAzimuthsDeg.optional(),
    notes: SiteNotes.optional(),
    values: z.record(z.uuid(), EnteredValue.nullable()).optional(),
    /** Each entry replaces what was known of its figure; null takes it away. */
    particulars: z.record(z.uuid(), FigureParticulars.nullable()).optional(),
    version: z.int().optional(),
  })
  .meta({ id: 'SitePatch' });
export type SitePatch = z.infer<typeof SitePatch>;

/** Where a write left the study. */
const saved = { revision: z.int(), savedAt: z.iso.datetime() };

/** A site after a write. */
export const SavedSite = Site.extend(saved).meta({ id: 'SavedSite' });
export type SavedSite = z.infer<typeof SavedSite>;

/** What a stale write is answered with: the site as it is now, and who changed it last. */
export const ChangedSite = Site.extend({
  changedBy: z.string().nullable(),
  changedAt: z.iso.datetime().nullable(),
});
export type ChangedSite = z.infer<typeof ChangedSite>;

/** Several sites to remove, each with the version the choice was made on: all or none. */
export const SitesRemoval = z
  .strictObject({
    sites: z
      .array(z.strictObject({ id: z.uuid(), version: z.int() }))
      .min(1, 'Name the sites to remove.')
      .max(MAX_SITES_AT_ONCE),
  })
  .meta({ id: 'SitesRemoval' });
export type SitesRemoval = z.infer<typeof SitesRemoval>;

/** Removed sites to bring back, all or none. */
export const SitesRestoration = z
  .strictObject({
    siteIds: z.array(z.uuid()).min(1, 'Name the sites to bring back.').max(MAX_SITES_AT_ONCE),
  })
  .meta({ id: 'SitesRestoration' });
export type SitesRestoration = z.infer<typeof SitesRestoration>;

export const SitesRemoved = z.object({ siteIds: z.array(z.uuid()), ...saved });
export type SitesRemoved = z.infer<typeof SitesRemoved>;

export const SitesRestored = z.object({ items: z.array(Site), ...saved });
export type SitesRestored = z.infer<typeof SitesRestored>;
