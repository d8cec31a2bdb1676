import { AscentVehicle } from '#contract/ascent.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { MAX_STUDY_ASCENTS, type AscentsScope } from '#contract/study-ascents.ts';
import { AppError } from '#server/errors.ts';
import { pairTasks, type PairTask } from './input-hash.ts';

/** Why a study has no flown ascents to ask for, if so. */
export function obstacleOf({ vehicle, sites, orbits }: StudyInputs): string | null {
  if (!vehicle) return 'The study has no vehicle yet.';
  if (!vehicle.ascent)
    return 'The vehicle says nothing of its drag and steering, which a flown ascent needs.';
  const [misfit] = AscentVehicle.safeParse(vehicle).error?.issues ?? [];
  if (misfit) return `The vehicle cannot be flown: ${misfit.path.join('.')}: ${misfit.message}`;
  if (sites.length === 0) return 'The study has no sites yet.';
  return orbits.length === 0 ? 'The manifest has no target orbits yet.' : null;
}

/** The part of a study's inputs that is about one site or one orbit. */
export const narrowed = (inputs: StudyInputs, { siteId, orbitId }: AscentsScope): StudyInputs => ({
  ...inputs,
  sites: siteId === undefined ? inputs.sites : inputs.sites.filter((site) => site.siteId === siteId),
  orbits: orbitId === undefined ? inputs.orbits : inputs.orbits.filter((orbit) => orbit.orbitId === orbitId),
});

/**
 * The flights of a study, or none where there is an obstacle. @throws AppError 'invalid' where they are too many to
 * list at a time
 */
export function studyTasks(inputs: StudyInputs): PairTask[] {
  if (inputs.sites.length * inputs.orbits.length > MAX_STUDY_ASCENTS)
    throw new AppError(
      'invalid',
      `Up to ${MAX_STUDY_ASCENTS.toLocaleString('en')} sites × orbits go at a time. Name an orbit.`,
    );
  return inputs.vehicle && obstacleOf(inputs) === null ? pairTasks(inputs, inputs.vehicle) : [];
}
