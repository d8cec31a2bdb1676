import { describe, expect, test } from 'vitest';
import { agreementInWords, disputesInWords, hasTies } from '#components/agreement/words.ts';
import { agreementOf } from '#contract/agreement-model.ts';
import { prepareFigures } from '#contract/ranking-model.ts';
import { pointsStatement, type MemberWeights } from '#contract/weights.ts';
import { COST, DAYS, four, trialFigures } from '../ranking/trial.ts';

const member = (
  name: string,
  cost: number,
  days: number,
  over: Partial<MemberWeights> = {},
): MemberWeights => ({
  userId: name,
  name,
  role: 'engineer',
  mine: false,
  state: 'shared',
  set: {
    ...pointsStatement({ [COST]: cost, [DAYS]: days }),
    shares: { [COST]: cost / (cost + days), [DAYS]: days / (cost + days) },
    updatedAt: '2026-12-01T11:42:00.000Z',
  },
  ...over,
});

/** Cost falls where days rise: the order under one turns round under the other. */
const torn = trialFigures([
  { name: 'One', cells: [210, 120] },
  { name: 'Two', cells: [250, 160] },
  { name: 'Three', cells: [290, 200] },
  { name: 'Four', cells: [330, 240] },
]);
const agreed = (figures: typeof torn, ...members: MemberWeights[]) =>
  agreementOf(prepareFigures(figures), members);

describe('how far members agree', () => {
  test('wholly, with the same weights', () => {
    const same = agreed(torn, member('Ada', 1, 0), member('Bram', 1, 0), member('Cleo', 1, 0));
    expect(agreementInWords(same)).toBe(
      '3 members’ rankings of 4 sites agree almost wholly: Kendall’s W is 1.00.',
    );
    expect(disputesInWords(same, torn)).toEqual(['All weigh alike.', 'All rank alike.']);
  });

  test('not at all, with orders turned round: all rank sums are equal, so that W is 0', () => {
    const opposed = agreed(torn, member('Ada', 1, 0), member('Bram', 0, 1));
    expect(agreementInWords(opposed)).toBe(
      '2 members’ rankings of 4 sites hardly agree: Kendall’s W is 0.00.',
    );
    expect(disputesInWords(opposed, torn)).toEqual([
      'Weights lie furthest apart on Cost: 1.00 (Ada) and 0.00 (Bram).',
      'Ranks lie furthest apart on One: 1 (Ada) and 4 (Bram).',
    ]);
    expect(hasTies(opposed)).toBe(false);
  });

  test('undefined where every member ties all sites, and where one site alone is ranked', () => {
    const flat = trialFigures([
      { name: 'One', cells: [250, 200] },
      { name: 'Two', cells: [250, 200] },
    ]);
    const tied = agreed(flat, member('Ada', 1, 0), member('Bram', 0, 1));
    expect(agreementInWords(tied)).toBe('Kendall’s W is undefined: every member ties all sites.');
    expect(hasTies(tied)).toBe(true);
    const lone = agreed(
      trialFigures([{ name: 'One', cells: [250, 200] }]),
      member('A', 1, 0),
      member('B', 0, 1),
    );
    expect(agreementInWords(lone)).toBe(
      'Kendall’s W is undefined: fewer than two sites are ranked by every member.',
    );
  });

  test('of sites that every member ranks, and of shared sets with weights alone', () => {
    // Unknown has no cost: with no weight on cost that would not matter, but its must-meet limit is on cost.
    const some = agreed(
      four,
      member('Ada', 60, 40),
      member('Bram', 40, 60),
      member('Cleo', 1, 1, { state: 'kept' }),
      member('Dee', 1, 1, { state: 'none', set: null }),
    );
    expect(some.judges.map(({ name }) => name)).toEqual(['Ada', 'Bram']);
    expect(agreementInWords(some)).toMatch(/^2 members’ rankings of 2 sites/);
  });

  test('with one set alone there is nothing to compare', () => {
    const one = agreed(torn, member('Ada', 1, 0));
    expect(agreementInWords(one)).toBe('1 member shares a set that ranks the sites.');
    expect(disputesInWords(one, torn)).toEqual([]);
  });
});
