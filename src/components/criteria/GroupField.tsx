import { useState } from 'react';
import { Button, Select, TextField } from '#components/ui/index.ts';
import { ApiError } from '#components/live/api.ts';
import type { CriterionGroup } from '#contract/criterion.ts';
import type { Groups } from './use-groups.ts';

const NONE = '';
const NEW = 'new';

interface GroupFieldProps {
  groups: Groups;
  /** Id of the group; empty for none. */
  value: string;
  error: string | undefined;
  onChange: (groupId: string) => void;
}

/** The group a criterion is weighed in: none, one there is, or one made here. */
export function GroupField({ groups, value, error, onChange }: GroupFieldProps) {
  const [making, setMaking] = useState(false);
  const choose = (chosen: string): void => {
    setMaking(chosen === NEW);
    if (chosen !== NEW) onChange(chosen);
  };
  return (
    <div className="cr-wide cr-group">
      <Select
        label="Group"
        hint="A criterion’s weight is its group’s weight times its own within the group."
        error={error}
        value={making ? NEW : value}
        choices={[
          { value: NONE, name: 'None, weighed by itself' },
          ...groups.items.map(({ id, name }) => ({ value: id, name })),
          { value: NEW, name: 'New group…' },
        ]}
        onChange={(event) => choose(event.target.value)}
      />
      {making && (
        <NewGroup
          groups={groups}
          onMade={({ id }) => {
            setMaking(false);
            onChange(id);
          }}
          onClose={() => setMaking(false)}
        />
      )}
    </div>
  );
}

interface NewGroupProps {
  groups: Groups;
  onMade: (group: CriterionGroup) => void;
  onClose: () => void;
}

/** The name of a group to make; no form of its own, since it may stand in one. */
export function NewGroup({ groups, onMade, onClose }: NewGroupProps) {
  const [name, setName] = useState('');
  const [error, setError] = useState<string | undefined>(undefined);
  const [busy, setBusy] = useState(false);
  const make = async (): Promise<void> => {
    if (busy) return;
    if (name.trim() === '') {
      setError('Give the group a name.');
      return;
    }
    setBusy(true);
    const made = await groups.add(name);
    setBusy(false);
    if (made instanceof ApiError) setError(made.errors[0]?.message ?? made.message);
    else onMade(made);
  };
  return (
    <div className="cr-new-group">
      <TextField
        label="Name of the new group"
        value={name}
        error={error}
        maxLength={80}
        onChange={(event) => setName(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Enter') {
            event.preventDefault();
            void make();
          }
        }}
      />
      <Button busy={busy} onClick={() => void make()}>
        Make group
      </Button>
      <Button kind="text" onClick={onClose}>
        Not now
      </Button>
    </div>
  );
}
