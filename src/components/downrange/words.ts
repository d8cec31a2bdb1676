import type { StudyCorridor } from '#contract/downrange.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { InputSite } from '#contract/study-inputs.ts';

type Corridor = StudyCorridor['corridor']['features'][1]['properties'];
type Zone = StudyCorridor['corridor']['features'][0]['properties'];

/** The regulator decides: stands on every screen and page that shows what lies downrange. */
export const SCREENING = 'Screening only.';
export const WHO_DECIDES =
  'The regulator’s own method and licensed flight-safety analysts decide (14 CFR parts 420 and 450 in the United States; elsewhere the national authority).';

export const degrees = (azimuthDeg: number): string =>
  `${formatNumber(azimuthDeg, Number.isInteger(azimuthDeg) ? 0 : 1)}°`;
export const km = (length: number): string => `${formatNumber(length, length < 10 ? 1 : 0)} km`;
/** People spread over land are an estimate: three digits of it. */
export const roughly = (people: number): string =>
  formatNumber(people < 1000 ? Math.round(people) : Number(people.toPrecision(3)));

/** A small number as casualties are expected in: 1.63 × 10⁻³; plain from 0.1 to 1,000. */
export function formatPower(value: number): string {
  if (value === 0) return '0';
  if (value >= 0.1 && value < 1000) return formatNumber(value, value < 10 ? 2 : 0);
  const [digits = '', exponent = '0'] = value.toExponential(2).split('e');
  const raised = [...String(Number(exponent))]
    .map((digit) => (digit === '-' ? '⁻' : ('⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(digit)] ?? '')))
    .join('');
  return `${digits} × 10${raised}`;
}

/** The sentence before the corridor is worked out. */
export const waitingFinding = (site: Pick<InputSite, 'name'>, azimuthDeg: number): string =>
  `Downrange of ${site.name} at ${degrees(azimuthDeg)}`;

/** What the corridor found, in one sentence. Nothing found is said of the data, never of the place. */
export function corridorFinding(
  site: Pick<InputSite, 'name'>,
  { azimuthDeg, rangeNm, firstLandKm, firstLandName, coastKm, people, settlements }: Corridor,
): string {
  const range = km(rangeNm * 1.852);
  const land =
    coastKm === null
      ? `the flight line stays over land for all ${range}`
      : firstLandKm === null
        ? `no land was found along the flight line within ${range}`
        : `the first land lies ${km(firstLandKm)} downrange${firstLandName ? `, in ${firstLandName}` : ''}`;
  const who =
    settlements === 0
      ? 'the corridor holds no listed settlement'
      : `the corridor holds ${formatCount(settlements, 'listed settlement')} with ${formatNumber(people)} people`;
  return `At ${degrees(azimuthDeg)} from ${site.name} ${land}; ${who}.`;
}

/** What the exclusion zone found, in one sentence. */
export function zoneFinding({ settlements, people, settlementsWithoutFigure, spreadPeople }: Zone): string {
  const listed =
    settlements === 0
      ? 'The overflight exclusion zone holds no listed settlement'
      : `The overflight exclusion zone holds ${formatCount(settlements, 'listed settlement')} with ${formatNumber(people)} people`;
  const unknown =
    settlementsWithoutFigure > 0
      ? `, ${formatNumber(settlementsWithoutFigure)} of them without a figure`
      : '';
  const spread =
    spreadPeople !== null && spreadPeople >= 1
      ? `; about ${roughly(spreadPeople)} ${settlements === 0 ? '' : 'more '}people are spread over its land`
      : '';
  return `${listed}${unknown}${spread}.`;
}
