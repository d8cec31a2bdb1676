import { useState } from 'react';
import { AccountPatch, type Account } from '#contract/account.ts';
import type { ApiError } from '#components/live/api.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { Button, Conflict, Notice, TextField, toast, useContractForm } from '#components/ui/index.ts';

const ADDRESS = '/api/v1/account';

/** The name that the record, the title block and the memos carry. */
export function NamePanel({ account }: { account: Account }) {
  const [base, setBase] = useState(account);
  const form = useContractForm(AccountPatch.pick({ name: true }), { name: account.name });
  const { busy, error, run } = useAction();
  const save = (name: string, version: number) =>
    run(async () => {
      const saved = await send<Account>('PATCH', ADDRESS, { name, version });
      setBase(saved);
      form.reset({ name: saved.name });
      toast(`Your name is ${saved.name} now`);
    });
  const theirs = error?.code === 'stale' ? (error.current as Account) : null;
  return (
    <form
      className="grid max-w-[26rem] gap-3"
      aria-label="Name"
      noValidate
      onSubmit={(event) => void form.handleSubmit(({ name }) => save(name, base.version))(event)}
    >
      <TextField
        label="Name"
        autoComplete="name"
        error={form.formState.errors.name}
        {...form.register('name')}
      />
      {theirs && (
        <Conflict
          what="your name"
          by="Another window of yours"
          yours={form.getValues('name')}
          theirs={theirs.name}
          keepTheirs={`Keep ${theirs.name}`}
          putYours={`Put ${form.getValues('name')}`}
          onKeepTheirs={() => void save(theirs.name, theirs.version)}
          onPutYours={() => void save(form.getValues('name'), theirs.version)}
        />
      )}
      {error && !theirs && <Refused error={error} />}
      <div>
        <Button type="submit" busy={busy}>
          Save name
        </Button>
      </div>
    </form>
  );
}

function Refused({ error }: { error: ApiError }) {
  return (
    <Notice fact={error.message} requestId={error.requestId}>
      The name you typed is still in the field.
    </Notice>
  );
}
