import { references, studyReferences, weighingReferences } from '#core/references.ts';
import { ConcordanceInput, ConcordanceOutput, PairwiseInput, PairwiseOutput } from '../compare.ts';
import { DecideInput, DecideOutput } from '../decide.ts';
import { Sensitivity, SensitivityQuery } from '../sensitivity.ts';
import type { Operations } from './operation.ts';

const { saaty, kendall, ...ofDecide } = weighingReferences;
const stateless = (...sources: string[]): string => `Stateless. Sources: ${sources.join('; ')}.`;

export const weighingOperations: Operations = {
  '/api/v1/studies/{studyId}/sensitivity': {
    get: {
      summary: 'Whether a study’s ranking holds: one weight, one figure, and all of them at once',
      description: `Ranked sites alone; the acceptability of the best hundred. The same study, query and seed give the same figures to the last digit. Sources: ${[references.keeneyRaiffa, studyReferences.clemen, ...Object.values(ofDecide)].join('; ')}.`,
      query: SensitivityQuery,
      answer: Sensitivity,
    },
  },
  '/api/v1/decide': {
    post: {
      summary: 'Criteria, weights and alternatives in; ranking, and whether it holds, out',
      description: stateless(references.keeneyRaiffa, ...Object.values(ofDecide)),
      body: DecideInput,
      answer: DecideOutput,
    },
  },
  '/api/v1/pairwise': {
    post: {
      summary: 'Pairwise judgements in, weights and their consistency out',
      description: stateless(saaty),
      body: PairwiseInput,
      answer: PairwiseOutput,
    },
  },
  '/api/v1/concordance': {
    post: {
      summary: 'Rankings in, Kendall’s W out',
      description: stateless(kendall),
      body: ConcordanceInput,
      answer: ConcordanceOutput,
    },
  },
};
