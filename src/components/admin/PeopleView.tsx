import { useState, type ReactNode } from 'react';
import type { InvitationList, LeaderlessList, PersonList } from '#contract/admin.ts';
import { useApi, useFinding } from '#components/live/hooks.ts';
import { Finding, Panel } from '#components/ui/index.ts';
import { InvitePanel } from './InvitePanel.tsx';
import { LeaderlessPanel } from './LeaderlessPanel.tsx';
import { PeoplePanel } from './PeoplePanel.tsx';
import { peopleFinding } from './words.ts';

interface PeopleProps {
  people: PersonList;
  invitations: InvitationList;
  leaderless: LeaderlessList;
  /** The tabs of the administration, between finding and panels. */
  children: ReactNode;
}

const INVITATIONS = '/api/v1/admin/invitations';
const LEADERLESS = '/api/v1/admin/leaderless';

/** Accounts, invitations and studies without a lead. */
export function PeopleView(props: PeopleProps) {
  const [changes, setChanges] = useState(0);
  const first = { revalidateOnMount: false };
  const invitations = useApi<InvitationList>(INVITATIONS, { fallbackData: props.invitations, ...first });
  const leaderless = useApi<LeaderlessList>(LEADERLESS, { fallbackData: props.leaderless, ...first });
  const open = leaderless.data ?? props.leaderless;
  const asked = invitations.data ?? props.invitations;
  const finding = peopleFinding(props.people.total, asked, open);
  useFinding(finding);
  // A person deactivated may have been a study's only lead; a new lead may have been anyone.
  const again = () => {
    setChanges((count) => count + 1);
    void leaderless.mutate();
  };
  return (
    <>
      <Finding>{finding}</Finding>
      {props.children}
      <div className="grid grid-cols-1 gap-9">
        {open.total > 0 && (
          <Panel
            title="Studies without an active lead"
            caption="Name one. You see who is in the study, not what it holds."
          >
            <LeaderlessPanel list={open} onDone={again} />
          </Panel>
        )}
        <Panel
          title="Invitations"
          caption="The link goes by mail, works once and for a week. A new one makes the earlier one useless."
        >
          <InvitePanel list={asked} onDone={() => void invitations.mutate()} />
        </Panel>
        <Panel
          title="People"
          caption="Deactivating signs someone out everywhere and keeps their name in every record. Nobody is deleted."
        >
          <PeoplePanel list={props.people} changes={changes} onDone={again} />
        </Panel>
      </div>
    </>
  );
}
