/**
 * Downrange: what lies under a launch from a site, by the published corridor method of 14 CFR part 420. Screening
 * only. Pure; land and settlements are handed in.
 *
 * - `worldOf(decodeLand(bytes), decodeSettlements(bytes)): World`: prepared once.
 * - `corridorOf(start, azimuthDeg, vehicleClass, range): Corridor`, `surveyCorridor(world, corridor, settings)`:
 *   land, people and casualty expectation of one corridor and its overflight exclusion zone.
 * - `drawCorridor(corridor): Drawing`: its rings and lines for a map.
 * - `azimuthFan(world, start, vehicleClass, range, placeDensity): Spoke[]`, then `openSectors(fan, limits)` and
 *   `inclinationsOpened(pad, sectors, injectionSpeed)`.
 * - `surroundingsOf(world, place, placeDensity)`: people near a site, nearest settlements and coast.
 * - `attributions`, `cautions`, `REGULATION`: named and shown wherever figures from here are.
 *
 * Places and azimuths are in degrees here (see geodesic.ts), everything else is SI.
 */
export { attributions } from './attributions.ts';
export type { Attribution } from './attributions.ts';
export { EXPECTATION_LIMIT, REMEMBERED_CASUALTY_AREAS, VERIFY_CASUALTY_AREAS } from './casualty.ts';
export type { CasualtyAreas } from './casualty.ts';
export { REGULATION, cautions } from './cautions.ts';
export { classOfVehicle } from './class-of-vehicle.ts';
export type { ClassOfVehicle } from './class-of-vehicle.ts';
export { corridorOf } from './corridor.ts';
export type { Corridor, Position } from './corridor.ts';
export { decodeLand } from './data/land-data.ts';
export { decodeSettlements } from './data/settlement-data.ts';
export { drawCorridor } from './drawing.ts';
export type { Drawing } from './drawing.ts';
export { AZIMUTHS, azimuthFan } from './fan.ts';
export type { Spoke } from './fan.ts';
export { between } from './geodesic.ts';
export type { Place } from './geodesic.ts';
export { FAILURE_PROBABILITY } from './impact-probability.ts';
export { inclinationsOpened, keepsWithin, openSectors, openWidth } from './open-sectors.ts';
export type { FanLimits, OpenInclinations, OpenSector } from './open-sectors.ts';
export { PLACE_DENSITY_PER_KM2 } from './spread.ts';
export { surroundingsOf } from './surroundings.ts';
export type { Surroundings } from './surroundings.ts';
export { surveyCorridor } from './survey.ts';
export type { AreaSurvey, CasualtyExpectation, CorridorSurvey, SurveySettings } from './survey.ts';
export { NAUTICAL_MILE, VEHICLE_CLASSES, classOfPayload, payloadLimit } from './vehicle-class.ts';
export type { ClassColumn, VehicleClass } from './vehicle-class.ts';
export { worldOf } from './world.ts';
export type { World } from './world.ts';
