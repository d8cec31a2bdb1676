import type { Invitation, InvitationList } from '#contract/admin.ts';
import { formatCount } from '#contract/format.ts';
import { Button, TableScroll, Tag } from '#components/ui/index.ts';
import { at } from './words.ts';

interface InvitationTableProps {
  list: InvitationList;
  busy: boolean;
  onInvite: (email: string) => void;
  onWithdraw: (invitation: Invitation) => void;
}

/** First the addresses that wait to be invited, then the invitations that are out. */
export function InvitationTable({ list, busy, onInvite, onWithdraw }: InvitationTableProps) {
  const invited = new Set(list.items.filter(({ expired }) => !expired).map(({ email }) => email));
  const waiting = list.requests.filter(({ email }) => !invited.has(email));
  if (waiting.length + list.items.length === 0)
    return <p className="text-ink-2">No invitation is out, and nobody asks for one.</p>;
  return (
    <TableScroll label="Invitations">
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Address</th>
            <th scope="col">Standing</th>
            <th scope="col">By</th>
            <th scope="col" className="num">
              Since <span className="unit">UTC</span>
            </th>
            <th scope="col" className="num">
              Works until <span className="unit">UTC</span>
            </th>
            <th scope="col">
              <span className="sr-only">Changes</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {waiting.map((request) => (
            <tr key={request.email}>
              <th scope="row">{request.email}</th>
              <td>Asked for, in {formatCount(request.studies, 'study', 'studies')}</td>
              <td>{request.askedBy ?? '–'}</td>
              <td className="num">{at(request.since)}</td>
              <td className="num">–</td>
              <td className="text-right!">
                <Button
                  size="small"
                  icon="mail"
                  busy={busy}
                  aria-label={`Invite ${request.email}`}
                  onClick={() => onInvite(request.email)}
                >
                  Invite
                </Button>
              </td>
            </tr>
          ))}
          {list.items.map((invitation) => (
            <tr key={invitation.id} data-set-aside={invitation.expired ? '' : undefined}>
              <th scope="row">{invitation.email}</th>
              <td>
                <span className="flex flex-wrap gap-1">
                  <Tag>{invitation.expired ? 'Out of date' : 'Invited'}</Tag>
                  {invitation.administrator && <Tag solid>Administrator</Tag>}
                </span>
              </td>
              <td>{invitation.invitedBy ?? 'Start command'}</td>
              <td className="num">{at(invitation.createdAt)}</td>
              <td className="num">{at(invitation.expiresAt)}</td>
              <td className="text-right!">
                <Button
                  size="small"
                  kind="destructive"
                  icon="remove"
                  busy={busy}
                  aria-label={`Withdraw the invitation of ${invitation.email}`}
                  onClick={() => onWithdraw(invitation)}
                >
                  Withdraw
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}
