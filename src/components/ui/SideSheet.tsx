import { useEffect, useId, useRef, type ReactNode } from 'react';
import { IconButton } from './Button.tsx';

interface SideSheetProps {
  open: boolean;
  onClose: () => void;
  title: string;
  children: ReactNode;
}

/** At the right, over the page, which stays live: a site's details, a cell's history. Full screen on a phone. */
export function SideSheet(props: SideSheetProps) {
  return props.open ? <OpenSheet {...props} /> : null;
}

function OpenSheet({ onClose, title, children }: SideSheetProps) {
  const titleId = useId();
  const heading = useRef<HTMLHeadingElement>(null);
  const sheet = useRef<HTMLElement>(null);
  useEffect(() => {
    const before = document.activeElement;
    heading.current?.focus();
    return () => {
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, []);
  useEffect(() => {
    const leave = (event: KeyboardEvent) => {
      // Of sheets over one another the last one goes.
      const isLast = [...document.querySelectorAll('.side-sheet')].at(-1) === sheet.current;
      if (event.key === 'Escape' && isLast && !document.querySelector('dialog[open]')) onClose();
    };
    document.addEventListener('keydown', leave);
    return () => document.removeEventListener('keydown', leave);
  }, [onClose]);
  return (
    <aside className="side-sheet" ref={sheet} aria-labelledby={titleId}>
      <div className="side-sheet-head">
        <h2 id={titleId} tabIndex={-1} ref={heading}>
          {title}
        </h2>
        <IconButton icon="close" label={`Close ${title}`} onClick={onClose} />
      </div>
      {children}
    </aside>
  );
}
