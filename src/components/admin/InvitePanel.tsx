import { InvitationInput, type Invitation, type InvitationList } from '#contract/admin.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { Button, Checkbox, Notice, TextField, toast, useContractForm } from '#components/ui/index.ts';
import { InvitationTable } from './InvitationTable.tsx';

const ADDRESS = '/api/v1/admin/invitations';
const EMPTY = { email: '', administrator: false };

/** Inviting by address, the addresses that leads ask for, and the links that are out. */
export function InvitePanel({ list, onDone }: { list: InvitationList; onDone: () => void }) {
  const form = useContractForm(InvitationInput, EMPTY);
  const { busy, error, run } = useAction();
  const invite = (input: InvitationInput) =>
    run(async () => {
      const made = await send<Invitation>('POST', ADDRESS, input);
      toast(`An invitation goes to ${made.email}`);
      onDone();
    });
  const withdraw = (invitation: Invitation) =>
    run(async () => {
      await send('DELETE', `${ADDRESS}/${invitation.id}`);
      toast(`The invitation of ${invitation.email} is withdrawn`);
      onDone();
    });
  const submit = form.handleSubmit(async (input) => {
    if (await invite(input)) form.reset(EMPTY);
  });
  return (
    <>
      <InvitationTable
        list={list}
        busy={busy}
        onInvite={(email) => void invite({ email, administrator: false })}
        onWithdraw={(invitation) => void withdraw(invitation)}
      />
      {error && (
        <div className="mt-3">
          <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
            No invitation went out or was withdrawn.
          </Notice>
        </div>
      )}
      <form
        className="mt-4 flex flex-wrap items-start gap-x-4 gap-y-3"
        aria-label="Invite someone"
        noValidate
        onSubmit={(event) => void submit(event)}
      >
        <div className="w-full phone:w-80">
          <TextField
            label="Mail address to invite"
            type="email"
            autoComplete="off"
            error={form.formState.errors.email}
            {...form.register('email')}
          />
        </div>
        <div className="phone:pt-7">
          <Checkbox label="As an administrator" {...form.register('administrator')} />
        </div>
        <div className="phone:pt-[1.375rem]">
          <Button type="submit" icon="mail" busy={busy}>
            Invite
          </Button>
        </div>
      </form>
    </>
  );
}
