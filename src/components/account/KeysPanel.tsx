import { useState } from 'react';
import { PersonalKeyInput, type MadeKey, type PersonalKey, type PersonalKeyList } from '#contract/account.ts';
import { formatDateTimeUtc } from '#contract/format.ts';
import { send } from '#components/live/api.ts';
import { useAction, useApi } from '#components/live/hooks.ts';
import {
  Button,
  ConfirmDialog,
  EmptyState,
  Notice,
  TableScroll,
  TextField,
  toast,
  useContractForm,
} from '#components/ui/index.ts';

const ADDRESS = '/api/v1/account/keys';

export function KeysPanel({ list }: { list: PersonalKeyList }) {
  const { data = list, mutate } = useApi<PersonalKeyList>(ADDRESS, {
    fallbackData: list,
    revalidateOnMount: false,
  });
  const [made, setMade] = useState<MadeKey | null>(null);
  const [revoking, setRevoking] = useState<PersonalKey | null>(null);
  const { busy, error, run } = useAction();
  const form = useContractForm(PersonalKeyInput, { name: '' });
  const make = form.handleSubmit((input) =>
    run(async () => {
      setMade(await send<MadeKey>('POST', ADDRESS, input));
      form.reset({ name: '' });
      await mutate();
    }),
  );
  const revoke = (key: PersonalKey) =>
    run(async () => {
      await send('DELETE', `${ADDRESS}/${key.id}`);
      setRevoking(null);
      if (made?.id === key.id) setMade(null);
      toast(`The key ${key.name} works no more`);
      await mutate();
    });
  return (
    <>
      <KeysTable keys={data.items} onRevoke={setRevoking} />
      {made && <Made made={made} />}
      {error && (
        <div className="mt-3">
          <Notice fact={error.message}>The keys above are as they were.</Notice>
        </div>
      )}
      <form
        className="mt-4 flex flex-wrap items-start gap-3"
        aria-label="Make a key"
        noValidate
        onSubmit={(event) => void make(event)}
      >
        <div className="w-full phone:w-72">
          <TextField
            label="What the new key is for"
            autoComplete="off"
            error={form.formState.errors.name}
            {...form.register('name')}
          />
        </div>
        <div className="phone:pt-[1.375rem]">
          <Button type="submit" icon="add" busy={busy}>
            Make key
          </Button>
        </div>
      </form>
      <ConfirmDialog
        open={revoking !== null}
        onClose={() => setRevoking(null)}
        onConfirm={() => revoking && void revoke(revoking)}
        busy={busy}
        destructive
        title={`Revoke the key ${revoking?.name ?? ''}?`}
        confirm="Revoke key"
      >
        Scripts that send it are refused from then on. It cannot be had back.
      </ConfirmDialog>
    </>
  );
}

/** The key is told this once: only its hash is kept. */
function Made({ made }: { made: MadeKey }) {
  const [copied, setCopied] = useState(false);
  return (
    <div className="box mt-3" role="status">
      <p className="box-fact">The key {made.name}: it is shown this once</p>
      <p className="num mt-1 break-all">{made.key}</p>
      <div className="box-acts">
        <Button
          size="small"
          icon="copy"
          onClick={() => void navigator.clipboard.writeText(made.key).then(() => setCopied(true))}
        >
          {copied ? 'Copied' : 'Copy key'}
        </Button>
      </div>
    </div>
  );
}

function KeysTable({
  keys,
  onRevoke,
}: {
  keys: readonly PersonalKey[];
  onRevoke: (key: PersonalKey) => void;
}) {
  if (keys.length === 0)
    return (
      <EmptyState fact="No personal keys">Make one below for a script that works in your name.</EmptyState>
    );
  return (
    <TableScroll label="Personal keys">
      <table className="table">
        <thead>
          <tr>
            <th scope="col">For</th>
            <th scope="col">Begins with</th>
            <th scope="col" className="num">
              Made <span className="unit">UTC</span>
            </th>
            <th scope="col" className="num">
              Last used <span className="unit">UTC</span>
            </th>
            <th scope="col">
              <span className="sr-only">Revoke</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {keys.map((key) => (
            <tr key={key.id}>
              <th scope="row">{key.name}</th>
              <td className="num text-left!">{key.start}…</td>
              <td className="num">{formatDateTimeUtc(key.createdAt).replace(' UTC', '')}</td>
              <td className="num">
                {key.lastUsedAt ? formatDateTimeUtc(key.lastUsedAt).replace(' UTC', '') : 'never'}
              </td>
              <td className="text-right!">
                <Button
                  size="small"
                  kind="destructive"
                  icon="remove"
                  aria-label={`Revoke ${key.name}`}
                  onClick={() => onRevoke(key)}
                >
                  Revoke
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}
