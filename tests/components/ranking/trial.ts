import type { Criterion } from '#contract/criterion.ts';
import { prepareFigures, rankFigures, type RankingModel } from '#contract/ranking-model.ts';
import { pointsStatement } from '#contract/weights.ts';
import type { RankingCell, RankingFigures } from '#contract/ranking.ts';

/** Ids of the trial's criteria, in their order. */
export const COST = '00000000-0000-7000-8000-0000000000c1';
export const DAYS = '00000000-0000-7000-8000-0000000000c2';

const fixed = (worst: number, best: number): Criterion['levels'] => ({ mode: 'fixed', worst, best });

export const criteria: Criterion[] = [
  {
    id: COST,
    position: 0,
    name: 'Cost',
    unit: 'M€',
    direction: 'less',
    source: 'entered',
    quantity: null,
    orbitId: null,
    levels: fixed(400, 200),
    shape: { kind: 'straight' },
    groupId: null,
    steps: null,
    limit: { kind: 'at-most', value: 390 },
    version: 1,
  },
  {
    id: DAYS,
    position: 1,
    name: 'Launch days',
    unit: 'days',
    direction: 'more',
    source: 'entered',
    quantity: null,
    orbitId: null,
    levels: fixed(100, 300),
    shape: { kind: 'straight' },
    groupId: null,
    steps: null,
    limit: null,
    version: 1,
  },
];

interface TrialSite {
  name: string;
  cells: RankingCell[];
}

export function trialFigures(
  sites: readonly TrialSite[],
  over: Partial<RankingFigures> = {},
): RankingFigures {
  return {
    revision: 7,
    criteria,
    sites: sites.map(({ name }, at) => ({
      siteId: `00000000-0000-7000-8000-${String(at).padStart(12, '0')}`,
      code: name.slice(0, 2).toUpperCase(),
      name,
      latitudeDeg: -4.74,
      longitudeDeg: 37.3,
    })),
    cells: sites.map(({ cells }) => cells),
    notes: [],
    particulars: [],
    evidence: [],
    ...over,
  };
}

/** Far 0.70, Near 0.65; Unknown 0.32 to 0.92; Dear over its limit: under 60 points for cost and 40 for days. */
export const four = trialFigures([
  { name: 'Near', cells: [250, 200] },
  { name: 'Far', cells: [300, 300] },
  { name: 'Dear', cells: [395.5, 300] },
  { name: '=Unknown', cells: [null, 260] },
]);

export const trialModel = (
  figures = four,
  points: Record<string, number> = { [COST]: 60, [DAYS]: 40 },
): RankingModel => rankFigures(prepareFigures(figures), pointsStatement(points));
