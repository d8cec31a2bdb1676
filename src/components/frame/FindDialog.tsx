import { useEffect, useRef, useState, type KeyboardEvent as ReactKeyboardEvent, type RefObject } from 'react';
import type { SectionFrame } from '#contract/frame.ts';
import { useApi } from '#components/live/hooks.ts';
import { Dialog } from '#components/ui/Dialog.tsx';
import { TextField } from '#components/ui/Field.tsx';
import { onFind } from './find.ts';

interface Found {
  href: string;
  name: string;
  kind: string;
}

interface SiteItem {
  id: string;
  code: string;
  name: string;
}

interface StudyItem {
  id: string;
  title: string;
}

interface FindProps {
  /** Inside a study its sections and sites are found, elsewhere studies. */
  studyId?: string | undefined;
  sections: SectionFrame[];
}

const MOST = 8;

function useFound(query: string, { studyId, sections }: FindProps): { found: Found[]; waiting: boolean } {
  const asked = query.trim();
  const search = `query=${encodeURIComponent(asked)}&pageSize=${MOST}`;
  const address = studyId ? `/api/v1/studies/${studyId}/sites?${search}` : `/api/v1/studies?${search}`;
  const { data, isLoading } = useApi<{ items: (SiteItem | StudyItem)[] }>(asked ? address : null);
  const named = sections
    .filter((section) => section.name.toLowerCase().includes(asked.toLowerCase()))
    .map((section) => ({ href: section.href, name: section.name, kind: 'section' }));
  const items = asked ? (data?.items ?? []) : [];
  const listed = items.map((item) =>
    'title' in item
      ? { href: `/studies/${item.id}`, name: item.title, kind: 'study' }
      : {
          href: `/studies/${studyId}/sites?site=${encodeURIComponent(item.code)}`,
          name: item.name,
          kind: `site ${item.code}`,
        },
  );
  return { found: [...named, ...listed], waiting: isLoading };
}

/** Opened by f or the title block's Find: type, walk with the arrows, Enter goes there. */
export function FindDialog(props: FindProps) {
  const [open, setOpen] = useState(false);
  useEffect(() => onFind(() => setOpen(true)), []);
  return (
    <Dialog open={open} onClose={() => setOpen(false)} title="Find">
      <FindForm {...props} />
    </Dialog>
  );
}

/** Focus begins in the field; up and down walk from it through what was found. */
function useArrows(root: RefObject<HTMLDivElement | null>) {
  useEffect(() => {
    const element = root.current;
    element?.querySelector('input')?.focus();
    const walk = (event: KeyboardEvent) => {
      if (event.key !== 'ArrowDown' && event.key !== 'ArrowUp') return;
      event.preventDefault();
      const stops = [...(element?.querySelectorAll<HTMLElement>('input, a') ?? [])];
      const here = stops.findIndex((stop) => stop === document.activeElement);
      const there = here + (event.key === 'ArrowDown' ? 1 : -1);
      stops[Math.min(Math.max(there, 0), stops.length - 1)]?.focus();
    };
    element?.addEventListener('keydown', walk);
    return () => element?.removeEventListener('keydown', walk);
  }, [root]);
}

function FindForm(props: FindProps) {
  const [query, setQuery] = useState('');
  const { found, waiting } = useFound(query, props);
  const root = useRef<HTMLDivElement>(null);
  useArrows(root);
  const goFirst = (event: ReactKeyboardEvent) => {
    const first = found[0];
    if (event.key === 'Enter' && first) location.assign(first.href);
  };
  return (
    <div ref={root}>
      <TextField
        label={props.studyId ? 'Section or site' : 'Study'}
        type="search"
        autoComplete="off"
        value={query}
        onChange={(event) => setQuery(event.target.value)}
        onKeyDown={goFirst}
      />
      <ul className="mt-3 border-y border-ink text-ink">
        {found.map((one) => (
          <li key={one.href} className="border-b border-rule last:border-b-0">
            <a className="flex min-h-9 items-center gap-3 px-2 no-underline hover:bg-sunk" href={one.href}>
              {one.name}
              <span className="ml-auto text-xs text-ink-2">{one.kind}</span>
            </a>
          </li>
        ))}
      </ul>
      <p className="mt-2 text-sm" role="status">
        {query.trim() && found.length === 0 && !waiting ? `Nothing is called “${query.trim()}”.` : ''}
      </p>
    </div>
  );
}
