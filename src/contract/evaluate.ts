import { ElevationM, LatitudeDeg, LongitudeDeg, PermittedAzimuthsDeg } from './geography.ts';
import { checkOrbit, targetOrbitFields } from './orbit.ts';
import { VehicleInput } from './vehicle.ts';
import { z } from './zod.ts';

export const MAX_RESULTS = 20_000;
export const MAX_RESULTS_WITHOUT_OTHERS = 100_000;
export const DEFAULT_TURN_SPEED_FRACTION = 0.6;

const Code = z.string().min(1).max(40).meta({ description: '1 to 40 characters, unique in its list' });

export const EvaluateSite = z
  .strictObject({
    code: Code,
    name: z.string().max(120).optional(),
    latitudeDeg: LatitudeDeg,
    longitudeDeg: LongitudeDeg,
    elevationM: ElevationM.default(0),
    permittedAzimuthsDeg: PermittedAzimuthsDeg.default([]),
  })
  .meta({ id: 'EvaluateSite' });
export type EvaluateSite = z.infer<typeof EvaluateSite>;

export const EvaluateOrbit = z
  .strictObject({ code: Code, ...targetOrbitFields })
  .check(checkOrbit)
  .meta({ id: 'EvaluateOrbit' });
export type EvaluateOrbit = z.infer<typeof EvaluateOrbit>;

export const FlightSettings = z
  .strictObject({
    turnSpeedFraction: z
      .number()
      .min(0, 'The fraction lies between 0 and 1.')
      .max(1, 'The fraction lies between 0 and 1.')
      .default(DEFAULT_TURN_SPEED_FRACTION)
      .meta({ description: 'Share of the injection speed flown by the time of a dogleg, up to 7° of arc' }),
  })
  .meta({ id: 'FlightSettings' });
export type FlightSettings = z.infer<typeof FlightSettings>;

function repeatedAt(list: readonly { code: string }[]): number {
  const seen = new Set<string>();
  return list.findIndex(({ code }) => seen.size === seen.add(code).size);
}

function checkRequest(ctx: z.core.ParsePayload<z.infer<typeof evaluateObject>>): void {
  const { sites, orbits, others } = ctx.value;
  const complain = (path: PropertyKey[], message: string) =>
    ctx.issues.push({ code: 'custom', input: ctx.value, path, message });
  for (const [key, list] of [
    ['sites', sites],
    ['orbits', orbits],
  ] as const) {
    const index = repeatedAt(list);
    if (index >= 0) complain([key, index, 'code'], 'A code appears once in its list.');
  }
  const limit = others ? MAX_RESULTS : MAX_RESULTS_WITHOUT_OTHERS;
  if (sites.length * orbits.length > limit) {
    complain(
      ['sites'],
      `A call gives up to ${MAX_RESULTS.toLocaleString('en')} results, or ${MAX_RESULTS_WITHOUT_OTHERS.toLocaleString('en')} with "others": false.`,
    );
  }
}

const evaluateObject = z.strictObject({
  sites: z.array(EvaluateSite).min(1, 'A site is needed.').max(MAX_RESULTS_WITHOUT_OTHERS),
  orbits: z.array(EvaluateOrbit).min(1, 'A target orbit is needed.').max(MAX_RESULTS_WITHOUT_OTHERS),
  vehicle: VehicleInput.optional(),
  settings: FlightSettings.default({ turnSpeedFraction: DEFAULT_TURN_SPEED_FRACTION }),
  others: z.boolean().default(true).meta({ description: 'false leaves out the ways not taken' }),
});

/** POST /api/v1/evaluate: sites, orbits and a vehicle in. */
export const EvaluateInput = evaluateObject.check(checkRequest).meta({ id: 'EvaluateInput' });
export type EvaluateInput = z.infer<typeof EvaluateInput>;

const FlownWayName = z.enum(['direct', 'plane-change', 'dogleg']);
const Branch = z.enum(['northerly', 'southerly']);
const Profile = z.enum(['direct', 'parking']);

const deltaVOf = <T extends z.ZodType>(line: T) =>
  z.strictObject({
    required: line,
    losses: line,
    dogleg: line,
    planeChange: line,
    transfer: line,
    reserve: line,
    total: line,
  });

const wayFields = {
  branch: Branch,
  profile: Profile,
  injectionSpeedMps: z.number(),
  inertialAzimuthDeg: z.number(),
  launchAzimuthDeg: z.number(),
  requiredSpeedMps: z.number(),
  rotationGainMps: z.number(),
  turnDeg: z.number(),
  planeChangeDeg: z.number(),
  deltaVMps: deltaVOf(z.number()),
  payloadKg: z.number().nullable(),
  shortfallMps: z.number().nullable(),
};

/** One way to fly a target orbit from a site. */
export const FlownWay = z.strictObject({ way: FlownWayName, ...wayFields }).meta({ id: 'FlownWay' });
export type FlownWay = z.infer<typeof FlownWay>;

const orbitHead = { code: z.string(), inclinationDeg: z.number() };

/** The way flown, with the ways not taken, cheapest first. */
export const FlownOrbit = z
  .strictObject({ ...orbitHead, way: FlownWayName, ...wayFields, others: z.array(FlownWay) })
  .meta({ id: 'FlownOrbit' });
export type FlownOrbit = z.infer<typeof FlownOrbit>;

/** No way is flown: every figure but the inclination is null. */
export const OutOfReachOrbit = z
  .strictObject({
    ...orbitHead,
    way: z.literal('out-of-reach'),
    branch: z.null(),
    profile: z.null(),
    injectionSpeedMps: z.null(),
    inertialAzimuthDeg: z.null(),
    launchAzimuthDeg: z.null(),
    requiredSpeedMps: z.null(),
    rotationGainMps: z.null(),
    turnDeg: z.null(),
    planeChangeDeg: z.null(),
    deltaVMps: deltaVOf(z.null()),
    payloadKg: z.null(),
    shortfallMps: z.null(),
    others: z.array(FlownWay).max(0),
  })
  .meta({ id: 'OutOfReachOrbit' });
export type OutOfReachOrbit = z.infer<typeof OutOfReachOrbit>;

export const OrbitResult = z.union([FlownOrbit, OutOfReachOrbit]).meta({ id: 'OrbitResult' });
export type OrbitResult = z.infer<typeof OrbitResult>;

export const SiteResult = z
  .strictObject({
    code: z.string(),
    rotationSpeedMps: z.number(),
    geocentricLatitudeDeg: z.number(),
    payloadPerYearKg: z.number().nullable(),
    orbits: z.array(OrbitResult),
  })
  .meta({ id: 'SiteResult' });
export type SiteResult = z.infer<typeof SiteResult>;

/** The answer of an evaluation: a result for each site and orbit, in the order asked. */
export const EvaluateOutput = z.strictObject({ sites: z.array(SiteResult) }).meta({ id: 'EvaluateOutput' });
export type EvaluateOutput = z.infer<typeof EvaluateOutput>;
