import { LatitudeDeg, LongitudeDeg } from './geography.ts';
import { z } from './zod.ts';

/** POST /api/v1/impact-point: a state over the turning Earth. */
export const ImpactPointInput = z
  .strictObject({
    latitudeDeg: LatitudeDeg,
    longitudeDeg: LongitudeDeg,
    altitudeM: z
      .number()
      .min(-20_000, 'An altitude lies between −20,000 m and 1,000,000,000 m.')
      .max(1e9, 'An altitude lies between −20,000 m and 1,000,000,000 m.')
      .meta({ description: 'Above the WGS 84 ellipsoid' }),
    relativeSpeedMps: z
      .number()
      .min(0, 'A speed is 0 or more.')
      .max(100_000, 'A speed is 100,000 m/s at most.')
      .meta({ description: 'Relative to the turning Earth' }),
    flightPathDeg: z
      .number()
      .min(-90, 'A flight-path angle lies between −90° and 90°.')
      .max(90, 'A flight-path angle lies between −90° and 90°.')
      .meta({ description: 'Above the local horizontal' }),
    headingDeg: z
      .number()
      .min(0, 'A heading lies between 0° and 360°.')
      .max(360, 'A heading lies between 0° and 360°.')
      .meta({ description: 'Clockwise from north' }),
  })
  .meta({ id: 'ImpactPointInput' });
export type ImpactPointInput = z.infer<typeof ImpactPointInput>;

/** Where a state would come down if thrust ended; without air, the Earth turning beneath. */
export const ImpactPoint = z
  .discriminatedUnion('kind', [
    z.strictObject({
      kind: z.literal('impact'),
      latitudeDeg: z.number(),
      longitudeDeg: z.number(),
      timeS: z.number(),
    }),
    z.strictObject({ kind: z.enum(['orbit', 'escape', 'none']) }),
  ])
  .meta({
    id: 'ImpactPoint',
    description: 'On the ellipsoid; orbit or escape where the arc does not come down, none below the surface',
  });
export type ImpactPoint = z.infer<typeof ImpactPoint>;
