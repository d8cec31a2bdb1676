/* Invented facts of any size for the memo's tests: figures are arbitrary, sums are true sums. */
import type { FlownState } from '#contract/flown-results.ts';
import { agreementOf } from '#contract/agreement-model.ts';
import { DrawQuery } from '#contract/sensitivity.ts';
import { sensitivityOf } from '#contract/sensitivity-model.ts';
import { weighing } from '#contract/weighing.ts';
import { pointsStatement, type MemberWeights, type Weights } from '#contract/weights.ts';
import type { Criterion } from '#contract/criterion.ts';
import type { FlownOrbit, OrbitResult, OutOfReachOrbit, SiteResult } from '#contract/evaluate.ts';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import { decimalsOf } from '#contract/ranking-words.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { RankingCell, RankingFigures } from '#contract/ranking.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { MemoFacts } from '#server/memo/facts.ts';

/** Numbers that look arbitrary and are the same each run: the fractional parts of multiples of the golden ratio. */
function arbitrary(): (low: number, high: number) => number {
  let n = 0;
  return (low, high) => low + (high - low) * ((++n * 0.618_033_988_749_895) % 1);
}

export interface Invented {
  sites: number;
  orbits?: number;
  criteria?: number;
  weighed?: boolean;
  vehicle?: boolean;
  names?: (index: number) => string;
  places?: (index: number) => [latitudeDeg: number, longitudeDeg: number];
  paper?: MemoFacts['paper'];
  /** Sites that lack a figure, and sites whose figure fails a limit. */
  incomplete?: number;
  setAside?: number;
  /** Sets that members share. */
  members?: MemberWeights[];
  /** Sites whose first figure has a low, a high and a source. */
  uncertain?: number;
  /** Flown ascents, by site and orbit; left out: entered losses. */
  flown?: (site: number, orbit: number) => FlownState;
}

const uuid = (kind: number, index: number): string =>
  `0000000${kind}-0000-7000-8000-${String(index).padStart(12, '0')}`;

const NAMES = ['Cliff', 'Sound', 'Point', 'Bank', 'Holm', 'Ness', 'Bay', 'Head'];
const nameOf = (index: number): string =>
  `${String.fromCharCode(65 + (index % 26))}arrow ${NAMES[index % 8]} ${index + 1}`;

type Random = ReturnType<typeof arbitrary>;

function flown(code: string, r: Random, vehicle: boolean): FlownOrbit {
  const lines = {
    required: r(7300, 7900),
    losses: vehicle ? 1520 : 0,
    dogleg: r(0, 1) > 0.8 ? r(5, 400) : 0,
    planeChange: r(0, 1) > 0.8 ? r(5, 900) : 0,
    transfer: r(40, 2500),
    reserve: vehicle ? 40 : 0,
  };
  const total = Object.values(lines).reduce((sum, line) => sum + line, 0);
  const short = vehicle && total > 12_000;
  return {
    code,
    inclinationDeg: 51.6,
    way: lines.dogleg > 0 ? 'dogleg' : lines.planeChange > 0 ? 'plane-change' : 'direct',
    branch: r(0, 1) > 0.5 ? 'northerly' : 'southerly',
    profile: 'parking',
    injectionSpeedMps: 7793,
    inertialAzimuthDeg: r(0, 180),
    launchAzimuthDeg: r(0, 180),
    requiredSpeedMps: lines.required,
    rotationGainMps: r(-120, 440),
    turnDeg: lines.dogleg > 0 ? 4.2 : 0,
    planeChangeDeg: lines.planeChange > 0 ? 5.1 : 0,
    deltaVMps: { ...lines, total },
    payloadKg: !vehicle || short ? null : r(200, 9000),
    shortfallMps: short ? r(10, 2000) : null,
    others: [],
  };
}

const NONE = {
  required: null,
  losses: null,
  dogleg: null,
  planeChange: null,
  transfer: null,
  reserve: null,
  total: null,
};
const unreached = (code: string): OutOfReachOrbit => ({
  code,
  inclinationDeg: 98.6,
  way: 'out-of-reach',
  branch: null,
  profile: null,
  injectionSpeedMps: null,
  inertialAzimuthDeg: null,
  launchAzimuthDeg: null,
  requiredSpeedMps: null,
  rotationGainMps: null,
  turnDeg: null,
  planeChangeDeg: null,
  deltaVMps: NONE,
  payloadKg: null,
  shortfallMps: null,
  others: [],
});

function inputsOf(wanted: Invented, r: Random): StudyInputs {
  return {
    revision: 14,
    sites: Array.from({ length: wanted.sites }, (_, index) => {
      const [latitudeDeg, longitudeDeg] = wanted.places?.(index) ?? [
        Math.round(r(-55, 70) * 1e4) / 1e4,
        Math.round(r(-179, 180) * 1e4) / 1e4,
      ];
      return {
        siteId: uuid(1, index),
        code: `S${index + 1}`,
        name: wanted.names?.(index) ?? nameOf(index),
        latitudeDeg,
        longitudeDeg,
        elevationM: Math.round(r(0, 300)),
        permittedAzimuthsDeg:
          index % 3 === 0
            ? [
                [35, 120],
                [200, 250.5],
              ]
            : [],
      };
    }),
    orbits: Array.from({ length: wanted.orbits ?? 3 }, (_, index) => ({
      orbitId: uuid(2, index),
      code: `O${index + 1}`,
      name:
        ['Low inclination', 'Inclined mid', 'Sun-synchronous', 'Transfer', 'Polar', 'High'][index % 6] ?? '',
      perigeeKm: 400 + 50 * index,
      apogeeKm: 400 + 50 * index,
      ...(index === 2 ? { sunSynchronous: true } : { inclinationDeg: 28.5 + 10.1 * index }),
      profile: 'auto' as const,
      parkingKm: 185,
      flightsPerYear: index + 1,
    })),
    vehicle:
      wanted.vehicle === false
        ? null
        : {
            name: 'Invented two-stage',
            fairingKg: 42,
            fairingLeavesAfterStage: 1,
            reserveMps: 40,
            lossesMps: { gravity: 1320, drag: 185, steering: 15 },
            boosters: {
              count: 2,
              dryKg: 270,
              propellantKg: 2600,
              thrustVacKn: 60.5,
              ispVacS: 279,
              ispSeaLevelS: 252,
            },
            stages: [
              { dryKg: 810, propellantKg: 8200, thrustVacKn: 184, ispVacS: 309, ispSeaLevelS: 281 },
              { dryKg: 198, propellantKg: 1850, thrustVacKn: 21.5, ispVacS: 342 },
            ],
          },
    settings: { turnSpeedFraction: 0.6 },
  };
}

const CRITERIA = [
  'Payload a year',
  'Turn, worst orbit',
  'People nearby',
  'Cost to first launch',
  'Time to first launch',
  'Launch days a year',
  'Access by sea',
];

function criterion(index: number, limited: boolean): Criterion {
  return {
    id: uuid(3, index),
    position: index,
    name: CRITERIA[index] ?? `Further criterion ${index + 1}`,
    unit: ['t/yr', '°', 'persons', 'M€', 'months', 'days', ''][index % 7] ?? '',
    direction: index % 2 === 0 ? 'more' : 'less',
    source: 'entered',
    quantity: null,
    orbitId: null,
    levels: index === 3 ? { mode: 'fixed', worst: 1200, best: 0 } : { mode: 'candidates' },
    shape: { kind: 'straight' },
    groupId: null,
    steps: null,
    limit: limited && index === 0 ? { kind: 'at-least', value: 0 } : null,
    version: 1,
  };
}

function figuresOf(wanted: Invented, inputs: StudyInputs, r: Random): RankingFigures {
  const count = wanted.criteria ?? 7;
  const aside = wanted.sites - (wanted.setAside ?? 0);
  const gaps = aside - (wanted.incomplete ?? 0);
  return {
    revision: inputs.revision,
    criteria: Array.from({ length: count }, (_, index) => criterion(index, (wanted.setAside ?? 0) > 0)),
    sites: inputs.sites,
    cells: inputs.sites.map((_, site) =>
      Array.from({ length: count }, (_, at): RankingCell => {
        if (at === 0 && site >= aside) return -1;
        if (at === 1 && site >= gaps && site < aside) return null;
        if (at === 1 && site === 3) return 'worst';
        return Math.round(r(0, 1000) * 10) / 10;
      }),
    ),
    notes: wanted.sites > 3 && count > 1 ? [[3, 1, 'O2 out of reach']] : [],
    particulars: Array.from({ length: wanted.uncertain ?? 0 }, (_, site) => [
      site,
      0,
      { low: -1e4, high: 1e4, source: 'Desk study', date: '2026-10-01', confidence: 'medium' as const },
    ]),
    evidence: [],
  };
}

function weightsOf({ criteria }: RankingFigures, points: Record<string, number>): Weights {
  const statement = pointsStatement(points);
  return {
    weights: 'study',
    ...statement,
    ...weighing(criteria, statement),
    shared: false,
    origin: { kind: 'apart' },
    reason: '',
    version: 1,
  };
}

export function inventedFacts(wanted: Invented): MemoFacts {
  const r = arbitrary();
  const inputs = inputsOf(wanted, r);
  const vehicle = inputs.vehicle !== null;
  const results = new Map(
    inputs.sites.map((site, index): [string, SiteResult] => {
      const orbits = inputs.orbits.map(({ code }, at): OrbitResult =>
        index === 5 && at === 1 ? unreached(code) : flown(code, r, vehicle),
      );
      const payload = orbits.reduce(
        (sum, { payloadKg }, at) => sum + (payloadKg ?? 0) * (inputs.orbits[at]?.flightsPerYear ?? 0),
        0,
      );
      const result = {
        code: site.code,
        rotationSpeedMps: 465.1 * Math.cos((site.latitudeDeg * Math.PI) / 180),
        geocentricLatitudeDeg: site.latitudeDeg * 0.997,
        payloadPerYearKg: vehicle ? payload : null,
        orbits,
      };
      return [site.siteId, result];
    }),
  );
  const figures = figuresOf(wanted, inputs, r);
  const points = Object.fromEntries(
    figures.criteria.map(({ id }, at) => [id, wanted.weighed === false ? 0 : 30 - 2 * at]),
  );
  const ready = prepareFigures(figures);
  const model = rankFigures(ready, pointsStatement(points));
  return {
    paper: wanted.paper ?? 'a4',
    date: '2026-12-01',
    origin: 'https://spinward.example',
    study: {
      id: uuid(4, 0),
      title: 'Second launch site, 2031 manifest',
      organisation: 'Quillon Launch',
      question: 'From which of these places should we fly the 2031 manifest?',
      decideBy: '2027-01-30',
      leads: ['Ingrid Marsh'],
    },
    inputs,
    results,
    flown:
      wanted.flown === undefined
        ? null
        : new Map(
            inputs.sites.map(({ siteId }, site) => [
              siteId,
              inputs.orbits.map((_, orbit) => wanted.flown?.(site, orbit) ?? { kind: 'pending' }),
            ]),
          ),
    decimals: figures.criteria.map((_, place) => decimalsOf(figures, place)),
    ranking: presentRanking(model, 'study'),
    figures,
    groups: [],
    weights: weightsOf(figures, points),
    sensitivity: sensitivityOf(model, 'study', DrawQuery.parse({ samples: 500 })),
    evidence: { files: [], total: 0 },
    members: agreementOf(ready, wanted.members ?? []),
    checksum: 'ab'.repeat(32),
  };
}
