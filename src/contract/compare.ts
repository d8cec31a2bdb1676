import { MOST_COMPARED } from '#core/decision/pairwise.ts';
import { z } from './zod.ts';

/** Judgements go from 1/9 to 9; written with few digits, a ninth and a product of reciprocals lie a little off. */
const WRITTEN = 0.01;
const Judgement = z
  .number()
  .min((1 - WRITTEN) / 9, 'A judgement lies between 1/9 and 9.')
  .max(9, 'A judgement lies between 1/9 and 9.');

function faultOf(matrix: readonly (readonly number[])[], i: number, j: number): string | null {
  const product = (matrix[i]?.[j] ?? NaN) * (matrix[j]?.[i] ?? NaN);
  if (i === j) return matrix[i]?.[i] === 1 ? null : 'A criterion is 1 to itself.';
  return Math.abs(product - 1) <= WRITTEN ? null : 'The reverse of a judgement is 1 over it.';
}

/** POST /api/v1/pairwise: how many times as much the criterion of a row matters as that of a column. */
export const PairwiseInput = z
  .strictObject({
    matrix: z
      .array(z.array(Judgement))
      .min(2, 'Two criteria are needed.')
      .max(MOST_COMPARED, `Up to ${MOST_COMPARED} criteria.`)
      .meta({
        description: 'Square; 1 on the diagonal, reciprocals across it',
        examples: [
          [
            [1, 3],
            [1 / 3, 1],
          ],
        ],
      }),
  })
  .check((ctx) => {
    const { matrix } = ctx.value;
    const complain = (path: PropertyKey[], message: string) =>
      ctx.issues.push({ code: 'custom', input: matrix, path: ['matrix', ...path], message });
    const ragged = matrix.findIndex((row) => row.length !== matrix.length);
    if (ragged >= 0) {
      complain([ragged], 'There are as many columns as rows.');
      return;
    }
    matrix.forEach((row, i) => {
      for (let j = i; j < row.length; j++) {
        const fault = faultOf(matrix, i, j);
        if (fault) complain([i, j], fault);
      }
    });
  })
  .meta({ id: 'PairwiseInput' });
export type PairwiseInput = z.infer<typeof PairwiseInput>;

export const PairwiseOutput = z
  .strictObject({
    weights: z.array(z.number()),
    lambdaMax: z.number(),
    consistencyIndex: z.number(),
    consistencyRatio: z
      .number()
      .meta({ description: 'Above 0.10 the judgements want another look; 0 for two' }),
    worst: z
      .tuple([z.int(), z.int()])
      .meta({ description: 'Row and column, from 0, of the judgement that disagrees most with the weights' }),
  })
  .meta({ id: 'PairwiseOutput' });
export type PairwiseOutput = z.infer<typeof PairwiseOutput>;

const MOST_JUDGES = 1_000;
const MOST_RANKED = 10_000;

/** POST /api/v1/concordance: a row a judge, a rank a thing. */
export const ConcordanceInput = z
  .strictObject({
    rankings: z
      .array(z.array(z.number()).min(1, 'Something is needed to rank.').max(MOST_RANKED))
      .min(2, 'Two judges are needed.')
      .max(MOST_JUDGES, `Up to ${MOST_JUDGES.toLocaleString('en')} judges.`)
      .meta({ description: 'Lowest is first; ties take the mean of their ranks, however they are written' }),
  })
  .check((ctx) => {
    const { rankings } = ctx.value;
    rankings.forEach((row, at) => {
      if (row.length === rankings[0]?.length) return;
      const message = 'Every judge ranks the same things.';
      ctx.issues.push({ code: 'custom', input: row, path: ['rankings', at], message });
    });
  })
  .meta({ id: 'ConcordanceInput' });
export type ConcordanceInput = z.infer<typeof ConcordanceInput>;

export const ConcordanceOutput = z
  .strictObject({
    w: z.number().nullable().meta({
      description: '0 (none) to 1 (all alike); null where it is undefined: every judge ties everything',
    }),
  })
  .meta({ id: 'ConcordanceOutput' });
export type ConcordanceOutput = z.infer<typeof ConcordanceOutput>;
