import { PasswordForm } from '#contract/account.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { Button, Notice, TextField, toast, useContractForm } from '#components/ui/index.ts';
import { NewPasswordField } from './NewPasswordField.tsx';

const EMPTY = { currentPassword: '', newPassword: '' };

export function PasswordPanel() {
  const form = useContractForm(PasswordForm, EMPTY);
  const { busy, error, run } = useAction();
  const { errors } = form.formState;
  const save = form.handleSubmit((values) =>
    run(async () => {
      await send('POST', '/api/auth/change-password', { ...values, revokeOtherSessions: true });
      form.reset(EMPTY);
      toast('The password is changed; other sessions are signed out');
    }),
  );
  return (
    <form
      method="post"
      className="grid max-w-[26rem] gap-3"
      aria-label="Password"
      noValidate
      onSubmit={(event) => void save(event)}
    >
      <TextField
        label="Present password"
        type="password"
        autoComplete="current-password"
        error={errors.currentPassword}
        {...form.register('currentPassword')}
      />
      <NewPasswordField label="New password" error={errors.newPassword} {...form.register('newPassword')} />
      {error && (
        <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
          The present password stays.
        </Notice>
      )}
      <div>
        <Button type="submit" busy={busy}>
          Change password
        </Button>
      </div>
    </form>
  );
}
