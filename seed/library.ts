import { VehicleInput } from '#contract/vehicle.ts';
import library from './vehicles.json' with { type: 'json' };

/** The vehicles that every installation's library begins with, invented, checked by the interface's schema. */
export const LIBRARY_VEHICLES = library.vehicles.map((entry) => ({
  code: entry.code,
  name: entry.name,
  spec: VehicleInput.parse(entry),
}));
