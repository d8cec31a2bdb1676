import { listing } from '#core/decision/listing.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank } from '#core/decision/rank.ts';
import { weigh, type WeightStatement } from '#core/decision/weigh.ts';
import { drawnPoints, inventedStudy, uniforms } from './invented-study.ts';

/** What one move of a slider costs: points made into weights, all sites ranked and listed anew. @returns milliseconds */
export function reRanking(): () => number {
  const { criteria, items, table } = inventedStudy();
  const prepared = prepare(criteria, table);
  const next = uniforms(7);
  const statement: WeightStatement = {
    method: 'points',
    points: drawnPoints(items, next),
    order: [],
    judgements: [],
  };
  return () => {
    const points = { ...statement.points, c0: 100 * next() };
    const from = performance.now();
    const weighed = weigh(items, { ...statement, points });
    if (weighed.kind === 'unset') throw new Error('the bench drew no points');
    const rows = listing(rank(prepared, weighed.weights));
    const took = performance.now() - from;
    if (rows.length !== table.siteCount) throw new Error('the bench lost a site');
    return took;
  };
}
