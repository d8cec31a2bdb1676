import { useMemo } from 'react';
import { formatCount } from '#contract/format.ts';
import { MOST_DRAWN_SITES, type AcceptabilityOf } from '#contract/sensitivity.ts';
import { acceptabilityInWords, type Names } from '#contract/sensitivity-words.ts';
import { Button } from '#components/ui/Button.tsx';
import { EmptyState, Notice, Progress } from '#components/ui/States.tsx';
import { saveCsv } from '../export.ts';
import { fileNameOf } from '../file-name.ts';
import { useSubject } from '../use-subject.ts';
import type { RankingViewProps } from '../views.ts';
import { acceptabilityCsv } from './acceptability-csv.ts';
import { CentralWeights } from './CentralWeights.tsx';
import { ConfidenceTable } from './ConfidenceTable.tsx';
import { DrawSettings } from './DrawSettings.tsx';
import { RankMatrix } from './RankMatrix.tsx';
import { StackedRanks } from './StackedRanks.tsx';
import { useAcceptability, type LiveAcceptability } from './use-acceptability.ts';
import { useDrawQuery } from './use-draw-query.ts';
import { WinningShares } from './WinningShares.tsx';

/** Weights and figures drawn all at once: how often each site has each rank. */
export default function AcceptabilityView(props: RankingViewProps) {
  const { model, title } = props;
  const { subject, names } = useSubject(model, MOST_DRAWN_SITES);
  const settings = useDrawQuery();
  const live = useAcceptability(subject, settings.query, model.table.ranked.length);
  if (!subject || subject.sites.length < 2) {
    return (
      <EmptyState fact={subject ? 'One site alone is ranked.' : 'No site is ranked.'}>
        Ranks are drawn where two sites or more are ranked.
      </EmptyState>
    );
  }
  const { answer } = live;
  const save = (): void => {
    if (!answer) return;
    const { sites } = model.figures;
    saveCsv(`${fileNameOf(title)} rank acceptability.csv`, acceptabilityCsv(answer, sites, subject.criteria));
  };
  return (
    <>
      <DrawSettings settings={settings} />
      <Course live={live} />
      {answer && <Answer {...props} answer={answer} names={names} stale={live.stale} onSave={save} />}
    </>
  );
}

/** Draws under way, cancelled or broken off. */
function Course({
  live: { progress, cancelled, failed, answer, cancel, again },
}: {
  live: LiveAcceptability;
}) {
  const kept = answer ? 'What stands below was drawn before.' : 'Nothing has been drawn yet.';
  if (failed !== null) {
    return (
      <Notice
        fact="The draws broke off"
        actions={
          <Button icon="again" onClick={again}>
            Draw again
          </Button>
        }
      >
        {failed} {kept}
      </Notice>
    );
  }
  if (cancelled) {
    return (
      <EmptyState
        fact="Cancelled."
        actions={
          <Button icon="again" onClick={again}>
            Draw again
          </Button>
        }
      >
        {kept}
      </EmptyState>
    );
  }
  if (!progress)
    return answer ? null : (
      <p className="caption" role="status">
        Drawing weights and figures.
      </p>
    );
  const { done, total, secondsLeft } = progress;
  return (
    <div className="sv-course">
      <Progress label="Drawing weights and figures" done={done} of={total}>
        {secondsLeft !== null && `about ${secondsLeft} s left. Leaving this page stops it.`}
      </Progress>
      <Button onClick={cancel}>Cancel the draws</Button>
    </div>
  );
}

interface AnswerProps extends RankingViewProps {
  answer: AcceptabilityOf;
  names: Names;
  stale: boolean;
  onSave: () => void;
}

function Answer({ model, sheet, answer, names, stale, onSave }: AnswerProps) {
  const { fact, behind } = acceptabilityInWords(answer, names);
  const codes = useMemo(
    () => new Map(model.figures.sites.map(({ siteId, code }) => [siteId, code])),
    [model.figures.sites],
  );
  return (
    <div className={stale ? 'sv-stale' : undefined} aria-busy={stale || undefined}>
      <div className="sv-headline">
        <div>
          <h2>{fact}.</h2>
          <p className="sr-only" role="status">
            {fact}.
          </p>
          <p className="caption">
            {stale ? 'Drawn before the last change of weights, figures or settings. ' : ''}
            {behind}
            {answer.sitesLeftOut > 0 &&
              ` The best hundred ranked sites are drawn; ${formatCount(answer.sitesLeftOut, 'site')} beyond them ${answer.sitesLeftOut === 1 ? 'is' : 'are'} not.`}
          </p>
        </div>
        <Button icon="export" onClick={onSave}>
          Export acceptability as CSV
        </Button>
      </div>
      <RankMatrix answer={answer} names={names} />
      <div className="rk-panels">
        <StackedRanks answer={answer} names={names} />
        <ConfidenceTable answer={answer} names={names} />
      </div>
      <div className="sv-stack mt-9">
        <CentralWeights answer={answer} names={names} sheet={sheet} />
        <WinningShares answer={answer} names={names} codes={codes} />
      </div>
    </div>
  );
}
