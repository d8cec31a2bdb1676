import { describe, expect, test } from 'vitest';
import { recommendationInWords, type RecommendationFacts } from '#contract/recommendation-words.ts';
import { errorFigure, shareFigure, shareInWords } from '#contract/share-words.ts';

const clear: RecommendationFacts = {
  leaders: ['Ponta do Vigia'],
  ranked: 9,
  value: 0.7124,
  decimals: 3,
  next: { name: 'Essery Bank', margin: 0.1031 },
  dominatedBy: null,
  weightChange: null,
  uncertain: { count: 12, losing: [] },
  acceptability: {
    leader: { name: 'Ponta do Vigia', share: 0.9521 },
    rival: { name: 'Essery Bank', share: 0.0479 },
    samples: 10_000,
    drawn: 'each weight within ± 50 % of its own and every uncertain figure between its low and high',
  },
  couldLead: [],
};
const read = (over: Partial<RecommendationFacts>): string => {
  const { what, holds } = recommendationInWords({ ...clear, ...over });
  return [what, ...holds].join(' ');
};
const withShare = (share: number, rival: number): Partial<RecommendationFacts> => ({
  acceptability: {
    ...clear.acceptability!,
    leader: { name: 'Ponta do Vigia', share },
    rival: { name: 'Essery Bank', share: rival },
  },
});

describe('the paragraph', () => {
  test('a clear lead: who, by how much, and that nothing alone changes it', () => {
    expect(read({})).toBe(
      'Ponta do Vigia is recommended: of 9 ranked sites it has the greatest overall value, 0.712, 0.103 above Essery Bank. ' +
        'The recommendation is robust: with each weight within ± 50 % of its own and every uncertain figure between its low and high, Ponta do Vigia is first in 95.2 % of 10,000 draws (standard error 0.21 percentage points); next is Essery Bank, first in 4.8 %. ' +
        'No change of one weight alone, the others in proportion, changes the leader. ' +
        'None of 12 uncertain figures, moved alone between their low and high, costs the lead.',
    );
  });

  test('a tie recommends no single site', () => {
    const text = read({
      leaders: ['Ponta do Vigia', 'Essery Bank'],
      next: null,
      weightChange: { criterion: 'Cost', now: 0.24, at: 0.24, leader: 'Essery Bank' },
    });
    expect(text).toMatch(
      /^No single site is recommended: Ponta do Vigia and Essery Bank tie at an overall value of 0\.712\./,
    );
    expect(text).toContain('the least change of the weight on Cost can give it to Essery Bank');
    expect(text).not.toMatch(/is recommended: of|costs the lead/);
  });

  test('a dominated leader is said to be dominated, and by whom', () => {
    expect(read({ dominatedBy: 'Essery Bank' })).toMatch(
      /Essery Bank is at least as good as Ponta do Vigia on every criterion and better on one or more.*Prefer Essery Bank/,
    );
    expect(read({})).not.toContain('at least as good');
  });

  test('95 % is robust, 70 % holds in most draws, 40 % is fragile and names who leads else', () => {
    expect(read(withShare(0.95, 0.05))).toContain('The recommendation is robust: ');
    expect(read(withShare(0.7, 0.3))).toContain('The recommendation holds in most draws: ');
    const fragile = read(withShare(0.4, 0.45));
    expect(fragile).toContain('The recommendation is fragile: ');
    expect(fragile).toContain(
      'first in 40.0 % of 10,000 draws (standard error 0.49 percentage points); next is Essery Bank, first in 45.0 %',
    );
  });

  test('the nearest change of a weight is told with both weights, its direction and the new leader', () => {
    const change = { criterion: 'Cost', now: 0.24, at: 0.3127, leader: 'Essery Bank' };
    expect(read({ weightChange: change })).toContain(
      'Cost from 0.240 up to 0.313, where Essery Bank takes the lead',
    );
    expect(read({ weightChange: { ...change, at: 0.1 } })).toContain('Cost from 0.240 down to 0.100');
  });

  test('figures that alone cost the lead are named, and a study without any says so', () => {
    expect(read({ uncertain: { count: 12, losing: ['Cost of Ponta do Vigia at 271'] } })).toContain(
      'Of 12 uncertain figures, moved alone between their low and high, 1 costs the lead: Cost of Ponta do Vigia at 271.',
    );
    expect(read({ uncertain: { count: 0, losing: [] } })).toContain(
      'No figure is entered with a low and a high',
    );
  });

  test('one site, no site, and a site that could still lead', () => {
    expect(read({ ranked: 1, next: null, weightChange: undefined, acceptability: null })).toMatch(
      /^Ponta do Vigia is the only site ranked/,
    );
    expect(
      recommendationInWords({
        ...clear,
        leaders: [],
        next: null,
        acceptability: null,
        weightChange: undefined,
      }),
    ).toEqual({ what: 'No site is recommended: none can be ranked.', holds: [] });
    expect(read({ couldLead: ['Skarvnes'] })).toContain('Skarvnes lacks figures and could still come first');
  });
});

describe('shares', () => {
  test('print one decimal, and what one decimal cannot show in words', () => {
    expect(shareFigure(0.9521, 10_000)).toBe('95.2');
    expect(shareFigure(0.0004, 10_000)).toBe('< 0.1');
    expect(shareFigure(0.9997, 10_000)).toBe('> 99.9');
    expect(shareFigure(1, 10_000)).toBe('100.0');
    expect(shareFigure(0, 10_000)).toBe('under 1/10,000');
    expect(shareInWords(0, 500)).toBe('under 1/500');
    expect(shareInWords(0.5, 500)).toBe('50.0 %');
  });

  // √(p(1 − p)/N): the binomial's standard error, any textbook of statistics; 0.5 of 10,000 is 0.5 points.
  test('the standard error of 0.5 in 10,000 draws is half a point; of 0 and 1 it is under 1/N', () => {
    expect(errorFigure(0.5, 10_000)).toBe('0.50');
    expect(errorFigure(0, 10_000)).toBe('under 1/10,000');
    expect(errorFigure(1, 2_000)).toBe('under 1/2,000');
  });
});
