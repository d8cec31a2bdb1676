// By their own files: the index would bring the geometry and its libraries to everyone who only checks a request.
import { VERIFY_CASUALTY_AREAS } from '#core/downrange/casualty.ts';
import { PLACE_DENSITY_PER_KM2 } from '#core/downrange/spread.ts';
import { VEHICLE_CLASSES } from '#core/downrange/vehicle-class.ts';
import { AzimuthDeg, LatitudeDeg, LongitudeDeg } from './geography.ts';
import { z } from './zod.ts';

/** Corridors run from here to 5,000 nautical miles: any exclusion zone ends before. */
const SHORTEST_NM = 20;
const LONGEST_NM = 5000;
const between = (least: number, most: number, what: string) =>
  z
    .number()
    .min(least, `${what} lies between ${least} and ${most}.`)
    .max(most, `${what} lies between ${least} and ${most}.`);

export const VehicleClass = z.enum(VEHICLE_CLASSES).meta({
  description: 'By payload to 100 nautical miles, 14 CFR 420.19 table 1',
});

/** Casualty areas that a corridor's expectation is worked with, near, middle and far. */
export const CasualtyAreasMi2 = z
  .array(z.number().positive('An area is above 0.').max(100, 'An area is at most 100 square miles.'))
  .length(3, 'Three areas are needed: below 50 nautical miles, below 1,750, and from there on.')
  .meta({
    description: `Effective casualty areas below 50 nm, below 1,750 nm and from there on, square statute miles. The defaults of table C-3 are from memory: ${VERIFY_CASUALTY_AREAS}`,
  });

export const CorridorInput = z
  .strictObject({
    latitudeDeg: LatitudeDeg,
    longitudeDeg: LongitudeDeg,
    azimuthDeg: AzimuthDeg,
    vehicleClass: VehicleClass,
    rangeNm: between(SHORTEST_NM, LONGEST_NM, 'A range').default(LONGEST_NM),
    settings: z
      .strictObject({
        spreadPeople: z.boolean().default(true).meta({
          description:
            'Spread each country’s people beyond the listed settlements evenly over its land: an assumption',
        }),
        placeDensityPerKm2: between(1, 100_000, 'A density').default(PLACE_DENSITY_PER_KM2).meta({
          description: 'People to the square kilometre within a settlement: its area is its people over this',
        }),
        casualtyAreasMi2: CasualtyAreasMi2.optional(),
      })
      .prefault({}),
  })
  .meta({
    id: 'CorridorInput',
    examples: [{ latitudeDeg: 7.42, longitudeDeg: -58.35, azimuthDeg: 20, vehicleClass: 'small' }],
  });
export type CorridorInput = z.infer<typeof CorridorInput>;

const LongLat = z.array(z.number()).length(2);
const Ring = z.array(LongLat);
const Geometry = z.union([
  z.strictObject({ type: z.literal('Polygon'), coordinates: z.array(Ring) }),
  z.strictObject({ type: z.literal('MultiPolygon'), coordinates: z.array(z.array(Ring)) }),
]);

/** What every area of a corridor says of itself. Nothing found is nothing found at the data's resolution. */
const area = {
  landKm2: z.number(),
  lands: z.array(z.strictObject({ code: z.string(), name: z.string(), landKm2: z.number() })),
  firstLandKm: z.number().nullable().meta({
    description:
      'Along the flight line: the first land after the launch point’s own; null where none was found',
  }),
  settlements: z.int().meta({ description: 'Listed settlements whose point lies inside' }),
  settlementsWithoutFigure: z
    .int()
    .meta({ description: 'Of these, without a figure of people: unknown, not none' }),
  people: z.int().meta({ description: 'Of the listed settlements alone' }),
  spreadPeople: z.number().nullable().meta({
    description: 'Spread over the land beyond the listed settlements, an assumption; null where switched off',
  }),
  unknownPeopleLandKm2: z.number().nullable().meta({
    description:
      'Land of countries without a known total: its people beyond the listed settlements are unknown',
  }),
};

const Settlement = z.strictObject({
  name: z.string(),
  countryCode: z.string(),
  people: z.int(),
  latitudeDeg: z.number(),
  longitudeDeg: z.number(),
  downrangeKm: z.number(),
  crossrangeKm: z.number().meta({ description: 'Positive to the right of the flight line' }),
});

const Expectation = z
  .strictObject({
    settlements: z.number(),
    spreadPeople: z.number().nullable(),
    total: z.number(),
    complete: z.boolean().meta({ description: 'False where people are unknown: the figures are least ones' }),
    greatest: z.strictObject({ name: z.string(), expectation: z.number() }).nullable(),
    compareWith: z.number().meta({ description: 'The figure of 14 CFR 420.25' }),
    failureProbability: z.number(),
    casualtyAreasMi2: CasualtyAreasMi2,
    casualtyAreasNote: z.string().meta({ description: 'Whether the areas are the request’s or remembered' }),
  })
  .meta({ description: 'Indicative, by the formula of 14 CFR part 420 appendix C with the inputs shown' });

const Zone = z.strictObject({
  kind: z.literal('exclusion-zone'),
  areaKm2: z.number().meta({ description: 'Of the published shape' }),
  ...area,
});
const Corridor = z.strictObject({
  kind: z.literal('corridor'),
  azimuthDeg: z.number(),
  vehicleClass: VehicleClass,
  rangeNm: z.number(),
  ...area,
  firstLandName: z.string().nullable(),
  coastKm: z.number().nullable().meta({
    description:
      'Along the flight line over the launch point’s own land; null where the line never leaves it',
  }),
  overland: z
    .array(z.strictObject({ fromKm: z.number(), toKm: z.number(), code: z.string(), name: z.string() }))
    .meta({ description: 'Stretches of the flight line over land' }),
  largestSettlements: z.array(Settlement).meta({ description: 'The most populous, at most 20' }),
  casualtyExpectation: Expectation,
});

const feature = <T extends z.ZodType>(properties: T) =>
  z.strictObject({ type: z.literal('Feature'), geometry: Geometry, properties });

export const CorridorOutput = z
  .strictObject({
    type: z.literal('FeatureCollection'),
    features: z.tuple([feature(Zone), feature(Corridor)]),
    regulation: z.string(),
    cautions: z.array(z.string()),
    attributions: z.array(z.string()),
  })
  .meta({
    id: 'CorridorOutput',
    description:
      'RFC 7946: the overflight exclusion zone and the corridor, cut at the antimeridian. Screening only',
  });
export type CorridorOutput = z.infer<typeof CorridorOutput>;
