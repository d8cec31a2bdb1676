import type { ReactNode } from 'react';
import type { ApiError } from '#components/live/api.ts';
import { useConnection } from '#components/live/study-events.ts';
import { Button, ButtonLink } from '#components/ui/Button.tsx';
import { Caution, EmptyState, Notice } from '#components/ui/States.tsx';
import type { RankingState } from '#contract/ranking.ts';

interface BeforeRanksProps {
  state: Exclude<RankingState, 'ranked'>;
  studyId: string;
  /** Gives every criterion the same points; undefined where this person may not. */
  onEven?: (() => void) | undefined;
}

/** What is missing before there can be ranks, and where to get it. */
export function BeforeRanks({ state, studyId, onEven }: BeforeRanksProps) {
  const link = (section: string, words: string): ReactNode => (
    <ButtonLink href={`/studies/${studyId}/${section}`}>{words}</ButtonLink>
  );
  if (state === 'no-sites') {
    return (
      <EmptyState fact="No sites yet." actions={link('sites', 'Add candidate sites')}>
        Add candidates in Sites, one by one or from a CSV. They are ranked here as soon as they have figures.
      </EmptyState>
    );
  }
  if (state === 'no-criteria') {
    return (
      <EmptyState fact="No criteria yet." actions={link('criteria', 'Add criteria')}>
        Sites are ranked by criteria: computed ones such as payload a year, and figures you enter or upload.
      </EmptyState>
    );
  }
  return (
    <EmptyState
      fact="No weights yet."
      actions={
        <>
          {onEven && <Button onClick={onEven}>Weigh all criteria the same</Button>}
          {link('criteria', 'Set weights in Criteria')}
        </>
      }
    >
      Every criterion has 0 points, so no site stands above another. Give points to what matters.
    </EmptyState>
  );
}

/** Figures could not be read: what stands is kept and said to be old. */
export function FiguresNotRead({ error, onAgain }: { error: ApiError; onAgain: () => void }) {
  return (
    <Notice
      fact="The figures could not be read"
      requestId={error.requestId}
      actions={
        <Button size="small" icon="again" onClick={onAgain}>
          Read figures again
        </Button>
      }
    >
      {error.message} What stands below is what was read before.
    </Notice>
  );
}

/** Said while changes of other members do not arrive. */
export function ConnectionNote() {
  return useConnection() === 'lost' ? (
    <p className="caption" role="status">
      Connection lost: changes by others are not arriving. Trying again; what you see stays.
    </p>
  ) : null;
}

export function EstimatesCaution() {
  return (
    <Caution>
      <b>Estimates for comparing sites, not flight data.</b> Payload and Δv come from closed forms, with
      losses entered or flown by a model; a ranking is only as good as its figures, criteria and weights.
    </Caution>
  );
}
