import { SignInForm as Schema } from '#contract/account.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { Button, TextField, useContractForm } from '#components/ui/index.ts';
import { EntryForm } from './EntryForm.tsx';

export interface DemoSignIn {
  email: string;
  does: string;
}

interface SignInProps {
  /** Where to go then: an address of this origin. */
  next: string;
  /** Whether anyone may make an account. */
  openSignUp: boolean;
  /** The demo's published sign-ins; null in any other installation. */
  demo: { password: string; people: DemoSignIn[] } | null;
}

export function SignInForm({ next, openSignUp, demo }: SignInProps) {
  const form = useContractForm(Schema, { email: '', password: '' });
  const { busy, error, run } = useAction();
  const { errors } = form.formState;
  const enter = form.handleSubmit((values) =>
    run(async () => {
      await send('POST', '/api/auth/sign-in/email', values);
      location.assign(next);
    }),
  );
  const fill = (email: string) => {
    form.setValue('email', email);
    form.setValue('password', demo?.password ?? '');
    form.clearErrors();
    document.querySelector<HTMLButtonElement>('button[type=submit]')?.focus();
  };
  return (
    <div className="grid gap-10 tablet:grid-cols-[26rem_1fr] tablet:gap-16">
      <EntryForm
        label="Sign in"
        action="Sign in"
        busy={busy}
        error={error}
        advice={<a href="/forgotten">Set a new password by mail</a>}
        onSubmit={(event) => void enter(event)}
        aside={<a href="/forgotten">Password forgotten</a>}
      >
        <TextField
          label="Mail address"
          type="email"
          autoComplete="username"
          error={errors.email}
          {...form.register('email')}
        />
        <TextField
          label="Password"
          type="password"
          autoComplete="current-password"
          error={errors.password}
          {...form.register('password')}
        />
        <p className="text-sm text-ink-2">
          {openSignUp ? (
            <a href="/sign-up">Make an account</a>
          ) : (
            'Accounts are made by invitation. An administrator invites you.'
          )}
        </p>
      </EntryForm>
      {demo && <DemoSignIns demo={demo} onFill={fill} />}
    </div>
  );
}

function DemoSignIns({
  demo,
  onFill,
}: {
  demo: NonNullable<SignInProps['demo']>;
  onFill: (email: string) => void;
}) {
  return (
    <section className="panel self-start">
      <h2>This is the demo</h2>
      <p className="caption">
        An invented operator and invented sites. Password of each:{' '}
        <code className="num">{demo.password}</code>
      </p>
      <div className="table-scroll mt-3.5">
        <table className="table">
          <thead>
            <tr>
              <th scope="col">Sign-in</th>
              <th scope="col">Does</th>
              <th scope="col">
                <span className="sr-only">Fill in</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {demo.people.map(({ email, does }) => (
              <tr key={email}>
                <th scope="row" className="num text-left!">
                  {email}
                </th>
                <td>{does}</td>
                <td className="text-right!">
                  <Button size="small" aria-label={`Fill in ${email}`} onClick={() => onFill(email)}>
                    Fill in
                  </Button>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}
