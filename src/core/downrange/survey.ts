import { settlementExpectations, spreadExpectation } from './casualty.ts';
import type { CasualtyAreas } from './casualty.ts';
import { placed } from './corridor.ts';
import type { Corridor, Position } from './corridor.ts';
import { landInside } from './land-inside.ts';
import type { CountryLand } from './land-inside.ts';
import type { Outline } from './outline.ts';
import { corridorOutline, exclusionOutline } from './outline.ts';
import { firstLand, landAlong } from './path-over-land.ts';
import type { FirstLand, Stretch } from './path-over-land.ts';
import { planarRings } from './planar.ts';
import type { SpreadCount } from './spread.ts';
import type { World } from './world.ts';

/** Assumptions a study may change. */
export interface SurveySettings {
  /** People to the square metre within a settlement. */
  readonly placeDensity: number;
  /** Whether people beyond the listed settlements are spread over the land. */
  readonly spreads: boolean;
  /** Effective casualty areas, m². */
  readonly casualtyAreas: CasualtyAreas;
}

/** Who and what lies in one area of a corridor. */
export interface AreaSurvey {
  /** In the plane of degrees, cut at the date line, counterclockwise. */
  readonly rings: readonly (readonly Position[])[];
  readonly lands: readonly CountryLand[];
  /** Settlements inside, by their place in the data. */
  readonly settlements: readonly number[];
  /** Their people by the gazetteer, and how many of them have no figure. */
  readonly people: number;
  readonly withoutFigure: number;
  /** Null where spreading is switched off. */
  readonly spread: SpreadCount | null;
}

/** Casualties expected by the formula of appendix C with the settings shown beside it: indicative. */
export interface CasualtyExpectation {
  readonly listed: number;
  /** Null where spreading is switched off. */
  readonly spread: number | null;
  /** False where people are unknown, so that the figure is a least one. */
  readonly complete: boolean;
  /** The settlement that adds the most, by its place in the data, and its share; null where none adds any. */
  readonly greatest: { readonly settlement: number; readonly expectation: number } | null;
}

export interface CorridorSurvey {
  readonly corridor: AreaSurvey;
  readonly exclusion: AreaSurvey;
  /** Along the flight line. */
  readonly stretches: readonly Stretch[];
  readonly first: FirstLand;
  readonly expectation: CasualtyExpectation;
}

function surveyArea(
  world: World,
  corridor: Corridor,
  outline: Outline,
  settlements: readonly number[],
  settings: SurveySettings,
): AreaSurvey {
  const rings = planarRings(placed(corridor, outline));
  const lands = landInside(world.map, rings);
  const spread = settings.spreads ? world.spread(settings.placeDensity).over(lands, settlements) : null;
  return { rings, lands, settlements, ...world.settlements.sum(settlements), spread };
}

function greatestOf(inside: readonly number[], each: Float64Array): CasualtyExpectation['greatest'] {
  const expectation = each.reduce((most, one) => Math.max(most, one), 0);
  const settlement = inside[each.indexOf(expectation)];
  return expectation > 0 && settlement !== undefined ? { settlement, expectation } : null;
}

function expectationOf(
  world: World,
  corridor: Corridor,
  { settlements: inside, withoutFigure }: AreaSurvey,
  { casualtyAreas, placeDensity, spreads }: SurveySettings,
): CasualtyExpectation {
  const each = settlementExpectations(corridor, world.settlements, inside, placeDensity, casualtyAreas);
  const spread = spreads ? spreadExpectation(corridor, world.spread(placeDensity), casualtyAreas) : null;
  return {
    listed: each.reduce((sum, one) => sum + one, 0),
    spread: spread?.expectation ?? null,
    complete: withoutFigure === 0 && (spread?.complete ?? true),
    greatest: greatestOf(inside, each),
  };
}

/**
 * What lies in a corridor and its overflight exclusion zone, on the data given. A finding of nothing means that
 * nothing was found at the data's resolution.
 * @see downrangeReferences.appendixA, downrangeReferences.appendixC, tests/core/downrange/survey.test.ts
 */
export function surveyCorridor(world: World, corridor: Corridor, settings: SurveySettings): CorridorSurvey {
  const { shape, strip } = corridor;
  const inside = world.settlements.inside(corridor);
  const excluded = world.settlements.excluded(corridor, inside);
  const whole = surveyArea(world, corridor, corridorOutline(shape), inside, settings);
  return {
    corridor: whole,
    exclusion: surveyArea(world, corridor, exclusionOutline(shape), excluded, settings),
    stretches: [...landAlong(world.map, strip.path, shape.range)],
    first: firstLand(world.map, strip.path, shape.range, shape.circleRadius),
    expectation: expectationOf(world, corridor, whole, settings),
  };
}
