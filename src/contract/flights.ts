import { flightOf, padOf, payloadPerYear, PayloadSolver, tableOf, targetOf } from '#core/flight/index.ts';
import type { Flight, FlightSettings } from '#core/flight/index.ts';
import { toDegrees } from '#core/units.ts';
import type { EvaluateInput, EvaluateSite, SiteResult } from './evaluate.ts';
import { presentFlight } from './from-core.ts';
import type { FlightOrbit, FlightSite } from './to-core.ts';
import { inclinationOf, toOrbit, toSite, toVehicle } from './to-core.ts';
import type { VehicleInput } from './vehicle.ts';

/** What a set of flights shares: orbits, vehicle and settings. */
export interface FlightRequest {
  readonly orbits: readonly (FlightOrbit & { readonly code: string })[];
  readonly vehicle?: VehicleInput | null | undefined;
  readonly settings: FlightSettings;
  /** Whether the ways not taken are wanted. */
  readonly others: boolean;
}

type CodedSite = FlightSite & Pick<EvaluateSite, 'code'>;

/**
 * Flights of any sites for one set of orbits, as they cross the wire: the one place where the contract meets core, for
 * the server's threads and for the browser alike.
 * @returns a function of sites; call it with as many at a time as suits
 */
export function flightsFor(request: FlightRequest): (sites: readonly CodedSite[]) => SiteResult[] {
  const { settings, others } = request;
  const orbits = request.orbits.map(toOrbit);
  const targets = orbits.map(targetOf);
  const solver = request.vehicle ? new PayloadSolver(toVehicle(request.vehicle)) : null;
  const heads = request.orbits.map((orbit) => ({
    code: orbit.code,
    inclinationDeg: orbit.inclinationDeg ?? toDegrees(inclinationOf(orbit)),
  }));
  return (sites) => {
    const pads = sites.map((site) => padOf(toSite(site)));
    const table = others ? null : tableOf(pads, targets, solver, settings);
    return sites.map(({ code }, site) => {
      const pad = pads[site]!;
      const flights: Flight[] = targets.map((target, orbit) =>
        table === null ? flightOf(pad, target, solver, settings) : table.flight(site, orbit),
      );
      return {
        code,
        rotationSpeedMps: pad.rotationSpeed,
        geocentricLatitudeDeg: toDegrees(pad.geocentricLatitude),
        payloadPerYearKg: solver === null ? null : payloadPerYear(flights, orbits),
        orbits: heads.map((head, orbit) => presentFlight(head.code, head.inclinationDeg, flights[orbit]!)),
      };
    });
  };
}

/** A whole evaluation at once. */
export function evaluate(input: EvaluateInput): SiteResult[] {
  return flightsFor(input)(input.sites);
}

/** The sites of an evaluation as JSON text in bytes, without the brackets of the list, to be joined with other parts. */
export function evaluationPart(input: EvaluateInput): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(evaluate(input)).slice(1, -1));
}
