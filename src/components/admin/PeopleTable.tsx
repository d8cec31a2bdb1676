import type { Person } from '#contract/admin.ts';
import { Button, TableScroll, Tag } from '#components/ui/index.ts';
import { at } from './words.ts';

interface PeopleTableProps {
  people: readonly Person[];
  onActive: (person: Person) => void;
  onAdministrator: (person: Person) => void;
}

export function PeopleTable({ people, ...actions }: PeopleTableProps) {
  return (
    <TableScroll label="People">
      <table className="table" data-hover="">
        <thead>
          <tr>
            <th scope="col">Name</th>
            <th scope="col">Standing</th>
            <th scope="col" className="num">
              Account since <span className="unit">UTC</span>
            </th>
            <th scope="col" className="num">
              Last seen <span className="unit">UTC, to the hour</span>
            </th>
            <th scope="col">
              <span className="sr-only">Changes</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {people.map((person) => (
            <PersonRow key={person.userId} person={person} {...actions} />
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

function PersonRow({
  person,
  onActive,
  onAdministrator,
}: { person: Person } & Omit<PeopleTableProps, 'people'>) {
  const { name, email, administrator, active, you } = person;
  return (
    <tr data-set-aside={active ? undefined : ''}>
      <th scope="row">
        <span className="name">
          {name}
          {you && <span className="font-normal text-ink-2"> (you)</span>}
        </span>
        <span className="sub">{email}</span>
      </th>
      <td>
        <span className="flex flex-wrap gap-1">
          <Tag>{active ? 'Active' : 'Deactivated'}</Tag>
          {administrator && <Tag solid>Administrator</Tag>}
        </span>
      </td>
      <td className="num">{at(person.createdAt)}</td>
      <td className="num">{person.lastSeenAt ? at(person.lastSeenAt) : '–'}</td>
      <td>
        <span className="flex justify-end gap-2 whitespace-nowrap">
          <Button
            size="small"
            notYet={active ? undefined : 'Activate the account first.'}
            aria-label={`${administrator ? 'Make no administrator' : 'Make administrator'}: ${name}`}
            onClick={() => onAdministrator(person)}
          >
            {administrator ? 'Make no administrator' : 'Make administrator'}
          </Button>
          <Button
            size="small"
            kind={active ? 'destructive' : 'secondary'}
            icon={active ? 'remove' : 'restore'}
            notYet={you ? 'Another administrator has to deactivate you.' : undefined}
            aria-label={`${active ? 'Deactivate' : 'Activate'} ${name}`}
            onClick={() => onActive(person)}
          >
            {active ? 'Deactivate' : 'Activate'}
          </Button>
        </span>
      </td>
    </tr>
  );
}
