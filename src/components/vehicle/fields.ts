import { VehicleInput } from '#contract/vehicle.ts';

type Typed = number | undefined;

export interface StageFields {
  dryKg: Typed;
  propellantKg: Typed;
  thrustVacKn: Typed;
  ispVacS: Typed;
  ispSeaLevelS: Typed;
}

/** The fields of a vehicle's form; what is typed and is no number stays as text until the schema refuses it. */
export interface VehicleFields {
  name: string;
  fairingKg: Typed;
  fairingLeavesAfterStage: number;
  reserveMps: Typed;
  lossesMps: { gravity: Typed; drag: Typed; steering: Typed };
  hasBoosters: boolean;
  boosters: StageFields & { count: Typed };
  stages: StageFields[];
}

export const blankStage = (): StageFields => ({
  dryKg: undefined,
  propellantKg: undefined,
  thrustVacKn: undefined,
  ispVacS: undefined,
  ispSeaLevelS: undefined,
});

const blankBoosters = () => ({ count: 2, ...blankStage() });

function stageFields(stage: VehicleInput['stages'][number]): StageFields {
  const { dryKg, propellantKg, thrustVacKn, ispVacS, ispSeaLevelS } = stage;
  return { dryKg, propellantKg, thrustVacKn, ispVacS, ispSeaLevelS };
}

/** A vehicle as its form's fields; a blank one, with two stages to fill in, where there is none yet. */
export function fieldsOf(vehicle: VehicleInput | null): VehicleFields {
  return {
    name: vehicle?.name ?? '',
    fairingKg: vehicle?.fairingKg ?? 0,
    fairingLeavesAfterStage: vehicle?.fairingLeavesAfterStage ?? 1,
    reserveMps: vehicle?.reserveMps ?? 0,
    lossesMps: vehicle
      ? { ...vehicle.lossesMps }
      : { gravity: undefined, drag: undefined, steering: undefined },
    hasBoosters: vehicle?.boosters !== undefined,
    boosters: vehicle?.boosters
      ? { count: vehicle.boosters.count, ...stageFields(vehicle.boosters) }
      : blankBoosters(),
    stages: vehicle ? vehicle.stages.map(stageFields) : [blankStage(), blankStage()],
  };
}

/**
 * Checks the whole form by the interface's schema. What a vehicle has beside these fields (its code, what a flown
 * ascent needs) stays as it was in `before`.
 */
export function readVehicle(fields: VehicleFields, before: VehicleInput | null) {
  const { hasBoosters, boosters, name, ...rest } = fields;
  const { boosters: boostersBefore, ...kept } = before ?? {};
  return VehicleInput.safeParse({
    ...kept,
    ...rest,
    name: name.trim() || undefined,
    boosters: hasBoosters ? { ...boosters, referenceAreaM2: boostersBefore?.referenceAreaM2 } : undefined,
  });
}
