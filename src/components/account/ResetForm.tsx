import { useState } from 'react';
import { ResetForm as Schema } from '#contract/account.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { ButtonLink, EmptyState, useContractForm } from '#components/ui/index.ts';
import { EntryForm } from './EntryForm.tsx';
import { NewPasswordField } from './NewPasswordField.tsx';

/** Sets a new password by the mailed link's token. */
export function ResetForm({ token }: { token: string }) {
  const form = useContractForm(Schema, { newPassword: '' });
  const [done, setDone] = useState(false);
  const { busy, error, run } = useAction();
  const enter = form.handleSubmit(({ newPassword }) =>
    run(async () => {
      await send('POST', '/api/auth/reset-password', { newPassword, token });
      setDone(true);
    }),
  );
  if (done)
    return (
      <EmptyState
        fact="The new password is set"
        actions={
          <ButtonLink kind="primary" href="/sign-in">
            Sign in
          </ButtonLink>
        }
      >
        Every session of the account was signed out.
      </EmptyState>
    );
  return (
    <EntryForm
      label="Set a new password"
      action="Set password"
      busy={busy}
      error={error}
      advice={<a href="/forgotten">Ask for a new link</a>}
      onSubmit={(event) => void enter(event)}
    >
      <NewPasswordField
        label="New password"
        error={form.formState.errors.newPassword}
        {...form.register('newPassword')}
      />
    </EntryForm>
  );
}
