import type { ReactNode } from 'react';

/** A table wider than its place scrolls inside it; the keyboard reaches it as one stop, named by its label. */
export function TableScroll({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div className="table-scroll" role="region" aria-label={label} tabIndex={0}>
      {children}
    </div>
  );
}
