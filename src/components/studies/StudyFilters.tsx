import { useEffect, useRef } from 'react';
import { Segmented, Select, TextField } from '#components/ui/index.ts';
import { STATE_NAMES } from '#contract/frame.ts';
import { STUDY_STATES, type StudyListQuery } from '#contract/study.ts';

interface FiltersProps {
  query: StudyListQuery;
  onChange: (change: Partial<StudyListQuery>) => void;
}

const STATES = [
  { value: '', name: 'Any state' },
  ...STUDY_STATES.map((value) => ({ value, name: STATE_NAMES[value] })),
];
const ARCHIVE = [
  { value: 'false', name: 'Current' },
  { value: 'true', name: 'Archived' },
  { value: 'all', name: 'All' },
] as const;

const PAUSE_MS = 250;

/**
 * A search field that speaks after a pause in typing. What was typed before the page came to life counts too, and
 * the query of the address is shown where it changes by other ways than typing.
 */
function useSearchField({ query, onChange }: FiltersProps) {
  const field = useRef<HTMLInputElement>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const asked = useRef(query.query);
  const latest = useRef(onChange);
  useEffect(() => {
    latest.current = onChange;
  });
  const ask = () => {
    clearTimeout(timer.current);
    timer.current = setTimeout(() => {
      const text = field.current?.value.trim() ?? '';
      if (text === asked.current) return;
      asked.current = text;
      latest.current({ query: text });
    }, PAUSE_MS);
  };
  useEffect(() => {
    ask();
    return () => clearTimeout(timer.current);
  }, []);
  useEffect(() => {
    if (query.query === asked.current) return;
    asked.current = query.query;
    if (field.current) field.current.value = query.query;
  }, [query.query]);
  return { ref: field, defaultValue: query.query, onInput: ask };
}

/** Search while typing, by state, archived or not. Everything goes into the address. */
export function StudyFilters({ query, onChange }: FiltersProps) {
  const search = useSearchField({ query, onChange });
  return (
    <div className="mb-4 flex flex-wrap items-end gap-4" role="search" aria-label="Studies">
      <div className="w-full phone:w-80">
        <TextField
          label="Find a study"
          hint="In title, organisation and question"
          type="search"
          maxLength={200}
          {...search}
        />
      </div>
      <div className="w-44 phone:pb-5">
        <Select
          label="State"
          choices={STATES}
          value={query.state ?? ''}
          onChange={(event) =>
            onChange({ state: STUDY_STATES.find((state) => state === event.target.value) })
          }
        />
      </div>
      <div className="phone:pb-5">
        <Segmented
          legend="Archived or not"
          segments={ARCHIVE}
          value={query.archived}
          onChange={(archived) => onChange({ archived })}
        />
      </div>
    </div>
  );
}
