import { Button, Select, Tag } from '#components/ui/index.ts';
import { formatDateUtc } from '#contract/format.ts';
import type { StudyMember } from '#contract/member.ts';
import { STUDY_ROLES, type StudyRole } from '#contract/study.ts';
import { ROLE_NAMES } from '#components/studies/words.ts';
import { nameOf, STANDING_NAMES } from './words.ts';

interface MemberActions {
  /** Whether the person looking is a lead of a study that takes changes; otherwise why not. */
  locked: string | undefined;
  /** Why they can't leave; undefined where they can. */
  stay: string | undefined;
  onRole: (member: StudyMember, role: StudyRole) => void;
  onRemove: (member: StudyMember) => void;
}

const CHOICES = STUDY_ROLES.map((value) => ({ value, name: ROLE_NAMES[value] }));

function MemberRow({ member, locked, stay, onRole, onRemove }: { member: StudyMember } & MemberActions) {
  const name = nameOf(member);
  return (
    <tr>
      <th scope="row">
        <span className="name">
          {name} {member.you && <Tag>You</Tag>}
        </span>
        {member.name && <span className="sub">{member.email}</span>}
      </th>
      <td>
        {locked ? (
          ROLE_NAMES[member.role]
        ) : (
          <span className="block w-36">
            <Select
              label={`Role of ${name}`}
              labelHidden
              choices={CHOICES}
              value={member.role}
              onChange={(event) => {
                const role = STUDY_ROLES.find((one) => one === event.target.value);
                if (role) onRole(member, role);
              }}
            />
          </span>
        )}
      </td>
      <td>{STANDING_NAMES[member.standing]}</td>
      <td className="num">{formatDateUtc(member.addedAt)}</td>
      <td>
        <span className="flex justify-end">
          <Button
            size="small"
            icon="remove"
            aria-label={member.you ? 'Leave the study' : `Remove ${name}`}
            notYet={member.you ? stay : locked}
            onClick={() => onRemove(member)}
          >
            {member.you ? 'Leave' : 'Remove'}
          </Button>
        </span>
      </td>
    </tr>
  );
}

/** A study's people, with their roles. */
export function MemberTable({ members, ...actions }: { members: readonly StudyMember[] } & MemberActions) {
  return (
    <div className="table-scroll" role="region" aria-label="Members" tabIndex={0}>
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Person</th>
            <th scope="col">Role</th>
            <th scope="col">Account</th>
            <th scope="col" className="num">
              Added <span className="unit">UTC day</span>
            </th>
            <th scope="col">
              <span className="sr-only">Actions</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {members.map((member) => (
            <MemberRow key={member.id} member={member} {...actions} />
          ))}
        </tbody>
      </table>
    </div>
  );
}
