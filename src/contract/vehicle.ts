import { z } from './zod.ts';

const DryKg = z.number().positive('A dry mass is above zero.').max(1e7).meta({ description: 'Dry mass' });
const PropellantKg = z.number().positive('A propellant mass is above zero.').max(1e8).meta({
  description: 'Propellant mass',
});
const ThrustVacKn = z.number().positive('A thrust is above zero.').max(1e6).meta({
  description: 'Thrust in vacuum',
});
const IspS = z
  .number()
  .positive('A specific impulse is above zero.')
  .max(2000, 'A specific impulse is 2,000 s at most.');

const engineFields = {
  dryKg: DryKg,
  propellantKg: PropellantKg,
  thrustVacKn: ThrustVacKn,
  ispVacS: IspS.meta({ description: 'Specific impulse in vacuum' }),
  ispSeaLevelS: IspS.optional().meta({ description: 'Specific impulse at sea level' }),
};

interface Impulses {
  ispVacS: number;
  ispSeaLevelS?: number | undefined;
}

/** At sea level the ambient pressure takes from the thrust, so the impulse there is the lower one. */
const impulsesFit = ({ ispVacS, ispSeaLevelS }: Impulses): boolean =>
  ispSeaLevelS === undefined || ispSeaLevelS <= ispVacS;
const impulses = {
  path: ['ispSeaLevelS'],
  error: 'The sea-level specific impulse is no higher than the vacuum one.',
};

export const StageInput = z.strictObject(engineFields).refine(impulsesFit, impulses).meta({ id: 'Stage' });
export type StageInput = z.infer<typeof StageInput>;

/** Parallel boosters: they burn together with the first stage. Masses and thrust are for one booster. */
export const BoostersInput = z
  .strictObject({
    count: z.int().min(0).max(16).meta({ description: 'Number of boosters; 0 flies without' }),
    ...engineFields,
    referenceAreaM2: z.number().positive().optional().meta({
      description: 'Kept for the flown ascent; the closed form does not use it',
    }),
  })
  .refine(impulsesFit, impulses)
  .meta({ id: 'Boosters', description: 'Masses and thrust are for one booster' });
export type BoostersInput = z.infer<typeof BoostersInput>;

const LossMps = z.number().min(0, 'A loss is 0 or more.').max(10_000);

export const LossesInput = z
  .strictObject({ gravity: LossMps, drag: LossMps, steering: LossMps })
  .meta({ id: 'Losses', description: 'Entered losses in m/s, to burn-out near the parking altitude' });
export type LossesInput = z.infer<typeof LossesInput>;

/**
 * Usual ranges of entered losses, shown as guidance beside the fields and never enforced: published budgets of flown
 * launchers, from lift-off to low orbit. Drag reaches some 400 m/s on small vehicles.
 */
export const lossGuidanceMps = {
  gravity: [1150, 1600],
  drag: [40, 160],
  steering: [30, 360],
} as const satisfies Record<keyof LossesInput, readonly [number, number]>;

/** Burn times share the factor g₀, so the comparison needs none: propellant × impulse / thrust. */
function boostersOutlastCore(boosters: BoostersInput | undefined, core: StageInput | undefined): boolean {
  if (boosters === undefined || boosters.count === 0 || core === undefined) return false;
  const boosterTime = (boosters.propellantKg * boosters.ispVacS) / boosters.thrustVacKn;
  const coreTime = (core.propellantKg * core.ispVacS) / core.thrustVacKn;
  return boosterTime > coreTime * (1 + 1e-12);
}

interface VehicleRules {
  boosters?: BoostersInput | undefined;
  stages: StageInput[];
  fairingLeavesAfterStage: number;
}

/** The fields of a vehicle, before the rules between them. */
export const vehicleFields = {
  code: z.string().max(40).optional(),
  name: z.string().max(120).optional(),
  fairingKg: z.number().min(0, 'A fairing’s mass is 0 or more.').max(1e6).default(0),
  fairingLeavesAfterStage: z
    .int()
    .min(1, 'Stages count from 1.')
    .default(1)
    .meta({ description: 'The fairing leaves at the end of this stage’s burn; 1 is the first stage' }),
  reserveMps: z.number().min(0, 'A reserve is 0 or more.').max(10_000).default(0),
  lossesMps: LossesInput,
  boosters: BoostersInput.optional(),
  stages: z.array(StageInput).min(1, 'A vehicle has a stage.').max(8, 'A vehicle has 8 stages at most.'),
  referenceAreaM2: z.number().positive().optional(),
  ascent: z.record(z.string(), z.unknown()).optional().meta({
    description: 'Kept for the flown ascent; the closed form does not use it',
  }),
};

/** The rules between a vehicle's fields. */
export function checkVehicle(ctx: z.core.ParsePayload<VehicleRules>): void {
  const { boosters, stages, fairingLeavesAfterStage } = ctx.value;
  if (boostersOutlastCore(boosters, stages[0])) {
    ctx.issues.push({
      code: 'custom',
      input: ctx.value,
      path: ['boosters'],
      message: 'The boosters burn longer than the first stage they burn beside.',
    });
  }
  if (fairingLeavesAfterStage > stages.length) {
    ctx.issues.push({
      code: 'custom',
      input: ctx.value,
      path: ['fairingLeavesAfterStage'],
      message: 'The fairing leaves after a stage that the vehicle does not have.',
    });
  }
}

/** A vehicle as it is posted or kept in the library. `code`, `ascent` and `referenceAreaM2` are not used here. */
export const VehicleInput = z
  .strictObject(vehicleFields)
  .check(checkVehicle)
  .meta({ id: 'Vehicle', description: 'A launch vehicle with its losses and reserve' });
export type VehicleInput = z.infer<typeof VehicleInput>;
