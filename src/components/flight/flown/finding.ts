import { formatCount, formatNumber } from '#contract/format.ts';
import type { FlightFinding } from '../finding.ts';
import type { FlownRow, FlownYear } from './results.ts';

const METHOD =
  'Each site has its own losses: gravity, drag, steering and back-pressure of an ascent flown in three degrees of freedom.';

/** What is not to be read as a current figure, in words. */
function openWords(open: number, staleCount: number): string {
  const parts = [
    open > 0 ? `${formatCount(open, 'ascent')} not flown yet.` : '',
    staleCount > 0
      ? `${formatCount(staleCount, 'figure is', 'figures are')} of inputs that changed since.`
      : '',
  ];
  return parts.filter(Boolean).join(' ');
}

const figuresOf = (ascents: readonly FlownRow['ascent'][]) => ({
  open: ascents.filter((ascent) => !ascent?.figures).length,
  stale: ascents.filter((ascent) => ascent?.figuresAreStale).length,
});

/** What the flown ascents to one orbit say. */
export function flownOrbitFinding(rows: readonly FlownRow[], orbitName: string): FlightFinding {
  const { open, stale } = figuresOf(rows.map(({ ascent }) => ascent));
  const paying = rows.filter(({ ascent }) => (ascent?.figures?.payloadKg ?? null) !== null);
  const [best, last] = [paying[0], paying.at(-1)];
  const payloadOf = (row: FlownRow | undefined): number => row?.ascent?.figures?.payloadKg ?? 0;
  if (!best || !last)
    return {
      heading:
        open === rows.length
          ? `${orbitName}: no ascent has been flown yet.`
          : `${orbitName}, flown: no site has payload.`,
      why: METHOD,
      decides: openWords(open, stale),
    };
  const spread = payloadOf(best) - payloadOf(last);
  const range =
    best === last
      ? ''
      : ` ${last.site.name} carries least of those that reach it, ${formatNumber(spread)} kg less.`;
  return {
    heading: `${orbitName}, flown: ${best.site.name} carries most, ${formatNumber(payloadOf(best))} kg.`,
    why: METHOD + range,
    decides: openWords(open, stale),
  };
}

/** What the flown ascents of the whole manifest say. */
export function flownManifestFinding(years: readonly FlownYear[]): FlightFinding {
  const { open, stale } = figuresOf(years.flatMap(({ ascents }) => ascents));
  const best = years[0];
  const carried = best?.payloadPerYearKg ?? null;
  const heading =
    !best || carried === null
      ? 'The manifest’s flown payload waits for every orbit to be flown.'
      : `Whole manifest, flown: ${best.site.name} carries most, ${formatNumber(carried / 1000, 1)} t a year.`;
  return { heading, why: METHOD, decides: openWords(open, stale) };
}
