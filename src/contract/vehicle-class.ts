import { classOfVehicle } from '#core/downrange/class-of-vehicle.ts';
import { VEHICLE_CLASSES, type VehicleClass } from '#core/downrange/vehicle-class.ts';
import type { StudyInputs } from './study-inputs.ts';
import { toVehicle } from './to-core.ts';

/** A vehicle's class by both columns of the regulation's table. */
export interface TableClass {
  /** The larger of the two, whose zone and near corridor are the wider; null where the vehicle reaches neither orbit. */
  readonly vehicleClass: VehicleClass | null;
  readonly columns: readonly {
    readonly inclinationDeg: 28 | 90;
    /** Null where it falls short. */
    readonly payloadKg: number | null;
    readonly vehicleClass: VehicleClass | null;
  }[];
}

/**
 * The class of a study's vehicle, by its payload to 100 nautical miles circular at 28° and at 90° (14 CFR 420.19,
 * table 1).
 * @returns null where the study has no vehicle
 */
export function classOfStudyVehicle({
  vehicle,
  settings,
}: Pick<StudyInputs, 'vehicle' | 'settings'>): TableClass | null {
  if (!vehicle) return null;
  const core = toVehicle(vehicle);
  const columns = ([28, 90] as const).map((inclinationDeg) => {
    const found = classOfVehicle(core, settings, inclinationDeg);
    return found.kind === 'class'
      ? { inclinationDeg, payloadKg: found.payload as number, vehicleClass: found.vehicleClass }
      : { inclinationDeg, payloadKg: null, vehicleClass: null };
  });
  const largest = VEHICLE_CLASSES.findLast((name) =>
    columns.some(({ vehicleClass }) => vehicleClass === name),
  );
  return { vehicleClass: largest ?? null, columns };
}
