import { z } from './zod.ts';

/** Geodetic latitude, −90 to 90, north positive. */
export const LatitudeDeg = z
  .number()
  .min(-90, 'A latitude lies between −90° and 90°.')
  .max(90, 'A latitude lies between −90° and 90°.')
  .meta({ description: 'Geodetic latitude (WGS 84), north positive', examples: [7.42] });

/** Longitude, −180 to 180, east positive; −180 is kept as 180. */
export const LongitudeDeg = z
  .number()
  .min(-180, 'A longitude lies between −180° and 180°.')
  .max(180, 'A longitude lies between −180° and 180°.')
  .overwrite((longitude) => (longitude === -180 ? 180 : longitude))
  .meta({ description: 'Longitude (WGS 84), east positive; −180 is kept as 180', examples: [-58.35] });

/** Height above the ellipsoid. The bounds leave room for every place on land. */
export const ElevationM = z
  .number()
  .min(-500, 'An elevation lies between −500 m and 9,000 m.')
  .max(9000, 'An elevation lies between −500 m and 9,000 m.')
  .meta({ description: 'Height above the WGS 84 ellipsoid', examples: [6] });

/** Azimuth, clockwise from north, 0 to 360. */
export const AzimuthDeg = z
  .number()
  .min(0, 'An azimuth lies between 0° and 360°.')
  .max(360, 'An azimuth lies between 0° and 360°.')
  .meta({ description: 'Azimuth, clockwise from north' });

/** Whether a sector is all round, an arc, or (from = to modulo 360) none at all. */
function isSector([from, to]: readonly [number, number]): boolean {
  return (from === 0 && to === 360) || from % 360 !== to % 360;
}

/** A sector of permitted launch azimuths, clockwise from the first bound to the second; it may pass through north. */
export const AzimuthSectorDeg = z
  .tuple([AzimuthDeg, AzimuthDeg])
  .refine(isSector, { error: 'A sector’s two bounds differ; 0 to 360 is all round.' })
  .meta({ description: 'Clockwise from the first bound to the second; [0, 360] is all round' });

export const MAX_SECTORS = 12;

/** Up to 12 sectors; none means all round. */
export const PermittedAzimuthsDeg = z
  .array(AzimuthSectorDeg)
  .max(MAX_SECTORS, `A site has up to ${MAX_SECTORS} sectors.`)
  .meta({ description: 'Permitted launch azimuths; none given means all round', examples: [[[342, 95]]] });

export type AzimuthSectorDeg = z.infer<typeof AzimuthSectorDeg>;
