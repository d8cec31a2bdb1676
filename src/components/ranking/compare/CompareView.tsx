import { EmptyState } from '#components/ui/States.tsx';
import { useSubject } from '../use-subject.ts';
import type { RankingViewProps } from '../views.ts';
import { DominancePanel } from './DominancePanel.tsx';
import { HeadToHead } from './HeadToHead.tsx';
import { Scatter } from './Scatter.tsx';
import { SecondOpinion } from './SecondOpinion.tsx';
import { TermsTable } from './TermsTable.tsx';

/** Sites side by side: head to head, by two criteria, by a second method, and term by term. */
export default function CompareView({ model, sheet }: RankingViewProps) {
  const { subject, names } = useSubject(model);
  if (model.rows.length < 2)
    return (
      <EmptyState fact="There is one site alone.">Add a second candidate to compare it with.</EmptyState>
    );
  return (
    <>
      <HeadToHead model={model} sheet={sheet} />
      <div className="rk-panels">
        <Scatter model={model} sheet={sheet} />
        {subject && (
          <div className="sv-stack">
            <SecondOpinion subject={subject} names={names} decimals={sheet.decimals} />
            <DominancePanel subject={subject} names={names} />
          </div>
        )}
      </div>
      {subject && (
        <div className="mt-9">
          <TermsTable model={model} sheet={sheet} />
        </div>
      )}
    </>
  );
}
