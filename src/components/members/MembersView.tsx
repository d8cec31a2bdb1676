import { useCallback, useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { useApi, useFinding } from '#components/live/hooks.ts';
import { useStudyEvents } from '#components/live/study-events.ts';
import { Pager } from '#components/studies/Pager.tsx';
import { Button, Finding, Notice, Panel, toast } from '#components/ui/index.ts';
import { ROLE_NAMES } from '#components/studies/words.ts';
import type { MemberList, StudyMember } from '#contract/member.ts';
import { STUDY_ROLES, type StudyRole } from '#contract/study.ts';
import { AddMember } from './AddMember.tsx';
import { MemberTable } from './MemberTable.tsx';
import { RemoveDialog } from './RemoveDialog.tsx';
import { mayNotLeave, membersFinding, nameOf, ROLE_MEANINGS } from './words.ts';

interface MembersProps {
  studyId: string;
  list: MemberList;
  /** Why the person looking may not change members; none where they may. */
  locked: string | undefined;
}

const PAGE_SIZE = 50;

function Roles() {
  return (
    <Panel
      title="What each role does"
      caption="Beyond reading, filtering, exporting and computing, which every role may."
    >
      <dl className="grid gap-x-6 gap-y-2 text-sm phone:grid-cols-[8rem_1fr]">
        {STUDY_ROLES.map((role) => (
          <div key={role} className="contents">
            <dt className="font-medium">{ROLE_NAMES[role]}</dt>
            <dd className="text-ink-2">{ROLE_MEANINGS[role]}</dd>
          </div>
        ))}
      </dl>
    </Panel>
  );
}

/** A study's members: who they are, what they may, and adding, changing and removing for its leads. */
export function MembersView({ studyId, list, locked }: MembersProps) {
  const [page, setPage] = useState(1);
  const [removing, setRemoving] = useState<StudyMember | null>(null);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const { data = list, mutate } = useApi<MemberList>(
    `/api/v1/studies/${studyId}/members?page=${page}&pageSize=${PAGE_SIZE}`,
    page === 1 ? { fallbackData: list, revalidateOnMount: false } : {},
  );
  const again = useCallback(() => void mutate(), [mutate]);
  useStudyEvents(studyId, again);
  const finding = membersFinding(data);
  useFinding(finding);
  const changeRole = async (member: StudyMember, role: StudyRole) => {
    setFailure(null);
    try {
      const patch = { role, version: member.version };
      await send('PATCH', `/api/v1/studies/${studyId}/members/${member.id}`, patch);
      toast(`${nameOf(member)} is ${ROLE_NAMES[role].toLowerCase()} now`);
      if (member.you) location.reload();
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
    }
    await mutate();
  };
  return (
    <>
      <Finding why={locked}>{finding}</Finding>
      {failure && (
        <div className="mb-4">
          <Notice
            fact={failure.message}
            requestId={failure.requestId}
            actions={<Button onClick={() => setFailure(null)}>Close this</Button>}
          >
            The list below is how it is now.
          </Notice>
        </div>
      )}
      <MemberTable
        members={data.items}
        locked={locked}
        stay={mayNotLeave(data)}
        onRole={(member, role) => void changeRole(member, role)}
        onRemove={setRemoving}
      />
      <Pager what="members" page={page} pageSize={PAGE_SIZE} total={data.total} onPage={setPage} />
      <div className="mt-9 grid gap-9 sheet:grid-cols-2 sheet:gap-14">
        {!locked && (
          <Panel title="Add a member">
            <AddMember studyId={studyId} onAdded={again} />
          </Panel>
        )}
        <Roles />
      </div>
      {removing && (
        <RemoveDialog
          studyId={studyId}
          member={removing}
          onClose={() => setRemoving(null)}
          onDone={() => {
            toast(`${nameOf(removing)} removed`);
            setRemoving(null);
            again();
          }}
        />
      )}
    </>
  );
}
