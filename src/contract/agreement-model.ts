/* How far members agree: the one way from their shared sets to ranks side by side, for the screen and the memo. */
import { agreement, type Agreement } from '#core/decision/agreement.ts';
import { rankFigures, type PreparedFigures, type RankingModel } from './ranking-model.ts';
import type { MemberWeights } from './weights.ts';

/** A member whose set is seen, with the ranking it gives. */
export interface Judged {
  userId: string;
  name: string;
  mine: boolean;
  method: NonNullable<MemberWeights['set']>['method'];
  model: RankingModel;
}

export interface MembersAgreement {
  judges: Judged[];
  /** Null with fewer than two; places of sites and criteria are those of the figures. */
  agreement: Agreement | null;
}

/**
 * Ranks the candidates by every member's set that gives a ranking.
 * @param members as GET …/weights/members answers; a set that is not shared counts only where `own` is asked for
 */
export function agreementOf(
  ready: PreparedFigures,
  members: readonly MemberWeights[],
  { own = false }: { own?: boolean } = {},
): MembersAgreement {
  const judges = members.flatMap(({ userId, name, mine, state, set }): Judged[] => {
    if (set === null || !(state === 'shared' || (own && mine))) return [];
    const model = rankFigures(ready, set);
    return model.state === 'ranked' ? [{ userId, name, mine, method: set.method, model }] : [];
  });
  return {
    judges,
    agreement: agreement(judges.map(({ model }) => ({ ranking: model.table, weights: model.weights }))),
  };
}
