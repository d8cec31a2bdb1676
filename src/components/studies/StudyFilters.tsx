import { useEffect, useRef, useState } from 'react';
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

/** Search while typing, by state, archived or not. Everything goes into the address. */
export function StudyFilters({ query, onChange }: FiltersProps) {
  const [text, setText] = useState(query.query);
  const latest = useRef(onChange);
  useEffect(() => {
    latest.current = onChange;
  });
  useEffect(() => {
    if (text.trim() === query.query) return;
    const timer = setTimeout(() => latest.current({ query: text.trim() }), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text, query.query]);
  return (
    <div className="mb-4 flex flex-wrap items-end gap-4" role="search" aria-label="Studies">
      <div className="w-full phone:w-80">
        <TextField
          label="Find a study"
          hint="In title, organisation and question"
          type="search"
          maxLength={200}
          value={text}
          onChange={(event) => setText(event.target.value)}
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
