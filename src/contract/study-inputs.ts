import { EvaluateOrbit, EvaluateOutput, EvaluateSite, FlightSettings } from './evaluate.ts';
import { VehicleInput } from './vehicle.ts';
import { z } from './zod.ts';

const Id = z.uuid();

/** Everything a study's flight figures follow from, read at one moment: what evaluate takes, with the ids. */
export const StudyInputs = z
  .strictObject({
    revision: z.int(),
    sites: z.array(EvaluateSite.safeExtend({ siteId: Id, name: z.string() })),
    orbits: z.array(EvaluateOrbit.safeExtend({ orbitId: Id, name: z.string() })),
    vehicle: VehicleInput.nullable(),
    settings: FlightSettings,
  })
  .meta({ id: 'StudyInputs' });
export type StudyInputs = z.infer<typeof StudyInputs>;
export type InputSite = StudyInputs['sites'][number];
export type InputOrbit = StudyInputs['orbits'][number];

/** The answer of an evaluation for a study, with the revision of its inputs. */
export const StudyEvaluation = EvaluateOutput.extend({ revision: z.int() }).meta({ id: 'StudyEvaluation' });
