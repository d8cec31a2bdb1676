import type { Branch, Profile, WayKind } from './types.ts';

/** Names of the codes below, which are also their precedence among ties. */
export const WAY_KINDS: readonly WayKind[] = ['direct', 'plane-change', 'dogleg'];
export const BRANCHES: readonly Branch[] = ['northerly', 'southerly'];
export const PROFILES: readonly Profile[] = ['direct', 'parking'];

/** A way being worked out: plain numbers in one reused record, so that a batch leaves nothing to collect. */
export class WayRecord {
  /** Index into WAY_KINDS. */
  kind = 0;
  /** Index into BRANCHES. */
  branch = 0;
  /** Index into PROFILES. */
  profile = 0;
  /** Index of the sector edge flown, −1 where none is. */
  edge = -1;
  injectionSpeed = 0;
  inertialAzimuth = 0;
  launchAzimuth = 0;
  requiredSpeed = 0;
  turn = 0;
  planeChange = 0;
  doglegCost = 0;
  planeChangeCost = 0;
  transfer = 0;
  /** Everything but the vehicle's losses and reserve, which are the same for every way. */
  total = 0;
}

/** A list of ways that keeps its records between fillings. */
export class WayList {
  private readonly records: WayRecord[] = [];
  length = 0;

  clear(): void {
    this.length = 0;
  }

  at(index: number): WayRecord {
    return this.records[index] as WayRecord;
  }

  /** A record to fill, with no turn and no plane change. */
  next(): WayRecord {
    const record = this.records[this.length] ?? (this.records[this.length] = new WayRecord());
    this.length += 1;
    record.edge = -1;
    record.turn = 0;
    record.planeChange = 0;
    record.doglegCost = 0;
    record.planeChangeCost = 0;
    return record;
  }
}

/** Totals this close are a tie. */
export const TIE = 1e-6;

/** Precedence of a tie: way, branch, profile, edge; less than 0 where `a` comes first. */
function precedence(a: WayRecord, b: WayRecord): number {
  return a.kind - b.kind || a.branch - b.branch || a.profile - b.profile || a.edge - b.edge;
}

/** Index of the way to take: of those within a tie of the least total, the first in precedence; −1 of none. */
export function chosenOf(ways: WayList, taken?: ReadonlySet<number>): number {
  let least = Infinity;
  for (let k = 0; k < ways.length; k++) {
    if (taken?.has(k) !== true && ways.at(k).total < least) least = ways.at(k).total;
  }
  let chosen = -1;
  for (let k = 0; k < ways.length; k++) {
    if (taken?.has(k) === true || ways.at(k).total > least + TIE) continue;
    if (chosen < 0 || precedence(ways.at(k), ways.at(chosen)) < 0) chosen = k;
  }
  return chosen;
}

/** Marks every way of the same kind, branch and edge as listed, whichever its profile. */
function takeGroup(ways: WayList, { kind, branch, edge }: WayRecord, taken: Set<number>): void {
  for (let k = 0; k < ways.length; k++) {
    const way = ways.at(k);
    if (way.kind === kind && way.branch === branch && way.edge === edge) taken.add(k);
  }
}

/** Of the ways of one kind, branch and edge keeps the cheaper profile, by the same rule of ties. */
function dropDearerProfiles(ways: WayList, taken: Set<number>): void {
  for (let k = 0; k < ways.length; k++) {
    for (let j = k + 1; j < ways.length; j++) {
      const [a, b] = [ways.at(k), ways.at(j)];
      if (a.kind !== b.kind || a.branch !== b.branch || a.edge !== b.edge) continue;
      const [direct, parking] = a.profile < b.profile ? [k, j] : [j, k];
      taken.add(ways.at(direct).total <= ways.at(parking).total + TIE ? parking : direct);
    }
  }
}

/** Indices of the ways not taken: the cheaper profile of each, cheapest first, ties by precedence. */
export function othersOf(ways: WayList, chosen: number): number[] {
  const taken = new Set<number>();
  takeGroup(ways, ways.at(chosen), taken);
  dropDearerProfiles(ways, taken);
  const others: number[] = [];
  for (let next = chosenOf(ways, taken); next >= 0; next = chosenOf(ways, taken)) {
    others.push(next);
    taken.add(next);
  }
  return others;
}
