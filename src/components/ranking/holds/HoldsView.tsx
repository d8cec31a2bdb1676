import { useMemo } from 'react';
import { EmptyState } from '#components/ui/States.tsx';
import { formatCount, listInWords } from '#contract/format.ts';
import { leaderChangesOf, tornadoOf } from '#contract/sensitivity-model.ts';
import { useSubject } from '../use-subject.ts';
import type { RankingViewProps } from '../views.ts';
import { OneWeight } from './OneWeight.tsx';
import { Tornado } from './Tornado.tsx';

/** What would change the leader: one weight at a time, one figure at a time. */
export default function HoldsView({ studyId, model, sheet }: RankingViewProps) {
  const { subject, names } = useSubject(model);
  const changes = useMemo(() => (subject ? leaderChangesOf(subject) : []), [subject]);
  const tornado = useMemo(() => subject && tornadoOf(subject), [subject]);
  if (!subject || subject.sites.length < 2)
    return (
      <EmptyState fact={subject ? 'One site alone is ranked.' : 'No site is ranked.'}>
        A lead can change only where a second site is ranked.
      </EmptyState>
    );
  const { leftOut } = subject;
  return (
    <>
      <div className="rk-panels sv-holds">
        <OneWeight changes={changes} names={names} sheet={sheet} />
        <Tornado studyId={studyId} tornado={tornado} subject={subject} names={names} sheet={sheet} />
      </div>
      {leftOut.length > 0 && (
        <p className="caption pt-5">
          {formatCount(leftOut.length, 'criterion', 'criteria')} without weight (
          {listInWords(leftOut.map(({ name }) => name))}) left out: a ranked site has no figure for{' '}
          {leftOut.length === 1 ? 'it' : 'them'}.
        </p>
      )}
    </>
  );
}
