import type { CorridorInput } from '#contract/corridor.ts';
import type { StudyCorridor, StudyFan, StudySurroundings } from '#contract/downrange.ts';
import type { Place, VehicleClass } from '#core/downrange/index.ts';

/** A site to measure the distance to. */
export interface OtherSite extends Place {
  readonly siteId: string;
  readonly code: string;
  readonly name: string;
}

interface OfSite {
  readonly siteId: string;
  readonly start: Place;
  /** People to the square kilometre within a settlement; null switches spreading off. */
  readonly placeDensityPerKm2: number | null;
}

/** What the corridor thread is asked for a study's Downrange section. */
export type DownrangeTask =
  | (OfSite & { readonly kind: 'fan'; readonly vehicleClass: VehicleClass; readonly rangeKm: number })
  | {
      readonly kind: 'corridor';
      readonly siteId: string;
      /** For the file's name. */
      readonly siteCode: string;
      readonly input: CorridorInput;
    }
  | (OfSite & { readonly kind: 'surroundings'; readonly others: readonly OtherSite[] });

/** The answer to each kind of task. */
export interface DownrangeAnswers {
  fan: StudyFan;
  corridor: StudyCorridor;
  surroundings: StudySurroundings;
}
