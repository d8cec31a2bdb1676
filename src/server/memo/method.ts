import { constants } from '#core/constants.ts';
import { ascentReferences, references, studyReferences, weighingReferences } from '#core/references.ts';
import { formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoFormulas, MemoTable } from '#contract/memo.ts';
import { cell, figures, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';

const FLIGHT: MemoFormulas['items'] = [
  {
    formula: 'N = a / √(1 − e² sin²φ);  p = (N + h) cos φ',
    meaning: 'Distance of the pad from the Earth’s axis; φ geodetic latitude, h height, e² = f (2 − f).',
  },
  {
    formula: 'φ′ = atan2((N (1 − e²) + h) sin φ, p);  u = ω p',
    meaning: 'Geocentric latitude, and the eastward speed u of the pad.',
  },
  {
    formula: 'v = √(μ (2/r − 1/A));  r = a + altitude',
    meaning: 'Speed on an orbit of semi-major axis A (vis-viva); altitudes count from the equatorial radius.',
  },
  {
    formula: 'cos i = −(2/3) (2π / T) / (J₂ n) · (P / a)²',
    meaning:
      'Inclination of a sun-synchronous orbit, first order in J₂; n mean motion, P semi-latus rectum, T tropical year.',
  },
  {
    formula: 'sin β = cos i / cos φ′',
    meaning:
      'Inertial azimuth, northerly β and southerly 180° − β. Where |cos i| > cos φ′ the nearest inclination is flown due east or west and the rest is owed as a plane change.',
  },
  {
    formula: 'E = v sin β − u;  N = v cos β;  launch azimuth = atan2(E, N)',
    meaning:
      'Earth-relative velocity, east and north; its length is the required speed, and v less that is the rotation gain.',
  },
  {
    formula: '√(v₁² + v₂² − 2 v₁ v₂ cos α)',
    meaning:
      'A burn that changes speed and plane together. A plane change owed is split between the two transfer burns so that the sum is least.',
  },
  {
    formula: '2 k v sin(δ/2)',
    meaning:
      'A dogleg of δ; k is the share of the injection speed flown by then: the setting up to 7° of arc, rising straight to 1 at 15°. No turn above 60° is flown.',
  },
  {
    formula: 'Δv = required + losses + dogleg + plane change + transfer + reserve',
    meaning: 'The budget. Of all permitted ways the one of least total is flown.',
  },
  {
    formula: 'Δv = Σ g₀ I ln(m₀ / m₁)',
    meaning:
      'Rocket equation over the burns, I specific impulse, m₀ and m₁ the mass before and after, solved for the payload to 0.01 kg. A first stage from lift-off counts its sea-level impulse plus 0.8 of the step to vacuum, boosters and core together 0.75 of it, flow-weighted.',
  },
];

const DECISION: MemoFormulas['items'] = [
  {
    formula: 'v = (x − worst) / (best − worst)',
    meaning: 'Place s of a figure x between the levels, 0 to 1 and clamped there (Keeney and Raiffa 1976).',
  },
  {
    formula: 'v = s;  v = (1 − e^(−c s)) / (1 − e^(−c))',
    meaning: 'Value: straight, exponential with curvature c, or straight between up to five points.',
  },
  {
    formula: 'w = points / Σ points',
    meaning:
      'Weight by points or swings, within a level; a grouped criterion’s is its group’s times its own.',
  },
  {
    formula: 'A w = λmax w;  (λmax − n) / ((n − 1) RI)',
    meaning: 'Weights by pairwise comparison and their consistency ratio; RI the random index of Saaty 1980.',
  },
  {
    formula: 'w_k = (1/n) Σ 1/i, i = k … n',
    meaning: 'Rank-order centroid weight of the k-th of n.',
  },
  { formula: 'V = Σ w v', meaning: 'Overall value. Values within 1e-12 tie and share a rank.' },
  {
    formula: 'w* = (R₂ − R₁) / ((v₁ − R₁) − (v₂ − R₂))',
    meaning:
      'Weight of one criterion at which two sites tie; v their values on it, R = (V − w v)/(1 − w) the rest, whose proportions stay.',
  },
  {
    formula: 'r = v / √Σ v²;  C = d / (d + D)',
    meaning:
      'TOPSIS on values and weights (Hwang and Yoon 1981): closeness C, from the distances D to the ideal and d to the anti-ideal, in w r.',
  },
  {
    formula: 'b(site, rank) = share of draws',
    meaning:
      'SMAA-2 (Lahdelma and Salminen 2001): weights uniform in their part of the simplex, uncertain figures triangular on low, likely and high; the generator is xoshiro128**, seeded.',
  },
  {
    formula: 'W = 12 S / (m² (n³ − n) − m Σ (t³ − t))',
    meaning: 'Kendall’s coefficient of concordance of m judges on n sites, ties t corrected.',
  },
  {
    formula: 'payload a year = Σ flights × payload',
    meaning: 'Over the manifest; an orbit out of reach or fallen short counts 0.',
  },
];

/** Digits as a person would copy them: plain where short, else with a power of ten. */
function constantText(value: number): string {
  const size = Math.abs(value);
  if (size >= 1e-2 && size < 1e9) {
    const digits = String(value).split('.')[1]?.length ?? 0;
    return formatNumber(value, digits);
  }
  return value.toExponential().replace('e+', 'e').replace('e-', 'e−');
}

function constantsTable(): MemoTable {
  return table(
    'Constants',
    [
      words('Symbol', 8, true),
      words('Constant', 29, true),
      figures('Value', '', 19, true),
      words('Unit', 8, true),
      words('Source', 50),
    ],
    Object.values(constants).map(({ symbol, name, value, unit, source }) =>
      row([cell(symbol), cell(name), cell(constantText(value)), cell(unit), cell(references[source])]),
    ),
  );
}

function sources({ flown }: Pick<MemoFacts, 'flown'>): MemoTable {
  return table(
    'Sources of the method',
    [words('Source', 100, true)],
    Object.values({
      ...references,
      ...weighingReferences,
      ...studyReferences,
      ...(flown ? ascentReferences : {}),
    }).map((source) => row([cell(source)])),
  );
}

/** How the figures come about: formulas, constants, sources. */
export function methodBlocks(facts: MemoFacts): MemoBlock[] {
  return [
    { kind: 'paragraph', text: [{ strong: 'Flight' }] },
    { kind: 'formulas', items: FLIGHT },
    { kind: 'paragraph', text: [{ strong: 'Weighing' }] },
    { kind: 'formulas', items: DECISION },
    constantsTable(),
    sources(facts),
  ];
}
