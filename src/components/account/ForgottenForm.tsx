import { useState } from 'react';
import { ForgottenForm as Schema } from '#contract/account.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { EmptyState, TextField, useContractForm } from '#components/ui/index.ts';
import { EntryForm } from './EntryForm.tsx';

/** Asks for a link; whether the address has an account is not said. */
export function ForgottenForm() {
  const form = useContractForm(Schema, { email: '' });
  const [mailedTo, setMailedTo] = useState('');
  const { busy, error, run } = useAction();
  const enter = form.handleSubmit(({ email }) =>
    run(async () => {
      await send('POST', '/api/auth/request-password-reset', { email });
      setMailedTo(email);
    }),
  );
  if (mailedTo)
    return (
      <EmptyState fact={`If ${mailedTo} has an account, a link is on its way`}>
        It works once, for an hour. The present password stays until you set another.
      </EmptyState>
    );
  return (
    <EntryForm
      label="Set a new password by mail"
      action="Send a link"
      busy={busy}
      error={error}
      advice="Nothing was sent; the address is still in the field."
      onSubmit={(event) => void enter(event)}
      aside={<a href="/sign-in">Sign in instead</a>}
    >
      <TextField
        label="Mail address"
        type="email"
        autoComplete="username"
        error={form.formState.errors.email}
        {...form.register('email')}
      />
    </EntryForm>
  );
}
