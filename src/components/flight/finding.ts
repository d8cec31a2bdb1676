import type { FlownOrbit } from '#contract/evaluate.ts';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { manifestFact, nameOf, turnCostMps } from './words.ts';
import type { FlightRow, ManifestRow } from './rows.ts';

/** A screen's head in plain text: the sentence, then at most three lines of why. */
export interface FlightFinding {
  heading: string;
  why: string;
  /** The clause of why that decides. */
  decides: string;
}

/** Within this, gains from different latitudes are "about the same" beside a speed of thousands of m/s. */
const ABOUT_THE_SAME_MPS = 30;

interface Flown {
  site: FlightRow['site'];
  result: FlownOrbit;
}

const flownOf = (rows: readonly FlightRow[]): Flown[] =>
  rows.flatMap(({ site, result }) => (result.way === 'out-of-reach' ? [] : [{ site, result }]));

function range(values: readonly number[]): string {
  const [low, high] = [Math.min(...values), Math.max(...values)].map((value) => formatNumber(value));
  return low === high ? `${low} m/s` : `${low} to ${high} m/s`;
}

const gainsOf = (rows: readonly Flown[]): number[] => rows.map(({ result }) => result.rotationGainMps);
const aboutTheSame = (gains: readonly number[]): boolean =>
  Math.max(...gains) - Math.min(...gains) < ABOUT_THE_SAME_MPS;

function headingOf(
  flown: readonly Flown[],
  direct: readonly Flown[],
  all: number,
  inclination: string,
): string {
  const turned = direct.length < all;
  if (direct.length === 0) return `No site flies ${inclination} without a turn.`;
  if (direct.length === 1) return `${direct[0]?.site.name ?? ''} alone flies ${inclination} without a turn.`;
  const gains = gainsOf(direct);
  const who = aboutTheSame(gainsOf(flown)) ? 'every site' : 'every direct flight';
  const first = aboutTheSame(gains)
    ? `To ${inclination} ${who} gains about the same.`
    : `To ${inclination} the turning Earth gives ${range(gains)}.`;
  return turned ? `${first} Turns set ${who === 'every site' ? 'them' : 'sites'} apart.` : first;
}

function gainClause(direct: readonly Flown[], inclination: string): string {
  if (direct.length < 2) return '';
  const latitudes = direct.map(({ site }) => Math.abs(site.latitudeDeg)).sort((a, b) => a - b);
  const gains = gainsOf(direct);
  const verb = Math.max(...gains) < 0 ? 'costs' : 'gives';
  const shown = verb === 'costs' ? gains.map((gain) => -gain) : gains;
  return (
    `Where ${inclination} is flown directly the turning Earth ${verb} ${range(shown)}, at ` +
    `${formatNumber(latitudes[0] ?? 0)}° of latitude as at ${formatNumber(latitudes.at(-1) ?? 0)}°: latitude pays ` +
    'only through the inclinations it opens, the plane changes it saves and the doglegs it avoids.'
  );
}

function costliest(rows: readonly Flown[], direct: readonly Flown[]): string {
  const turned = rows.filter(({ result }) => result.way !== 'direct');
  const worst = turned.sort((a, b) => (turnCostMps(b.result) ?? 0) - (turnCostMps(a.result) ?? 0))[0];
  if (!worst) return '';
  const kind = worst.result.way === 'dogleg' ? 'dogleg' : 'plane change';
  const best = Math.max(...direct.map(({ result }) => result.payloadKg ?? 0));
  const { payloadKg, shortfallMps } = worst.result;
  const lost =
    shortfallMps === null
      ? payloadKg !== null && best > payloadKg
        ? ` and ${formatNumber(best - payloadKg)} kg`
        : ''
      : `, and it falls short by ${formatNumber(shortfallMps)} m/s`;
  const verb = formatNumber(turnCostMps(worst.result) ?? 0);
  return `${worst.site.name} owes the largest turn: its ${kind} costs ${verb} m/s${lost}.`;
}

function outOfReach(rows: readonly FlightRow[]): string {
  const names = rows.filter(({ result }) => result.way === 'out-of-reach').map(({ site }) => site.name);
  if (names.length === 0) return '';
  const listed = names.length <= 3 ? listInWords(names) : formatCount(names.length, 'site');
  return ` ${listed} ${names.length === 1 ? 'is' : 'are'} out of reach: the turn would be over 60°.`;
}

/** What the rows of one orbit say. */
export function orbitFinding(rows: readonly FlightRow[], inclinationDeg: number): FlightFinding {
  const inclination = `${formatNumber(inclinationDeg, 1)}°`;
  const flown = flownOf(rows);
  const direct = flown.filter(({ result }) => result.way === 'direct');
  return {
    heading: headingOf(flown, direct, rows.length, inclination),
    why: gainClause(direct, inclination),
    decides: (costliest(flown, direct) + outOfReach(rows)).trim(),
  };
}

/** What the manifest's rows say: who carries most in a year, and what is flown nowhere. */
export function manifestFinding(rows: readonly ManifestRow[], orbits: readonly InputOrbit[]): FlightFinding {
  const [first, second] = rows;
  const best = first?.payloadPerYearKg ?? null;
  if (!first || best === null)
    return { heading: 'The manifest’s payload needs a vehicle.', why: '', decides: '' };
  const tonnes = (kg: number): string => formatNumber(kg / 1000, 1);
  const nowhere = orbits.filter((_, i) => rows.every(({ results }) => !results[i]?.payloadKg)).map(nameOf);
  const next = second ? `${second.site.name} follows with ${tonnes(second.payloadPerYearKg ?? 0)} t. ` : '';
  return {
    heading: `${first.site.name} carries the most: ${tonnes(best)} t a year.`,
    why: `${next}An orbit that is out of reach or fallen short counts zero. The manifest flies ${manifestFact(orbits)}.`,
    decides: nowhere.length ? `No site has payload to ${listInWords(nowhere)}.` : '',
  };
}
