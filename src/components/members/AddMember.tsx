import { useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { Button, Notice, Select, TextField, toast, useContractForm } from '#components/ui/index.ts';
import { MemberInput, type StudyMember } from '#contract/member.ts';
import { STUDY_ROLES } from '#contract/study.ts';
import { ROLE_NAMES } from '#components/studies/words.ts';
import { nameOf } from './words.ts';

const CHOICES = STUDY_ROLES.map((value) => ({ value, name: ROLE_NAMES[value] }));

/** Adds someone by address; an address without an account waits for one. */
export function AddMember({ studyId, onAdded }: { studyId: string; onAdded: () => void }) {
  const [failure, setFailure] = useState<ApiError | null>(null);
  const form = useContractForm(MemberInput, { email: '', role: 'engineer' });
  const { errors, isSubmitting } = form.formState;
  const add = form.handleSubmit(async (input) => {
    setFailure(null);
    try {
      const added = await send<StudyMember>('POST', `/api/v1/studies/${studyId}/members`, input);
      toast(
        added.standing === 'pending'
          ? `${added.email} has no account yet: an administrator is asked to invite that address`
          : `${nameOf(added)} added as ${ROLE_NAMES[added.role].toLowerCase()}`,
      );
      form.reset({ email: '', role: input.role });
      onAdded();
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
    }
  });
  return (
    <form onSubmit={(event) => void add(event)} noValidate aria-label="Add a member">
      <div className="flex flex-wrap items-start gap-4">
        <div className="w-full phone:w-72">
          <TextField
            label="Mail address"
            type="email"
            autoComplete="off"
            hint="Without an account yet? It waits, and an administrator is asked to invite it."
            error={errors.email}
            {...form.register('email')}
          />
        </div>
        <div className="w-44">
          <Select label="Role" choices={CHOICES} error={errors.role} {...form.register('role')} />
        </div>
        <div className="pt-[1.375rem]">
          <Button type="submit" icon="add" busy={isSubmitting}>
            Add member
          </Button>
        </div>
      </div>
      {failure && (
        <div className="mt-3">
          <Notice fact={failure.message} requestId={failure.requestId}>
            Nobody was added; the address is still in the field.
          </Notice>
        </div>
      )}
    </form>
  );
}
