import type { Prepared } from './prepare.ts';
import { rank } from './rank.ts';
import { TIE } from './ties.ts';
import { endValues, type UncertainFigure } from './uncertain.ts';

export interface TornadoQuestion {
  prepared: Prepared;
  /** One a criterion, summing to 1. */
  weights: Float64Array;
  /** Place of the site whose lead is tried. */
  leader: number;
  /** Figures known as low, likely and high. */
  uncertain: readonly UncertainFigure[];
}

/** One uncertain figure, moved alone. */
export interface TornadoBar {
  site: number;
  criterion: number;
  /** The figure at either end, in the criterion's own unit. */
  low: number;
  high: number;
  /** The leader's margin with the figure at `low` and at `high`; below 0 the lead is lost. */
  atLow: number;
  atHigh: number;
}

export interface Tornado {
  /** The leader's overall value less that of the best other ranked site, with the likely figures; 0 where they tie. */
  margin: number;
  /** Widest first; figures of sites that are not ranked play no part. */
  bars: TornadoBar[];
}

/**
 * The leader's margin over the best other ranked site with every uncertain figure at its low and at its high, one at a
 * time. Levels and must-meet limits stay where the likely figures put them.
 * @returns null where the leader is not ranked or no other site is.
 * @throws RangeError when low ≤ likely ≤ high does not hold, or the weights are not one a criterion.
 * @see references.ts `clemen`; checked by hand and by ranking again in tests/core/decision/tornado.test.ts
 */
export function tornado({ prepared, weights, leader, uncertain }: TornadoQuestion): Tornado | null {
  const { ranked, totals } = rank(prepared, weights);
  const totalOf = (site: number | undefined): number => totals[site ?? -1] ?? -Infinity;
  // A moved rival is measured against the best of the rest: two of them are enough to know it.
  const [first, second] = ranked.filter((site) => site !== leader);
  if (first === undefined || !ranked.includes(leader)) return null;
  const isRanked = new Set(ranked);
  const marginWith = (site: number, change: number): number => {
    if (site === leader) return levelled(totalOf(leader) + change - totalOf(first));
    const rest = totalOf(site === first ? second : first);
    return levelled(totalOf(leader) - Math.max(rest, totalOf(site) + change));
  };
  const bars = uncertain
    .filter(({ site, low, high }) => low !== high && isRanked.has(site))
    .map((figure): TornadoBar => {
      const { site, criterion, low, high } = figure;
      const ends = endValues(prepared, figure);
      const changeTo = (value: number): number =>
        (weights[criterion] ?? 0) * (value - (prepared.values[ends.at] ?? 0));
      const [atLow, atHigh] = [marginWith(site, changeTo(ends.low)), marginWith(site, changeTo(ends.high))];
      return { site, criterion, low, high, atLow, atHigh };
    });
  return { margin: levelled(totalOf(leader) - totalOf(first)), bars: bars.sort(widestFirst) };
}

/** What is no more than a tie is none. */
const levelled = (margin: number): number => (Math.abs(margin) <= TIE ? 0 : margin);

const widthOf = ({ atLow, atHigh }: TornadoBar): number => Math.abs(atHigh - atLow);

/** Equal ones in the order of the table. */
const widestFirst = (a: TornadoBar, b: TornadoBar): number =>
  widthOf(b) - widthOf(a) || a.site - b.site || a.criterion - b.criterion;
