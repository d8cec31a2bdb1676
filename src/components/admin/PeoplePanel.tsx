import { useEffect, useState } from 'react';
import type { Person, PersonList, PersonPatch } from '#contract/admin.ts';
import { send } from '#components/live/api.ts';
import { useAction, useApi } from '#components/live/hooks.ts';
import { Pager } from '#components/studies/Pager.tsx';
import { Button, ConfirmDialog, EmptyState, Notice, TextField, toast } from '#components/ui/index.ts';
import { PeopleTable } from './PeopleTable.tsx';

interface PeoplePanelProps {
  list: PersonList;
  /** Goes up when something else may have changed who is who. */
  changes: number;
  onDone: () => void;
}

const PAGE_SIZE = 50;
const DONE: Record<keyof Omit<PersonPatch, 'version'>, [yes: string, no: string]> = {
  active: ['is active again', 'is deactivated and signed out'],
  administrator: ['is an administrator now', 'is no administrator any more'],
};

export function PeoplePanel({ list, changes, onDone }: PeoplePanelProps) {
  const [query, setQuery] = useState('');
  const [page, setPage] = useState(1);
  const [deactivating, setDeactivating] = useState<Person | null>(null);
  const { busy, error, run } = useAction();
  const address = `/api/v1/admin/people?query=${encodeURIComponent(query.trim())}&page=${page}&pageSize=${PAGE_SIZE}`;
  const { data = list, mutate } = useApi<PersonList>(address, {
    ...(query === '' && page === 1 ? { fallbackData: list } : {}),
    revalidateOnMount: false,
  });
  useEffect(() => {
    if (changes > 0) void mutate();
  }, [changes, mutate]);
  const change = async (person: Person, what: keyof typeof DONE, value: boolean) => {
    await run(async () => {
      await send('PATCH', `/api/v1/admin/people/${person.userId}`, {
        [what]: value,
        version: person.version,
      });
      toast(`${person.name} ${DONE[what][value ? 0 : 1]}`);
    });
    setDeactivating(null);
    await mutate();
    onDone();
  };
  return (
    <>
      <div className="mb-4 max-w-[22rem]">
        <TextField
          label="Find a person"
          type="search"
          autoComplete="off"
          value={query}
          onChange={(event) => {
            setQuery(event.target.value);
            setPage(1);
          }}
        />
      </div>
      {error && (
        <div className="mb-4">
          <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
            The list below is how it is now.
          </Notice>
        </div>
      )}
      <PeopleTable
        people={data.items}
        onActive={(person) => (person.active ? setDeactivating(person) : void change(person, 'active', true))}
        onAdministrator={(person) => void change(person, 'administrator', !person.administrator)}
      />
      {data.items.length === 0 && (
        <div className="mt-3">
          <EmptyState
            fact={`Nobody is called “${query.trim()}”`}
            actions={<Button onClick={() => setQuery('')}>Show everyone</Button>}
          >
            Names and mail addresses are searched.
          </EmptyState>
        </div>
      )}
      <Pager what="people" page={page} pageSize={PAGE_SIZE} total={data.total} onPage={setPage} />
      <ConfirmDialog
        open={deactivating !== null}
        onClose={() => setDeactivating(null)}
        onConfirm={() => deactivating && void change(deactivating, 'active', false)}
        busy={busy}
        destructive
        title={`Deactivate ${deactivating?.name ?? ''}?`}
        confirm={`Deactivate ${deactivating?.name ?? ''}`}
      >
        They are signed out everywhere and cannot sign in; their personal keys stop. Their name stays in every
        record, and you can activate them again.
      </ConfirmDialog>
    </>
  );
}
