import { describe, expect, test } from 'vitest';
import type { AcceptabilityOf } from '#contract/sensitivity.ts';
import {
  acceptabilityInWords,
  dominanceInWords,
  leaderChangeInWords,
  namesOf,
  nearestChange,
  nearestChangeInWords,
  secondOpinionInWords,
} from '#contract/sensitivity-words.ts';

const names = namesOf(
  [
    { siteId: 'p', name: 'Ponta do Vigia' },
    { siteId: 'e', name: 'Essery Bank' },
    { siteId: 'r', name: 'Pointe Rovana' },
  ],
  [
    { id: 'c', name: 'Cost' },
    { id: 'd', name: 'Launch days' },
  ],
);
const none = { criterionId: 'd', weight: 0.1, below: null, above: null };
const both = {
  criterionId: 'c',
  weight: 0.24,
  below: { weight: 0.1, siteId: 'e' },
  above: { weight: 0.2857, siteId: 'r' },
};
const level = { criterionId: 'c', weight: 0.24, below: null, above: { weight: 0.24, siteId: 'r' } };

describe('a change of one weight', () => {
  test.each([
    [none, 'No weight on Launch days changes the leader.'],
    [both, 'Now 0.240. Below 0.100 Essery Bank leads; above 0.286 Pointe Rovana leads.'],
    [level, 'Now 0.240. Pointe Rovana, level now, leads or stays level above this.'],
  ])('%#', (change, words) => {
    expect(leaderChangeInWords(change, names)).toBe(words);
  });

  test('the nearest of all', () => {
    expect(nearestChange([none])).toBeNull();
    expect(nearestChange([none, both])).toEqual({ criterionId: 'c', now: 0.24, at: 0.2857, siteId: 'r' });
    expect(nearestChangeInWords([none], names)).toBe('No weight alone changes the leader');
    expect(nearestChangeInWords([both], names)).toBe(
      'Nearest change: Cost from 0.240 to 0.286, where Pointe Rovana leads',
    );
    expect(nearestChangeInWords([level], names)).toBe('The lead is shared now with Pointe Rovana');
  });
});

describe('the second opinion', () => {
  const ranked = ['p', 'r', 'e'].map((siteId, at) => ({ siteId, rank: at + 1 }));
  const by = (...ids: string[]) =>
    ids.map((siteId, at) => ({ siteId, rank: at + 1, closeness: 0.7 - at / 10 }));

  test('the same order', () => {
    expect(secondOpinionInWords(ranked, by('p', 'r', 'e'), names)).toEqual({
      fact: 'TOPSIS gives the same order',
      behind: 'Closeness 0.700 against 0.600 for Pointe Rovana. Every site keeps its rank.',
    });
  });

  test('another leader', () => {
    expect(secondOpinionInWords(ranked, by('r', 'p', 'e'), names)).toEqual({
      fact: 'TOPSIS puts Pointe Rovana first',
      behind:
        'Closeness 0.700 against 0.600 for Ponta do Vigia. It ranks Pointe Rovana 1 (here 2) and Ponta do Vigia 2 (here 1); 1 site keeps its rank.',
    });
  });

  test('the same leader, another order under it', () => {
    expect(secondOpinionInWords(ranked, by('p', 'e', 'r'), names).fact).toBe(
      'TOPSIS too puts Ponta do Vigia first, and differs further down',
    );
  });
});

test('dominated sites are counted', () => {
  expect(dominanceInWords({ nonDominated: 3, dominated: [] }).fact).toBe('No ranked site is dominated');
  expect(dominanceInWords({ nonDominated: 2, dominated: [{ siteId: 'e', by: 'p' }] })).toEqual({
    fact: '1 of 3 ranked sites is dominated',
    behind:
      'Another site is at least as good on every criterion and better on one. 2 are not dominated, whatever the weights.',
  });
});

describe('the draws', () => {
  const answer = (first: number, second: number, over: Partial<AcceptabilityOf> = {}): AcceptabilityOf => ({
    model: 'band',
    band: 0.5,
    order: null,
    samples: 10_000,
    seed: 1,
    uncertainFigures: 0,
    sitesLeftOut: 0,
    sites: [first, second].map((share, at) => ({
      siteId: at === 0 ? 'p' : 'r',
      shares: [share, 1 - share],
      errors: [],
      centralWeights: null,
      confidence: null,
      confidenceError: null,
      wins: [],
    })),
    ...over,
  });

  test('the leader is first most often', () => {
    expect(acceptabilityInWords(answer(0.724, 0.276), names)).toEqual({
      fact: 'Ponta do Vigia is first in 72.4 % of 10,000 draws',
      behind:
        'With each weight within ± 50 % of its own, figures as they are; standard error 0.45 percentage points.',
    });
  });

  test('another is: that is said, with both shares', () => {
    expect(acceptabilityInWords(answer(0.4, 0.6), names).fact).toBe(
      'Ponta do Vigia leads now, but Pointe Rovana is first more often: in 60.0 % of 10,000 draws against 40.0 %',
    );
  });

  test('every draw, by the whole simplex, with uncertain figures', () => {
    const sure = answer(1, 0, { model: 'simplex', band: null, uncertainFigures: 3 });
    expect(acceptabilityInWords(sure, names)).toEqual({
      fact: 'Ponta do Vigia is first in 100.0 % of 10,000 draws',
      behind:
        'With any weights at all and every uncertain figure between its low and high; standard error under 1/10,000.',
    });
  });
});
