import type { AscentVehicle as CoreVehicle } from '#core/flight/ascent/vehicle-stack.ts';
import type { AscentVehicle } from './ascent.ts';
import { toVehicle } from './to-core.ts';

/** ½ρv³ in W/m² at which a fairing may leave; common practice, no source. */
const FAIRING_HEATING = 1135;

/** A vehicle with what a flown ascent needs, in SI. */
export function toAscentVehicle(vehicle: AscentVehicle): CoreVehicle {
  const { ascent, boosters } = vehicle;
  const { dragCoefficient: drag } = ascent;
  return {
    ...toVehicle(vehicle),
    ascent: {
      area: ascent.referenceAreaM2,
      boosterArea: boosters?.referenceAreaM2 ?? 0,
      drag: typeof drag === 'number' ? [[0, drag]] : drag,
      verticalRise: ascent.verticalRiseS,
      kick: ascent.kickS,
      dynamicPressureLimit: ascent.maxDynamicPressurePa ?? Infinity,
      accelerationLimit: ascent.maxAxialAccelerationMps2 ?? Infinity,
      fairingHeating: ascent.fairingLeavesByHeating === true ? FAIRING_HEATING : 0,
    },
  };
}
