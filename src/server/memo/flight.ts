import { closedSums, weightedDecimals } from '#core/printed/closing.ts';
import type { FlownOrbit, OrbitResult } from '#contract/evaluate.ts';
import { noAscentInWords, type FlownState } from '#contract/flown-results.ts';
import { formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoCell, MemoTable } from '#contract/memo.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { cell, figure, figures, markOf, row, runsOf, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { flownBlocks, stateAt } from './flown.ts';
import { leftOut, type PrintedSite, type PrintedSites } from './printed-sites.ts';

/** Orbits side by side in one table. */
const ORBITS_BESIDE = 6;

const LINES = ['required', 'losses', 'dogleg', 'planeChange', 'transfer', 'reserve'] as const;

const orbitName = (orbit: InputOrbit): string =>
  orbit.name === '' ? orbit.code : `${orbit.code}, ${orbit.name}`;
const isFlown = (orbit: OrbitResult | undefined): orbit is FlownOrbit =>
  orbit !== undefined && orbit.way !== 'out-of-reach';
const wayInWords = ({ way }: FlownOrbit): string => (way === 'plane-change' ? 'plane change' : way);
const fallsShort = (shortfallMps: number): string =>
  `falls short by ${formatNumber(Math.ceil(shortfallMps))} m/s`;

function payloadText(orbit: OrbitResult | undefined, state: FlownState | null, decimals: number): string {
  if (!isFlown(orbit)) return 'out of reach';
  const instead = state && noAscentInWords(state);
  if (instead) return instead;
  if (orbit.shortfallMps !== null) return fallsShort(orbit.shortfallMps);
  return orbit.payloadKg === null ? '–' : figure(orbit.payloadKg, decimals);
}

/** The Δv budget of one orbit, every line of it, a row a site. */
function budgetTable(
  { facts, printed }: { facts: MemoFacts; printed: PrintedSites },
  at: number,
  orbit: InputOrbit,
): MemoTable {
  const { inputs } = facts;
  const results = printed.sites.map((one) => ({
    one,
    result: one.result?.orbits[at],
    state: stateAt(facts, one, at),
  }));
  const isTold = ({ state }: (typeof results)[number]): boolean => state === null || state.kind === 'flown';
  const flown = results.flatMap((one) => (isTold(one) && isFlown(one.result) ? [one.result] : []));
  const sums = flown.map(({ deltaVMps }) => ({
    parts: LINES.map((line) => deltaVMps[line]),
    total: deltaVMps.total,
  }));
  const closed = closedSums(sums, 0);
  const text = (value: number): string => figure(value, closed.decimals);
  let next = 0;
  const rows = results.map(({ one, result, state }) => {
    const instead = state && noAscentInWords(state);
    if (isFlown(result) && instead)
      return row([cell(one.site.name), { text: instead, span: 10 }], markOf(one));
    if (!isFlown(result))
      return row(
        [cell(one.site.name), { text: 'out of reach: no way turns less than 60°', span: 10 }],
        markOf(one),
      );
    const sum = closed.sums[next++];
    return row(
      [
        cell(one.site.name),
        cell(wayInWords(result)),
        cell(formatNumber(result.launchAzimuthDeg, 1)),
        ...(sum?.parts ?? []).map((part) => cell(text(part))),
        cell(text(sum?.total ?? 0)),
        cell(payloadText(result, state, 0)),
      ],
      markOf(one),
    );
  });
  return table(
    `Δv to ${orbitName(orbit)}`,
    [
      words('Site', 18, true),
      words('Way', 14),
      figures('Launch azimuth', '°', 9),
      figures('Required', 'm/s', 9.5),
      figures('Losses', 'm/s', 8.5),
      figures('Dogleg', 'm/s', 8.5),
      figures('Plane change', 'm/s', 8.5),
      figures('Transfer', 'm/s', 9),
      figures('Reserve', 'm/s', 8.5),
      figures('Total', 'm/s', 10.5, true),
      figures('Payload', 'kg', 10, true),
    ],
    rows,
    [
      ...(inputs.vehicle
        ? [facts.flown ? FLOWN_NOTE : lossesNote(inputs.vehicle.lossesMps)]
        : ['No vehicle: losses and reserve count as 0.']),
      ...(closed.adjusted
        ? ['Lines are rounded so that each row adds up; none lies a step of its last digit from its figure.']
        : []),
      ...leftOut(printed.left),
    ],
  );
}

const FLOWN_NOTE =
  'Losses: flown, each site its own; a dogleg is flown within them. Their kinds stand under Flown ascents.';

const lossesNote = ({
  gravity,
  drag,
  steering,
}: {
  gravity: number;
  drag: number;
  steering: number;
}): string =>
  `Losses: gravity ${formatNumber(gravity)}, drag ${formatNumber(drag)}, steering ${formatNumber(steering)} m/s, as entered.`;

/** Payload to each orbit and a year, with as many digits as a reader needs to come to the yearly sum. */
function payloadTables(facts: MemoFacts, { sites }: PrintedSites): MemoTable[] {
  const { orbits } = facts.inputs;
  const factors = orbits.map(({ flightsPerYear }) => flightsPerYear / 1000);
  const sums = sites.flatMap(({ result }) =>
    result && result.payloadPerYearKg !== null
      ? [
          {
            parts: result.orbits.map(({ payloadKg }) => payloadKg ?? 0),
            factors,
            total: result.payloadPerYearKg / 1000,
          },
        ]
      : [],
  );
  if (sums.length === 0) return [];
  const decimals = weightedDecimals(sums, 1, 0, 2);
  const runs = runsOf(
    orbits.map((orbit, at) => ({ orbit, at })),
    ORBITS_BESIDE,
  );
  return runs.map((run, index) => {
    const last = index === runs.length - 1;
    return table(
      runs.length === 1 ? 'Payload to each orbit' : `Payload to each orbit, ${index + 1} of ${runs.length}`,
      [
        words('Site', 26, true),
        ...run.map(({ orbit }) => figures(orbit.code, `kg, × ${formatNumber(orbit.flightsPerYear)}`, 12)),
        ...(last ? [figures('A year', 't', 12, true)] : []),
      ],
      sites.map((one) =>
        row(
          [cell(one.site.name), ...payloadCells(facts, one, run, decimals), ...(last ? [yearCell(one)] : [])],
          markOf(one),
        ),
      ),
      ['× the flights a year; an orbit out of reach or fallen short counts 0.'],
    );
  });
}

const payloadCells = (
  facts: MemoFacts,
  one: PrintedSite,
  run: readonly { at: number }[],
  decimals: number,
): MemoCell[] =>
  run.map(({ at }) => cell(payloadText(one.result?.orbits[at], stateAt(facts, one, at), decimals)));

const yearCell = ({ result }: PrintedSite): MemoCell =>
  cell(result?.payloadPerYearKg == null ? '–' : figure(result.payloadPerYearKg / 1000, 1), true);

/** What the turning Earth gives, orbit by orbit. */
function gainTables(facts: MemoFacts, { sites }: PrintedSites): MemoTable[] {
  const runs = runsOf(
    facts.inputs.orbits.map((orbit, at) => ({ orbit, at })),
    ORBITS_BESIDE,
  );
  return runs.map((run, index) =>
    table(
      runs.length === 1 ? 'Rotation gain' : `Rotation gain, ${index + 1} of ${runs.length}`,
      [words('Site', 28, true), ...run.map(({ orbit }) => figures(orbit.code, 'm/s', 12))],
      sites.map((one) =>
        row(
          [
            cell(one.site.name),
            ...run.map(({ at }) => {
              const orbit = one.result?.orbits[at];
              return cell(isFlown(orbit) ? formatNumber(orbit.rotationGainMps, 1) : 'out of reach');
            }),
          ],
          markOf(one),
        ),
      ),
      [
        'Injection speed less required speed; negative where the turning Earth costs speed. Every site gains about the same for one inclination, near ω a cos i: latitude pays through the inclinations it opens, the plane changes it saves and the doglegs it avoids.',
      ],
    ),
  );
}

/** What each candidate gives and costs in flight. */
export function flightBlocks(facts: MemoFacts, printed: PrintedSites): MemoBlock[] {
  const { inputs } = facts;
  if (inputs.sites.length === 0 || inputs.orbits.length === 0)
    return [
      {
        kind: 'paragraph',
        text: ['Flight is computed once the study has a candidate site and a target orbit.'],
      },
    ];
  return [
    ...inputs.orbits.map((orbit, at) => budgetTable({ facts, printed }, at, orbit)),
    ...payloadTables(facts, printed),
    ...gainTables(facts, printed),
    ...flownBlocks(facts, printed),
  ];
}
