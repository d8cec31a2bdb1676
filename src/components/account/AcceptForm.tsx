import { Acceptance } from '#contract/account.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { TextField, useContractForm } from '#components/ui/index.ts';
import { EntryForm } from './EntryForm.tsx';
import { NewPasswordField } from './NewPasswordField.tsx';

interface AcceptProps {
  token: string;
  /** The invited address; null with the first administrator's link, whose holder names it. */
  email: string | null;
}

/** Whoever was invited sets their name and password, and is signed in. */
export function AcceptForm({ token, email }: AcceptProps) {
  const schema = email === null ? Acceptance.required({ email: true }) : Acceptance;
  const form = useContractForm(schema, { name: '', password: '' });
  const { busy, error, run } = useAction();
  const { errors } = form.formState;
  const enter = form.handleSubmit((values) =>
    run(async () => {
      await send('POST', `/api/v1/invitations/${token}`, values);
      location.assign('/studies');
    }),
  );
  return (
    <EntryForm
      label="Make your account"
      action="Make account"
      busy={busy}
      error={error}
      advice="What you typed is still here."
      onSubmit={(event) => void enter(event)}
    >
      {email === null ? (
        <TextField
          label="Mail address"
          type="email"
          autoComplete="username"
          hint="You sign in with it."
          error={errors.email}
          {...form.register('email')}
        />
      ) : (
        <TextField label="Mail address" type="email" autoComplete="username" value={email} readOnly />
      )}
      <TextField
        label="Name"
        autoComplete="name"
        hint="The record and the memos carry it."
        error={errors.name}
        {...form.register('name')}
      />
      <NewPasswordField error={errors.password} {...form.register('password')} />
    </EntryForm>
  );
}
