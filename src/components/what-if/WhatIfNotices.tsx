import { Button } from '#components/ui/Button.tsx';
import { Conflict } from '#components/ui/Conflict.tsx';
import { Notice } from '#components/ui/States.tsx';
import { formatCount, listInWords } from '#contract/format.ts';
import type { WhatIfActs } from './use-acts.ts';
import type { LiveWhatIf } from './use-what-if.ts';
import { triesInWords } from './WhatIfList.tsx';

interface WhatIfNoticesProps {
  live: LiveWhatIf;
  acts: WhatIfActs;
  /** Entries that count for nothing now. */
  ignored: number;
  /** Names of what its weights say nothing of. */
  unweighed: readonly string[];
  onDropIgnored: (() => void) | undefined;
  /** The study's. */
  revision: number;
}

/** What is to be known before a what-if is read: that the study moved on, what has gone, what was refused. */
export function WhatIfNotices(props: WhatIfNoticesProps) {
  const { live, acts, ignored, unweighed, onDropIgnored, revision } = props;
  return (
    <div className="wi-notices">
      {live.movedOn && (
        <div className="box" role="status">
          <p className="box-fact">The study moved on to revision {revision}</p>
          <p className="box-text">The what-if is shown against it; its changes are as you made them.</p>
          <div className="box-acts">
            <Button size="small" onClick={live.lookOn}>
              Go on with revision {revision}
            </Button>
          </div>
        </div>
      )}
      {ignored > 0 && (
        <div className="box">
          <p className="box-fact">
            {formatCount(ignored, 'entry is', 'entries are')} ignored: site or criterion has gone
          </p>
          <p className="box-text">
            They stay in the what-if and change nothing unless what they name comes back.
          </p>
          {onDropIgnored && (
            <div className="box-acts">
              <Button size="small" onClick={onDropIgnored}>
                Take them out
              </Button>
            </div>
          )}
        </div>
      )}
      {unweighed.length > 0 && (
        <p className="caption">
          {listInWords(unweighed)} came to the study after these weights: no points here yet.
        </p>
      )}
      {acts.theirs && (
        <Conflict
          what="this what-if"
          by="You, in another window,"
          yours={`${live.draft.name}: ${triesInWords(live.draft.changes)}`}
          theirs={`${acts.theirs.name}: ${triesInWords(acts.theirs.changes)}`}
          at={acts.theirs.updatedAt}
          keepTheirs={`Keep “${acts.theirs.name}” as it is`}
          putYours={`Go on with “${live.draft.name}”`}
          onKeepTheirs={acts.keepTheirs}
          onPutYours={acts.putMine}
        />
      )}
      {acts.error && (
        <Notice fact="Not done" requestId={acts.error.requestId}>
          {acts.error.message}
        </Notice>
      )}
    </div>
  );
}
