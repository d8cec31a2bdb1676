import { useEffect, useRef, type ReactNode } from 'react';
import { formatTimeUtc } from '#contract/format.ts';
import { Button } from './Button.tsx';

interface ConflictProps {
  /** What both changed: "this cell", "Latitude of Tern Head". */
  what: string;
  yours: ReactNode;
  theirs: ReactNode;
  /** Who changed it meanwhile, when the server tells. */
  by?: string | undefined;
  /** ISO 8601, UTC. */
  at?: string | undefined;
  /** The buttons name the figures: "Keep 271", "Put 268". */
  keepTheirs: string;
  putYours: string;
  onKeepTheirs: () => void;
  onPutYours: () => void;
}

/** A stale write: both versions side by side, and the person chooses. Nothing is overwritten silently. */
export function Conflict(props: ConflictProps) {
  const box = useRef<HTMLDivElement>(null);
  // It may come up past the end of what is in view, as under a long form.
  useEffect(() => {
    // Not returned: newer browsers answer with a promise, which React would take for a clean-up.
    box.current?.scrollIntoView({ block: 'nearest' });
  }, []);
  return (
    <div className="box" role="alert" ref={box}>
      <p className="box-fact">
        {props.by ?? 'Someone'} changed {props.what} while you were typing
      </p>
      <div className="two-versions">
        <div>
          Yours
          <span className="version-value num">{props.yours}</span>
        </div>
        <div>
          Theirs{props.at ? `, ${formatTimeUtc(props.at)}` : ''}
          <span className="version-value num">{props.theirs}</span>
        </div>
      </div>
      <div className="box-acts">
        <Button size="small" kind="primary" onClick={props.onKeepTheirs}>
          {props.keepTheirs}
        </Button>
        <Button size="small" onClick={props.onPutYours}>
          {props.putYours}
        </Button>
      </div>
    </div>
  );
}
