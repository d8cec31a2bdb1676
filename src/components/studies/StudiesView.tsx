import { useEffect, useState } from 'react';
import { useApi, useFinding } from '#components/live/hooks.ts';
import { Button, EmptyState, Finding, Notice, toast } from '#components/ui/index.ts';
import type { Study, StudyList, StudyListQuery } from '#contract/study.ts';
import { ArchiveDialog } from './ArchiveDialog.tsx';
import { NewStudyDialog } from './NewStudyDialog.tsx';
import { Pager } from './Pager.tsx';
import { queryOf, searchOf } from './query.ts';
import { StudyFilters } from './StudyFilters.tsx';
import { StudyTable } from './StudyTable.tsx';
import { isFiltered, lastChange, studiesFinding } from './words.ts';

interface StudiesProps {
  query: StudyListQuery;
  list: StudyList;
}

/** The query of the address; changing it changes the address, and Back brings it back. */
function useQuery(initial: StudyListQuery) {
  const [query, setQuery] = useState(initial);
  useEffect(() => {
    const read = () => setQuery(queryOf(new URLSearchParams(location.search)));
    addEventListener('popstate', read);
    return () => removeEventListener('popstate', read);
  }, []);
  const change = (part: Partial<StudyListQuery>) => {
    const next = { ...query, page: 1, ...part };
    history.replaceState(history.state, '', location.pathname + searchOf(next));
    setQuery(next);
  };
  return [query, change] as const;
}

function Nothing({ filtered, onNew, onAll }: { filtered: boolean; onNew: () => void; onAll: () => void }) {
  return filtered ? (
    <EmptyState fact="Nothing matches." actions={<Button onClick={onAll}>Show all current studies</Button>}>
      Search with other words, or look among the archived studies.
    </EmptyState>
  ) : (
    <EmptyState
      fact="You are in no study yet."
      actions={
        <Button icon="add" onClick={onNew}>
          Make a study
        </Button>
      }
    >
      Make one, blank or from the example. A lead of another study can add you to it by your mail address.
    </EmptyState>
  );
}

/** The list of studies with its search, and the ways to make, archive and restore one. */
export function StudiesView({ query: initialQuery, list }: StudiesProps) {
  const [query, change] = useQuery(initialQuery);
  const [making, setMaking] = useState<{ copyOf: Study | null } | null>(null);
  const [archiving, setArchiving] = useState<Study | null>(null);
  const first = searchOf(query) === searchOf(initialQuery);
  const {
    data = list,
    error,
    isValidating,
    mutate,
  } = useApi<StudyList>(
    `/api/v1/studies${searchOf(query)}`,
    first ? { fallbackData: list, revalidateOnMount: false } : {},
  );
  const finding = studiesFinding(data, query);
  useFinding(finding);
  const done = (study: Study) => {
    setArchiving(null);
    toast(`${study.title} is ${study.archived ? 'archived' : 'restored'}`);
    void mutate();
  };
  return (
    <>
      <Finding
        why={lastChange(data, query)}
        actions={
          <Button kind="primary" icon="add" onClick={() => setMaking({ copyOf: null })}>
            New study
          </Button>
        }
      >
        {finding}
      </Finding>
      <StudyFilters query={query} onChange={change} />
      {error ? (
        <Notice
          fact={error.message}
          requestId={error.requestId}
          actions={<Button onClick={() => void mutate()}>Read the list again</Button>}
        >
          What you see below is the last list that was read.
        </Notice>
      ) : null}
      <StudyTable
        studies={data.items}
        stale={isValidating}
        onCopy={(copyOf) => setMaking({ copyOf })}
        onArchive={setArchiving}
      />
      {data.items.length === 0 && (
        <div className="mt-4">
          <Nothing
            filtered={isFiltered(query)}
            onNew={() => setMaking({ copyOf: null })}
            onAll={() => change({ query: '', state: undefined, archived: 'false' })}
          />
        </div>
      )}
      <Pager
        what="studies"
        page={query.page}
        pageSize={query.pageSize}
        total={data.total}
        onPage={(page) => change({ page })}
      />
      <NewStudyDialog
        open={making !== null}
        copyOf={making?.copyOf ?? null}
        onClose={() => setMaking(null)}
      />
      <ArchiveDialog study={archiving} onClose={() => setArchiving(null)} onDone={done} />
    </>
  );
}
