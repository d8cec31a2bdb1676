import { DEFAULT_TURN_SPEED_FRACTION } from './evaluate.ts';
import { ElevationM, LatitudeDeg, LongitudeDeg, PermittedAzimuthsDeg } from './geography.ts';
import { ImpactPoint } from './impact-point.ts';
import { checkOrbit, targetOrbitFields } from './orbit.ts';
import { checkVehicle, vehicleFields } from './vehicle.ts';
import { z } from './zod.ts';

/** Where the site's sectors are held against the heading flown, m/s over the turning Earth. */
export const DEFAULT_HEADING_SPEED_MPS = 500;

/** Drag coefficients by Mach number, rising; straight between, level beyond the ends. */
const DragTable = z
  .array(z.tuple([z.number().min(0).max(50), z.number().min(0).max(10)]))
  .min(1, 'A drag table has a row.')
  .max(60, 'A drag table has 60 rows at most.')
  .refine((rows) => rows.every(([mach], k) => k === 0 || mach > (rows[k - 1] as [number, number])[0]), {
    error: 'The Mach numbers of a drag table rise.',
  });

/** What a flown ascent needs of a vehicle beside what the closed form does. */
export const AscentFields = z
  .strictObject({
    referenceAreaM2: z.number().positive('A reference area is above zero.').max(10_000).meta({
      description: 'Of the core and what it carries; boosters have their own',
    }),
    dragCoefficient: z
      .union([z.number().min(0).max(10), DragTable])
      .meta({ description: 'A number, or rows of [Mach number, coefficient]' }),
    verticalRiseS: z
      .number()
      .min(0, 'A rise takes 0 s or more.')
      .max(60, 'A vertical rise takes 60 s at most.'),
    kickS: z.number().min(1, 'A kick takes 1 s or more.').max(60, 'A kick takes 60 s at most.'),
    maxDynamicPressurePa: z.number().min(1000, 'A limit of 1,000 Pa or more.').optional().meta({
      description: 'Held by throttling core and upper stages',
    }),
    maxAxialAccelerationMps2: z.number().min(12, 'A limit of 12 m/s² or more.').optional().meta({
      description: 'Thrust in vacuum over mass; held by throttling core and upper stages',
    }),
    fairingLeavesByHeating: z.boolean().optional().meta({
      description:
        'The fairing leaves when free-molecular heating ½ρv³ falls below 1,135 W/m², not with its stage',
    }),
  })
  .meta({ id: 'AscentFields' });
export type AscentFields = z.infer<typeof AscentFields>;

/** A vehicle that can be flown. */
export const AscentVehicle = z
  .strictObject({ ...vehicleFields, ascent: AscentFields })
  .check(checkVehicle)
  .check((ctx) => {
    const { boosters } = ctx.value;
    if (boosters === undefined || boosters.count === 0 || boosters.referenceAreaM2 !== undefined) return;
    ctx.issues.push({
      code: 'custom',
      input: ctx.value,
      path: ['boosters', 'referenceAreaM2'],
      message: 'A booster’s reference area is needed to fly it.',
    });
  })
  .meta({ id: 'AscentVehicle', description: 'A launch vehicle with what a flown ascent needs' });
export type AscentVehicle = z.infer<typeof AscentVehicle>;

const AscentSite = z.strictObject({
  code: z.string().max(40).optional(),
  name: z.string().max(120).optional(),
  latitudeDeg: LatitudeDeg,
  longitudeDeg: LongitudeDeg,
  elevationM: ElevationM.default(0),
  permittedAzimuthsDeg: PermittedAzimuthsDeg.default([]),
});

const AscentOrbit = z
  .strictObject({ code: z.string().max(40).optional(), ...targetOrbitFields })
  .check(checkOrbit);

export const AscentSettings = z
  .strictObject({
    headingSpeedMps: z
      .number()
      .min(50, 'The heading is checked between 50 and 3,000 m/s.')
      .max(3000, 'The heading is checked between 50 and 3,000 m/s.')
      .default(DEFAULT_HEADING_SPEED_MPS)
      .meta({ description: 'Earth-relative speed at which the heading is held against the sectors' }),
    turnSpeedFraction: z.number().min(0).max(1).default(DEFAULT_TURN_SPEED_FRACTION),
  })
  .meta({ id: 'AscentSettings' });

/** POST /api/v1/ascents: one site, one orbit, one vehicle. */
export const AscentInput = z
  .strictObject({
    site: AscentSite,
    orbit: AscentOrbit,
    vehicle: AscentVehicle,
    settings: AscentSettings.default({
      headingSpeedMps: DEFAULT_HEADING_SPEED_MPS,
      turnSpeedFraction: DEFAULT_TURN_SPEED_FRACTION,
    }),
  })
  .meta({ id: 'AscentInput' });
export type AscentInput = z.infer<typeof AscentInput>;

export const TrajectoryPoint = z
  .strictObject({
    timeS: z.number(),
    latitudeDeg: z.number(),
    longitudeDeg: z.number(),
    altitudeM: z.number(),
    relativeSpeedMps: z.number(),
    flightPathDeg: z.number(),
    headingDeg: z.number(),
    massKg: z.number(),
    dynamicPressurePa: z.number(),
    accelerationMps2: z.number(),
    impact: ImpactPoint,
  })
  .meta({ id: 'TrajectoryPoint', description: 'Speeds, angles and impacts are seen from the turning Earth' });
export type TrajectoryPoint = z.infer<typeof TrajectoryPoint>;

/** Why there is no flown ascent. */
export const NoAscentReason = z
  .enum([
    'out-of-reach',
    'does-not-lift-off',
    'too-much-after-injection',
    'falls-short',
    'no-permitted-heading',
    'did-not-converge',
  ])
  .meta({
    id: 'NoAscentReason',
    description:
      'out-of-reach: no turn of 60° or less leads there. does-not-lift-off: thrust on the pad is no more than the weight. too-much-after-injection: the upper stages hold less than what is burnt after injection. falls-short: even without payload. no-permitted-heading: the heading flown leaves the sectors. did-not-converge: the search ended without meeting the end conditions',
  });
export type NoAscentReason = z.infer<typeof NoAscentReason>;

export const ConvergedAscent = z
  .strictObject({
    converged: z.literal(true),
    reason: z.null(),
    payloadKg: z.number().meta({
      description: 'What is left at injection just covers transfer, plane change and reserve',
    }),
    flownInclinationDeg: z.number(),
    burnOutS: z.number(),
    launchHeadingDeg: z.number().meta({ description: 'Flown at the speed the sectors are checked at' }),
    maxDynamicPressurePa: z.number().meta({
      description: 'Above the limit only where what does not throttle, the boosters, exceeds it alone',
    }),
    idealDeltaVMps: z.number().meta({
      description:
        'Vacuum specific impulse: relative speed + gravity + drag + steering + back-pressure − centrifugal',
    }),
    relativeSpeedMps: z.number().meta({ description: 'At burn-out, relative to the turning Earth' }),
    centrifugalMps: z.number(),
    lossesMps: z.strictObject({
      gravity: z.number(),
      drag: z.number(),
      steering: z.number(),
      backPressure: z.number(),
    }),
    remainderMps: z.number().meta({
      description:
        'Relative speed at burn-out less the required speed of the closed form for the plane flown',
    }),
    trajectory: z.array(TrajectoryPoint),
  })
  .meta({ id: 'ConvergedAscent' });

export const NoAscent = z
  .strictObject({
    converged: z.literal(false),
    reason: NoAscentReason,
    payloadKg: z.null(),
    flownInclinationDeg: z.null(),
    burnOutS: z.null(),
    launchHeadingDeg: z.null(),
    maxDynamicPressurePa: z.null(),
    idealDeltaVMps: z.null(),
    relativeSpeedMps: z.null(),
    centrifugalMps: z.null(),
    lossesMps: z.null(),
    remainderMps: z.null(),
    trajectory: z.array(TrajectoryPoint).max(0),
  })
  .meta({ id: 'NoAscent' });

/** The answer: an ascent that met its end conditions, or none and why; never a figure that did not converge. */
export const AscentOutput = z
  .discriminatedUnion('converged', [ConvergedAscent, NoAscent])
  .meta({ id: 'AscentOutput' });
export type AscentOutput = z.infer<typeof AscentOutput>;
