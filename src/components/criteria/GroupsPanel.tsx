import { useState } from 'react';
import { Button, ConfirmDialog, Panel, TextField } from '#components/ui/index.ts';
import type { ApiError } from '#components/live/api.ts';
import type { Criterion, CriterionGroup } from '#contract/criterion.ts';
import { formatCount, listInWords } from '#contract/format.ts';
import { NewGroup } from './GroupField.tsx';
import type { Groups } from './use-groups.ts';

interface GroupsPanelProps {
  groups: Groups;
  criteria: readonly Criterion[];
  /** Why they cannot be changed; undefined where they can. */
  locked: string | undefined;
  /** A group was taken away, and its criteria with it stand by themselves. */
  onRemoved: (group: CriterionGroup) => void;
}

/** The study's groups of criteria: made, renamed and taken away here; filled from each criterion. */
export function GroupsPanel({ groups, criteria, locked, onRemoved }: GroupsPanelProps) {
  const [adding, setAdding] = useState(false);
  const none = groups.items.length === 0;
  return (
    <Panel
      title="Groups"
      caption={
        none
          ? 'No groups: every criterion is weighed by itself. Groups share out weight first among themselves, then within each.'
          : (locked ?? 'A criterion is put into a group from its own settings.')
      }
    >
      {!none && (
        <ul className="cr-groups">
          {groups.items.map((group) => (
            <GroupLine
              key={group.id}
              group={group}
              groups={groups}
              inside={criteria.filter(({ groupId }) => groupId === group.id)}
              locked={locked}
              onRemoved={onRemoved}
            />
          ))}
        </ul>
      )}
      {!locked && (
        <div className="mt-3">
          {adding ? (
            <NewGroup groups={groups} onMade={() => setAdding(false)} onClose={() => setAdding(false)} />
          ) : (
            <Button size="small" icon="add" onClick={() => setAdding(true)}>
              Add group
            </Button>
          )}
        </div>
      )}
    </Panel>
  );
}

interface LineProps {
  group: CriterionGroup;
  groups: Groups;
  inside: readonly Criterion[];
  locked: string | undefined;
  onRemoved: (group: CriterionGroup) => void;
}

function GroupLine({ group, groups, inside, locked, onRemoved }: LineProps) {
  const [asking, setAsking] = useState(false);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const remove = async (): Promise<void> => {
    setAsking(false);
    const refused = await groups.remove(group);
    setFailure(refused);
    if (!refused) onRemoved(group);
  };
  const what = inside.length === 0 ? 'no criteria yet' : listInWords(inside.map(({ name }) => name));
  return (
    <li>
      {locked ? (
        <span className="name">{group.name}</span>
      ) : (
        <GroupName key={`${group.id}/${group.version}`} group={group} groups={groups} />
      )}
      <span className="caption">{what}</span>
      {!locked && (
        <Button size="small" kind="destructive" icon="remove" onClick={() => setAsking(true)}>
          Remove {group.name}
        </Button>
      )}
      {failure && <p className="fld-error">{failure.message} The group is shown as it now is.</p>}
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        onConfirm={() => void remove()}
        title={`Remove ${group.name}?`}
        confirm={`Remove ${group.name}`}
        destructive
      >
        {inside.length === 0
          ? 'No criterion is in it.'
          : `${formatCount(inside.length, 'criterion stays', 'criteria stay')} and will be weighed each by itself. Weights said of the group count for nothing from then on.`}
      </ConfirmDialog>
    </li>
  );
}

function GroupName({ group, groups }: { group: CriterionGroup; groups: Groups }) {
  const [name, setName] = useState(group.name);
  const [error, setError] = useState<string | undefined>(undefined);
  const leave = async (): Promise<void> => {
    const wanted = name.trim();
    setError(undefined);
    if (wanted === group.name) return;
    if (wanted === '') {
      setError('Give the group a name.');
      return;
    }
    const refused = await groups.rename(group, wanted);
    if (refused) setError(refused.errors[0]?.message ?? refused.message);
  };
  return (
    <TextField
      label={`Name of ${group.name}`}
      labelHidden
      value={name}
      error={error}
      maxLength={80}
      onChange={(event) => setName(event.target.value)}
      onBlur={() => void leave()}
      onKeyDown={(event) => {
        if (event.key === 'Enter') void leave();
        if (event.key === 'Escape') setName(group.name);
      }}
    />
  );
}
