import { useState } from 'react';
import { formatDateTimeUtc } from '#contract/format.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { Button, ConfirmDialog, Notice, TableScroll, Tag } from '#components/ui/index.ts';

export interface SessionRow {
  here: boolean;
  browser: string;
  address: string;
  since: string;
  lastSeenAt: string;
}

export function SessionsTable({ sessions }: { sessions: SessionRow[] }) {
  const [asking, setAsking] = useState(false);
  const { busy, error, run } = useAction();
  const leave = () =>
    run(async () => {
      await send('POST', '/api/auth/revoke-sessions', {});
      location.assign('/sign-in');
    });
  return (
    <>
      <TableScroll label="Sessions">
        <table className="table">
          <thead>
            <tr>
              <th scope="col">Browser</th>
              <th scope="col">Address</th>
              <th scope="col" className="num">
                Signed in <span className="unit">UTC</span>
              </th>
              <th scope="col" className="num">
                Last used <span className="unit">UTC, to the hour</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {sessions.map((session) => (
              <tr key={`${session.since}${session.address}${session.browser}`}>
                <th scope="row">
                  {session.browser} {session.here && <Tag>This one</Tag>}
                </th>
                <td className="num text-left!">{session.address || '–'}</td>
                <td className="num">{formatDateTimeUtc(session.since).replace(' UTC', '')}</td>
                <td className="num">{formatDateTimeUtc(session.lastSeenAt).replace(' UTC', '')}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      <div className="mt-3">
        <Button onClick={() => setAsking(true)}>Sign out everywhere</Button>
      </div>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        onConfirm={() => void leave()}
        busy={busy}
        title="Sign out everywhere?"
        confirm="Sign out everywhere"
      >
        Every session ends, this one too. Personal keys go on working.
        {error && <Notice fact={error.message}>No session was ended.</Notice>}
      </ConfirmDialog>
    </>
  );
}
