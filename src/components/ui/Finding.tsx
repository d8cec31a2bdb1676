import type { ReactNode } from 'react';

interface FindingProps {
  /** The sentence that states the screen's result; the leading or chosen site in it stands in <em>. */
  children: ReactNode;
  /** At most three lines of why. */
  why?: ReactNode;
  /** Buttons; one of them primary at most. */
  actions?: ReactNode;
}

/** The head of every screen: its h1. From .astro give `why` and `actions` as named slots. */
export function Finding({ children, why, actions }: FindingProps) {
  return (
    <section className="finding">
      <div>
        <h1>{children}</h1>
        {why && <div className="why">{why}</div>}
      </div>
      {actions && <div className="acts">{actions}</div>}
    </section>
  );
}

interface PanelProps {
  title: ReactNode;
  caption?: ReactNode;
  children: ReactNode;
}

/** A part of a sheet under a heavy rule: heading, caption, then its chart or table. */
export function Panel({ title, caption, children }: PanelProps) {
  return (
    <section className="panel">
      <h2>{title}</h2>
      {caption && <p className="caption">{caption}</p>}
      <div className="mt-3.5">{children}</div>
    </section>
  );
}
