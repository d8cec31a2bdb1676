import { formatNumber, formatSigned, listInWords } from '#contract/format.ts';
import type { RankingModel } from '#contract/ranking-model.ts';
import type { RankingRow } from '#contract/ranking-rows.ts';
import { headToHead } from '#core/decision/head-to-head.ts';
import { closedSums, closingDecimals, type PrintedSum } from '#core/printed/closing.ts';

/** The terms of some sites side by side, as printed: every column adds up, and every difference comes out. */
export interface Bout {
  decimals: number;
  /** Places of the criteria, what makes the difference first. */
  order: number[];
  /** By site, then by criterion. */
  terms: number[][];
  totals: number[];
  /** The first site's term less another's: by other site, then by criterion. */
  differences: number[][];
  /** The first site's total less another's. */
  margins: number[];
}

const MORE_DIGITS = 2;

/**
 * @param rows the sites to compare; the first is measured against each other
 * @param places their places in the model
 */
export function boutOf(
  model: RankingModel,
  rows: readonly RankingRow[],
  places: readonly number[],
  least: number,
): Bout {
  const exact = rows.map((row) => row.contributions.map(({ term }) => term ?? 0));
  const sums = exact.map((parts): PrintedSum => ({ parts, total: sumOf(parts) }));
  const { decimals, terms, totals } = printed(sums, least);
  const first = terms[0] ?? [];
  const scale = 10 ** decimals;
  const less = (a: number, b: number): number => Math.round((a - b) * scale) / scale;
  return {
    decimals,
    order: orderOf(model, places),
    terms,
    totals,
    differences: terms.slice(1).map((other) => other.map((term, j) => less(first[j] ?? 0, term))),
    margins: totals.slice(1).map((other) => less(totals[0] ?? 0, other)),
  };
}

const sumOf = (parts: readonly number[]): number => parts.reduce((sum, part) => sum + part, 0);

/** Plain rounding where it closes both down the columns and across; else the terms give way. */
function printed(sums: readonly PrintedSum[], least: number) {
  const [first, ...others] = sums;
  const across = others.flatMap(({ parts, total }): PrintedSum[] => [
    ...parts.map((part, j) => ({
      parts: [part, (first?.parts[j] ?? 0) - part],
      total: first?.parts[j] ?? 0,
    })),
    { parts: [total, (first?.total ?? 0) - total], total: first?.total ?? 0 },
  ]);
  const plain = closingDecimals([...sums, ...across], least, least + MORE_DIGITS);
  if (plain !== undefined) {
    const round = (value: number): number => Number(value.toFixed(plain));
    return {
      decimals: plain,
      terms: sums.map(({ parts }) => parts.map(round)),
      totals: sums.map(({ total }) => round(total)),
    };
  }
  const closed = closedSums(sums, least);
  return {
    decimals: closed.decimals,
    terms: closed.sums.map(({ parts }) => parts),
    totals: closed.sums.map(({ total }) => total),
  };
}

/** By the greatest difference between the first site and any other. */
function orderOf({ prepared, weights }: RankingModel, places: readonly number[]): number[] {
  const [first, ...others] = places;
  const greatest = new Float64Array(weights.length);
  for (const other of others) {
    for (const { criterion, difference } of headToHead(prepared, weights, first ?? 0, other))
      greatest[criterion] = Math.max(greatest[criterion] ?? 0, Math.abs(difference));
  }
  return [...greatest.keys()].sort((a, b) => (greatest[b] ?? 0) - (greatest[a] ?? 0) || a - b);
}

const NAMED = 2;

/** What makes the difference between the first site and the second: for it, then against it. */
export function boutInWords(
  { order, differences, margins, decimals }: Bout,
  names: readonly string[],
  criteria: readonly { name: string }[],
): string {
  const [own = '', other = ''] = names;
  const margin = margins[0] ?? 0;
  const steps = differences[0] ?? [];
  const signed = (value: number): string => formatSigned(value, decimals);
  const say = (places: readonly number[]): string => {
    const named = places.slice(0, NAMED).map((j) => `${criteria[j]?.name ?? ''} ${signed(steps[j] ?? 0)}`);
    const rest = places.length - named.length;
    return listInWords(rest > 0 ? [...named, `${formatNumber(rest)} more`] : named);
  };
  const forIt = order.filter((j) => (steps[j] ?? 0) > 0);
  const against = order.filter((j) => (steps[j] ?? 0) < 0);
  const stands =
    margin === 0
      ? `${own} and ${other} are level.`
      : `${own} stands ${signed(Math.abs(margin)).slice(1)} ${margin > 0 ? 'above' : 'below'} ${other}.`;
  return [
    stands,
    forIt.length > 0 ? `For ${own}: ${say(forIt)}.` : `No criterion speaks for ${own}.`,
    against.length > 0 ? `For ${other}: ${say(against)}.` : `No criterion speaks for ${other}.`,
  ].join(' ');
}
