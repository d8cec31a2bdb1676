import { useState } from 'react';
import { SignUpForm as Schema } from '#contract/account.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { EmptyState, TextField, useContractForm } from '#components/ui/index.ts';
import { EntryForm } from './EntryForm.tsx';
import { NewPasswordField } from './NewPasswordField.tsx';

/** Open registration: the account opens once its address is confirmed. */
export function SignUpForm() {
  const form = useContractForm(Schema, { name: '', email: '', password: '' });
  const [mailedTo, setMailedTo] = useState('');
  const { busy, error, run } = useAction();
  const { errors } = form.formState;
  const enter = form.handleSubmit((values) =>
    run(async () => {
      await send('POST', '/api/auth/sign-up/email', { ...values, callbackURL: '/studies' });
      setMailedTo(values.email);
    }),
  );
  if (mailedTo)
    return (
      <EmptyState fact={`A link went to ${mailedTo}`}>
        Open it within an hour to confirm the address; it signs you in.
      </EmptyState>
    );
  return (
    <EntryForm
      label="Make an account"
      action="Make account"
      busy={busy}
      error={error}
      advice="What you typed is still here."
      onSubmit={(event) => void enter(event)}
      aside={<a href="/sign-in">Sign in instead</a>}
    >
      <TextField label="Name" autoComplete="name" error={errors.name} {...form.register('name')} />
      <TextField
        label="Mail address"
        type="email"
        autoComplete="username"
        error={errors.email}
        {...form.register('email')}
      />
      <NewPasswordField error={errors.password} {...form.register('password')} />
    </EntryForm>
  );
}
