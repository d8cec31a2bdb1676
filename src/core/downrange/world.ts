import type { LandData } from './data/land-data.ts';
import type { SettlementData } from './data/settlement-data.ts';
import { LandMap } from './land-map.ts';
import { Settlements } from './settlements.ts';
import { SpreadPeople } from './spread.ts';

/** Land and people that corridors are judged by. */
export interface World {
  readonly map: LandMap;
  readonly settlements: Settlements;
  /** The people spread over the land, for a density within settlements (people to the square metre). */
  spread(placeDensity: number): SpreadPeople;
}

/** Prepares the world once, for every corridor after: the settlements are indexed here. */
export function worldOf(land: LandData, places: SettlementData): World {
  const map = new LandMap(land);
  const settlements = new Settlements(places);
  let known: SpreadPeople | undefined;
  const spread = (placeDensity: number): SpreadPeople => {
    if (known?.placeDensity !== placeDensity) known = new SpreadPeople(map, settlements, placeDensity);
    return known;
  };
  return { map, settlements, spread };
}
