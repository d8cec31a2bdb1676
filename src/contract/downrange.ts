import { PLACE_DENSITY_PER_KM2 } from '#core/downrange/index.ts';
import { CasualtyAreasMi2, CorridorOutput, VehicleClass } from './corridor.ts';
import { LONGEST_KM, SHORTEST_KM } from './downrange-range.ts';
import { LatitudeDeg, LongitudeDeg } from './geography.ts';
import { z } from './zod.ts';

/** More settlements than this are counted, not listed. */
export const MOST_SETTLEMENTS = 2000;
export const MOST_PLACES = 1000;
export const MOST_OTHER_SITES = 50;

const bounded = (least: number, most: number, what: string) =>
  z.coerce
    .number(`${what} is a number.`)
    .min(least, `${what} lies between ${least} and ${most}.`)
    .max(most, `${what} lies between ${least} and ${most}.`);

const site = { siteId: z.uuid('Name a site of the study.') };

const people = {
  spreadPeople: z.enum(['true', 'false']).default('true').meta({
    description: 'Whether people beyond the listed settlements are spread over the land: an assumption',
  }),
  placeDensityPerKm2: bounded(1, 100_000, 'A density')
    .default(PLACE_DENSITY_PER_KM2)
    .meta({ description: 'People to the square kilometre within a settlement: an assumption' }),
};

const launch = {
  ...site,
  ...people,
  vehicleClass: VehicleClass.optional().meta({
    description: 'Without one, the class of the study’s vehicle by its payload',
  }),
  rangeKm: bounded(SHORTEST_KM, LONGEST_KM, 'A range').default(LONGEST_KM),
};

export const FanQuery = z.object(launch);
export type FanQuery = z.infer<typeof FanQuery>;

export const SurroundingsQuery = z.object({ ...site, ...people });
export type SurroundingsQuery = z.infer<typeof SurroundingsQuery>;

export const StudyCorridorQuery = z.object({
  ...launch,
  azimuthDeg: bounded(0, 360, 'An azimuth'),
  casualtyAreasMi2: z
    .string()
    .transform((text) => text.split(',').map(Number))
    .pipe(CasualtyAreasMi2)
    .optional()
    .meta({ description: 'Three areas with commas between, square statute miles; see CorridorInput' }),
});
export type StudyCorridorQuery = z.infer<typeof StudyCorridorQuery>;

/** What stands beside every figure: where it comes from, and what it is not. */
const caveats = {
  regulation: z.string(),
  cautions: z.array(z.string()),
  attributions: z.array(z.string()),
};

export const FanSpoke = z.strictObject({
  azimuthDeg: z.int(),
  coastKm: z
    .number()
    .nullable()
    .meta({ description: 'Over the launch point’s own land; null where the line never leaves it' }),
  firstLandKm: z
    .number()
    .nullable()
    .meta({ description: 'The first land after that; null where none was found within the range' }),
  firstLandName: z.string().nullable(),
  people: z.int().meta({ description: 'Of the listed settlements in the corridor' }),
  settlements: z.int(),
  settlementsWithoutFigure: z.int().meta({ description: 'Of these: their people are unknown, not none' }),
  spreadPeople: z.number().nullable(),
  unknownPeopleLandKm2: z.number().nullable(),
  excludedPeople: z.int().meta({ description: 'Of the settlements in the overflight exclusion zone' }),
  excludedSettlements: z.int(),
});
export type FanSpoke = z.infer<typeof FanSpoke>;

export const StudyFan = z
  .strictObject({
    siteId: z.uuid(),
    vehicleClass: VehicleClass,
    rangeKm: z.number(),
    spokes: z.array(FanSpoke).meta({ description: 'Every whole degree from 0 to 359' }),
    ...caveats,
  })
  .meta({ id: 'StudyFan', description: 'Screening only' });
export type StudyFan = z.infer<typeof StudyFan>;

const Place = {
  name: z.string(),
  countryCode: z.string(),
  people: z.int().meta({ description: '0 where the gazetteer has no figure: unknown, not none' }),
  latitudeDeg: LatitudeDeg,
  longitudeDeg: LongitudeDeg,
};

export const SettlementInside = z.strictObject({
  ...Place,
  downrangeKm: z.number(),
  crossrangeKm: z.number().meta({ description: 'Positive to the right of the flight line' }),
  excluded: z.boolean().meta({ description: 'In the overflight exclusion zone' }),
});
export type SettlementInside = z.infer<typeof SettlementInside>;

export const StudyCorridor = z
  .strictObject({
    siteId: z.uuid(),
    corridor: CorridorOutput,
    settlements: z
      .array(SettlementInside)
      .meta({ description: `Inside, most people first, at most ${MOST_SETTLEMENTS}` }),
    total: z.int(),
  })
  .meta({ id: 'StudyCorridor', description: 'Screening only' });
export type StudyCorridor = z.infer<typeof StudyCorridor>;

export const NearPlace = z.strictObject({ ...Place, distanceKm: z.number(), azimuthDeg: z.number() });
export type NearPlace = z.infer<typeof NearPlace>;

export const StudySurroundings = z
  .strictObject({
    siteId: z.uuid(),
    within: z.array(
      z.strictObject({
        radiusKm: z.number(),
        settlements: z.int(),
        settlementsWithoutFigure: z.int(),
        people: z.int(),
        spreadPeople: z.number().nullable(),
        unknownPeopleLandKm2: z.number().nullable(),
      }),
    ),
    nearest: z.array(z.strictObject({ leastPeople: z.int(), place: NearPlace.nullable() })),
    onLand: z.boolean(),
    coast: z
      .strictObject({ distanceKm: z.number(), latitudeDeg: LatitudeDeg, longitudeDeg: LongitudeDeg })
      .nullable(),
    places: z
      .array(NearPlace)
      .meta({ description: `Settlements within 100 km, nearest first, at most ${MOST_PLACES}` }),
    otherSites: z
      .array(
        z.strictObject({
          siteId: z.uuid(),
          code: z.string(),
          name: z.string(),
          distanceKm: z.number(),
          azimuthDeg: z.number(),
        }),
      )
      .meta({ description: `The study’s other sites, nearest first, at most ${MOST_OTHER_SITES}` }),
    ...caveats,
  })
  .meta({ id: 'StudySurroundings', description: 'Screening only' });
export type StudySurroundings = z.infer<typeof StudySurroundings>;
