import { DEFAULT_HEADING_SPEED_MPS } from '#contract/ascent.ts';
import { ASCENT_METHOD } from '#contract/ascent-job.ts';
import { noAscentInWords, type FlownState } from '#contract/flown-results.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { closedSums } from '#core/printed/closing.ts';
import { cell, figure, figures, markOf, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import type { PrintedSite, PrintedSites } from './printed-sites.ts';

const PENDING: FlownState = { kind: 'pending' };

/** What is flown from a site to an orbit; null where the study takes entered losses. */
export const stateAt = ({ flown }: MemoFacts, { site }: PrintedSite, at: number): FlownState | null =>
  flown === null ? null : (flown.get(site.siteId)?.[at] ?? PENDING);

type Figures = Extract<FlownState, { kind: 'flown' }>['figures'];

/** What is taken off comes last, so that the row adds up. */
const partsOf = ({ relativeSpeedMps, lossesMps, centrifugalMps }: Figures): number[] => [
  relativeSpeedMps,
  lossesMps.gravity,
  lossesMps.drag,
  lossesMps.steering,
  lossesMps.backPressure,
  -centrifugalMps,
];

function ascentTable(facts: MemoFacts, { sites }: PrintedSites, at: number, orbit: InputOrbit): MemoTable {
  const states = sites.map((one) => ({ one, state: stateAt(facts, one, at) ?? PENDING }));
  const closed = closedSums(
    states.flatMap(({ state }) =>
      state.kind === 'flown' ? [{ parts: partsOf(state.figures), total: state.figures.idealDeltaVMps }] : [],
    ),
    0,
  );
  const text = (value: number): string => figure(value, closed.decimals);
  let next = 0;
  return table(
    `Flown ascents to ${orbit.name === '' ? orbit.code : `${orbit.code}, ${orbit.name}`}`,
    [
      words('Site', 16, true),
      figures('Heading', '°', 8),
      figures('Relative speed', 'm/s', 9.5),
      figures('Gravity', 'm/s', 8.5),
      figures('Drag', 'm/s', 7.5),
      figures('Steering', 'm/s', 8.5),
      figures('Back pressure', 'm/s', 9),
      figures('Centrifugal', 'm/s', 11),
      figures('Ideal Δv', 'sum', 9.5, true),
      figures('Greatest q', 'kPa', 8.5),
      figures('Burn-out', 's', 8),
      figures('Payload', 'kg', 9.5, true),
    ],
    states.map(({ one, state }) => {
      if (state.kind !== 'flown')
        return row([cell(one.site.name), { text: noAscentInWords(state) ?? '', span: 11 }], markOf(one));
      const { figures: flown } = state;
      const sum = closed.sums[next++];
      return row(
        [
          cell(one.site.name),
          cell(formatNumber(flown.launchHeadingDeg, 1)),
          ...(sum?.parts ?? []).map((part) => cell(text(part))),
          cell(text(sum?.total ?? 0)),
          cell(formatNumber(flown.maxDynamicPressurePa / 1000, 1)),
          cell(formatNumber(flown.burnOutS)),
          cell(formatNumber(flown.payloadKg)),
        ],
        markOf(one),
      );
    }),
    [
      'Along the air-relative velocity, seen from the turning Earth: ideal Δv of the vacuum specific impulse = relative speed at burn-out + losses − centrifugal gain.',
    ],
  );
}

/** The flown figures, orbit by orbit, and how they were flown; nothing where the losses are entered. */
export function flownBlocks(facts: MemoFacts, printed: PrintedSites): MemoBlock[] {
  if (facts.flown === null) return [];
  const { orbits, settings } = facts.inputs;
  const states = [...facts.flown.values()].flat();
  const pending = states.filter(({ kind }) => kind === 'pending').length;
  return [
    {
      kind: 'paragraph',
      text: [
        { strong: 'The losses are those of flown ascents. ' },
        `Each is flown as a point mass over the WGS 84 ellipsoid with gravity to J₂ and the U.S. Standard Atmosphere 1976: vertical rise, kick, gravity turn, then linear-tangent steering, for the greatest payload at which what is left at injection covers transfer, plane change and reserve. Permitted azimuths are held at ${formatNumber(DEFAULT_HEADING_SPEED_MPS)} m/s relative to the Earth; turn setting ${formatNumber(settings.turnSpeedFraction, 2)}; method version ${ASCENT_METHOD}.${pending > 0 ? ` ${formatCount(pending, 'ascent')} of the listed sites ${pending === 1 ? 'is' : 'are'} not flown yet for the inputs as they are.` : ''}`,
      ],
    },
    ...orbits.map((orbit, at) => ascentTable(facts, printed, at, orbit)),
  ];
}
