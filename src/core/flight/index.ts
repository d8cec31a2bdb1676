/**
 * Flight mechanics in closed form: what a launch site gives a target orbit. Pure, SI throughout.
 *
 * - `evaluateFlight(site, orbit, vehicle | null, settings): Flight`: one result with the ways not taken.
 * - `evaluateFlights(sites, orbits, vehicle | null, settings): FlightTable`: many, the way flown alone;
 *   `table.flight(site, orbit)` reads one.
 * - `padOf(site)`, `targetOf(orbit)`, `new PayloadSolver(vehicle)` prepare what many results share;
 *   `flightOf` and `tableOf` take them prepared.
 * - `payloadPerYear(flights, orbits)`: the launch manifest of one site.
 *
 * A `Flight` is a union by `kind`: direct, plane-change or dogleg with azimuths, speeds, budget and payload, or
 * out-of-reach with the nearest inclination. Contract to SI and back: src/contract/flight-mapping.ts.
 */
export { evaluateFlight, flightOf } from './evaluate.ts';
export { evaluateFlights, FlightTable, tableOf } from './flight-table.ts';
export { targetOf } from './injection.ts';
export { carriedBy, payloadPerYear } from './manifest.ts';
export { padOf } from './pad.ts';
export { payloadFor, PayloadSolver } from './payload.ts';
export type * from './types.ts';
