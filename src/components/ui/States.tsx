import type { ReactNode } from 'react';
import { formatNumber } from '#contract/format.ts';
import { Icon } from './Icon.tsx';

interface EmptyStateProps {
  /** One bold line of fact: "No sites yet". */
  fact: string;
  /** One line of what to do. */
  children: ReactNode;
  /** One or two buttons. */
  actions?: ReactNode;
}

/** In the content's place when there is none. Table headings stay in sight above it. */
export function EmptyState({ fact, children, actions }: EmptyStateProps) {
  return (
    <div className="box">
      <p className="box-fact">{fact}</p>
      <div className="box-text">{children}</div>
      {actions && <div className="box-acts">{actions}</div>}
    </div>
  );
}

interface NoticeProps {
  /** What happened. */
  fact: string;
  /** What was kept, and what to do. */
  children: ReactNode;
  actions?: ReactNode;
  /** The server's id of the failed request, for whoever reads the log. */
  requestId?: string | undefined;
}

/** An error, where the result would stand. Errors are never toasts. */
export function Notice({ fact, children, actions, requestId }: NoticeProps) {
  return (
    <div className="box" data-kind="refused" role="alert">
      <p className="box-fact">
        <Icon name="refused" />
        {fact}
      </p>
      <div className="box-text">{children}</div>
      {actions && <div className="box-acts">{actions}</div>}
      {requestId && <p className="request-id">Request {requestId}</p>}
    </div>
  );
}

/** A hatched caution. Begin with the sentence in <b>. */
export function Caution({ children }: { children: ReactNode }) {
  return (
    <div className="caution" role="note">
      <p>{children}</p>
    </div>
  );
}

interface ProgressProps {
  /** What is done: "Flying 36 ascents". */
  label: string;
  done: number;
  of: number;
  /** "about 40 s left. You can leave this page; the results will be here." */
  children?: ReactNode;
}

/** For what takes over half a second; over five, say that one can leave the page. */
export function Progress({ label, done, of, children }: ProgressProps) {
  return (
    <div className="box" role="status">
      <p className="box-fact">{label}</p>
      <progress className="progress" value={done} max={of} aria-label={label} />
      <p className="box-text">
        {formatNumber(done)} of {formatNumber(of)} done{children ? <>, {children}</> : '.'}
      </p>
    </div>
  );
}

/** The mark of figures that are being worked out again: "Recomputing, figures of r13". */
export function Stale({ revision }: { revision: number }) {
  return (
    <span className="inline-flex items-center gap-1.5 text-xs text-ink-2" role="status">
      <span className="stale-dash" aria-hidden="true" />
      Recomputing, figures of r{revision}
    </span>
  );
}

export function Tag({ children, solid = false }: { children: ReactNode; solid?: boolean }) {
  return (
    <span className="tag" data-solid={solid ? '' : undefined}>
      {children}
    </span>
  );
}

/** A criterion's letter in its box. */
export function KeyLetter({ letter }: { letter: string }) {
  return <span className="key-letter">{letter}</span>;
}

/** A missing figure: dashed, in words. */
export function NoFigure() {
  return <span className="no-figure">no figure</span>;
}
