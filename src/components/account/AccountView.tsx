import type { Account, PersonalKeyList } from '#contract/account.ts';
import { Panel } from '#components/ui/index.ts';
import { KeysPanel } from './KeysPanel.tsx';
import { NamePanel } from './NamePanel.tsx';
import { PasswordPanel } from './PasswordPanel.tsx';
import { SessionsTable, type SessionRow } from './SessionsTable.tsx';

interface AccountProps {
  account: Account;
  keys: PersonalKeyList;
  sessions: SessionRow[];
}

/** One's own account: name, password, sessions, personal keys. */
export function AccountView({ account, keys, sessions }: AccountProps) {
  return (
    <div className="grid grid-cols-1 gap-x-14 gap-y-9 tablet:grid-cols-2">
      <Panel title="Name" caption={`You sign in as ${account.email}.`}>
        <NamePanel account={account} />
      </Panel>
      <Panel title="Password" caption="Changing it signs out every other session.">
        <PasswordPanel />
      </Panel>
      <div className="tablet:col-span-2">
        <Panel
          title="Sessions"
          caption="Where you are signed in. A session ends by itself a week after signing in."
        >
          <SessionsTable sessions={sessions} />
        </Panel>
      </div>
      <div className="tablet:col-span-2">
        <Panel
          title="Personal keys"
          caption={
            <>
              For scripts: send one as <code className="num">Authorization: Bearer</code>. A key may do all
              that you may, but make keys. What can be asked stands in the{' '}
              <a href="/api/v1/openapi.json">description of the interface</a>.
            </>
          }
        >
          <KeysPanel list={keys} />
        </Panel>
      </div>
    </div>
  );
}
