import { useState } from 'react';
import type { LeaderlessList, LeaderlessStudy, PersonList } from '#contract/admin.ts';
import { send } from '#components/live/api.ts';
import { useAction, useApi } from '#components/live/hooks.ts';
import { ROLE_NAMES } from '#components/studies/words.ts';
import { Button, Notice, Select, TableScroll, toast } from '#components/ui/index.ts';
import { at } from './words.ts';

const ADDRESS = '/api/v1/admin/leaderless';

/** Studies no active lead can reach; naming one gives the study back to its people. */
export function LeaderlessPanel({ list, onDone }: { list: LeaderlessList; onDone: () => void }) {
  const { busy, error, run } = useAction();
  const { data: everyone } = useApi<PersonList>('/api/v1/admin/people?pageSize=500');
  const name = (studyId: string, userId: string, who: string) =>
    run(async () => {
      await send('POST', ADDRESS, { studyId, userId });
      toast(`${who} leads the study now`);
      onDone();
    });
  return (
    <>
      {error && (
        <div className="mb-3">
          <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
            The study is as it was.
          </Notice>
        </div>
      )}
      <TableScroll label="Studies without an active lead">
        <table className="table">
          <thead>
            <tr>
              <th scope="col" className="num">
                Made <span className="unit">UTC</span>
              </th>
              <th scope="col">Its people</th>
              <th scope="col">New lead</th>
            </tr>
          </thead>
          <tbody>
            {list.items.map((study) => (
              <StudyRow
                key={study.studyId}
                study={study}
                others={everyone?.items.filter(({ active }) => active) ?? []}
                busy={busy}
                onName={(userId, who) => void name(study.studyId, userId, who)}
              />
            ))}
          </tbody>
        </table>
      </TableScroll>
    </>
  );
}

interface StudyRowProps {
  study: LeaderlessStudy;
  others: readonly { userId: string; name: string }[];
  busy: boolean;
  onName: (userId: string, name: string) => void;
}

function StudyRow({ study, others, busy, onName }: StudyRowProps) {
  const active = study.members.filter((member) => member.active);
  const inside = new Set(active.map(({ userId }) => userId));
  const candidates = [...active, ...others.filter(({ userId }) => !inside.has(userId))];
  const [chosen, setChosen] = useState(active[0]?.userId ?? '');
  const person = candidates.find(({ userId }) => userId === chosen);
  const choices = candidates.map(({ userId, name }) => ({
    value: userId,
    name: inside.has(userId) ? name : `${name}, not in the study`,
  }));
  const made = at(study.createdAt);
  return (
    <tr>
      <td className="num">{made}</td>
      <td>
        {study.members
          .map(
            ({ name, role, active: on }) =>
              `${name} (${ROLE_NAMES[role].toLowerCase()}${on ? '' : ', deactivated'})`,
          )
          .join(', ')}
      </td>
      <td>
        <span className="flex flex-wrap items-center gap-2 py-1">
          <Select
            label={`New lead of the study made ${made}`}
            labelHidden
            choices={[{ value: '', name: 'Choose someone' }, ...choices]}
            value={chosen}
            onChange={(event) => setChosen(event.target.value)}
          />
          <Button
            busy={busy}
            notYet={person ? undefined : 'Choose who shall lead it.'}
            onClick={() => person && onName(person.userId, person.name)}
          >
            Name lead
          </Button>
        </span>
      </td>
    </tr>
  );
}
