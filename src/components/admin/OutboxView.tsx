import { useState, type ReactNode } from 'react';
import type { KeptMail, MailEntry, Outbox } from '#contract/admin.ts';
import { useApi, useFinding } from '#components/live/hooks.ts';
import { Pager } from '#components/studies/Pager.tsx';
import { EmptyState, Finding, Panel, SideSheet, TableScroll, Tag } from '#components/ui/index.ts';
import { at, outboxFinding } from './words.ts';

const PAGE_SIZE = 50;
const READ_AGAIN_MS = 5_000;
const STATES: Record<MailEntry['state'], string> = {
  queued: 'Waits',
  sent: 'Sent',
  failed: 'Failed, is tried again',
};

/** Mail that stayed here for want of a mail server, and the log of all mail. */
export function OutboxView({ outbox, children }: { outbox: Outbox; children: ReactNode }) {
  const [page, setPage] = useState(1);
  const [reading, setReading] = useState<KeptMail | null>(null);
  const { data = outbox } = useApi<Outbox>(`/api/v1/admin/outbox?page=${page}&pageSize=${PAGE_SIZE}`, {
    ...(page === 1 ? { fallbackData: outbox } : {}),
    refreshInterval: READ_AGAIN_MS,
  });
  const finding = outboxFinding(data);
  useFinding(finding);
  return (
    <>
      <Finding>{finding}</Finding>
      {children}
      <div className="grid grid-cols-1 gap-9">
        {(!data.mailServer || data.kept.total > 0) && (
          <Panel
            title="Kept here"
            caption="Without a mail server (SMTP_URL) nothing leaves this machine. Each message stands here as it would have gone out."
          >
            <KeptTable items={data.kept.items} onRead={setReading} />
          </Panel>
        )}
        <Panel
          title="Sent"
          caption="Every message and how it fared. Its text is kept only until it is sent, because it may carry a link."
        >
          <SentTable items={data.sent.items} />
        </Panel>
        <Pager
          what="messages"
          page={page}
          pageSize={PAGE_SIZE}
          total={Math.max(data.kept.total, data.sent.total)}
          onPage={setPage}
        />
        <SideSheet open={reading !== null} onClose={() => setReading(null)} title={reading?.subject ?? ''}>
          {reading && <Message mail={reading} />}
        </SideSheet>
      </div>
    </>
  );
}

function Message({ mail }: { mail: KeptMail }) {
  return (
    <>
      <dl className="mb-4 grid grid-cols-[4rem_1fr] gap-y-1 text-sm">
        <dt className="text-ink-3">To</dt>
        <dd>{mail.to.join(', ')}</dd>
        <dt className="text-ink-3">From</dt>
        <dd>{mail.from}</dd>
        <dt className="text-ink-3">Time</dt>
        <dd>{at(mail.receivedAt)} UTC</dd>
      </dl>
      {mail.text.split(/\n{2,}/).map((paragraph, index) => (
        <p key={`${index}${paragraph}`} className="mb-3 break-words">
          {/^https?:\/\/\S+$/.test(paragraph.trim()) ? (
            <a href={paragraph.trim()}>{paragraph.trim()}</a>
          ) : (
            paragraph
          )}
        </p>
      ))}
    </>
  );
}

function KeptTable({ items, onRead }: { items: readonly KeptMail[]; onRead: (mail: KeptMail) => void }) {
  if (items.length === 0)
    return <EmptyState fact="No mail yet">Invite someone, and the invitation stands here.</EmptyState>;
  return (
    <TableScroll label="Mail kept here">
      <table className="table" data-hover="">
        <thead>
          <tr>
            <th scope="col">Subject</th>
            <th scope="col">To</th>
            <th scope="col" className="num">
              Time <span className="unit">UTC</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((mail) => (
            <tr key={mail.id}>
              <th scope="row">
                <button
                  type="button"
                  className="min-h-6 text-left underline underline-offset-3"
                  onClick={() => onRead(mail)}
                >
                  {mail.subject}
                </button>
              </th>
              <td>{mail.to.join(', ')}</td>
              <td className="num">{at(mail.receivedAt)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

function SentTable({ items }: { items: readonly MailEntry[] }) {
  if (items.length === 0)
    return (
      <EmptyState fact="Nothing was sent yet">
        Invitations and links for passwords are listed here.
      </EmptyState>
    );
  return (
    <TableScroll label="Mail sent">
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Subject</th>
            <th scope="col">To</th>
            <th scope="col">State</th>
            <th scope="col" className="num">
              Attempts
            </th>
            <th scope="col" className="num">
              Time <span className="unit">UTC</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {items.map((mail) => (
            <tr key={mail.id} data-refused={mail.state === 'failed' ? '' : undefined}>
              <th scope="row">{mail.subject}</th>
              <td>{mail.to}</td>
              <td>
                <Tag>{STATES[mail.state]}</Tag>
                {mail.error && <span className="sub">{mail.error}</span>}
              </td>
              <td className="num">{mail.attempts}</td>
              <td className="num">{at(mail.sentAt ?? mail.createdAt)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}
