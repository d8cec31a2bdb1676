import { useMemo } from 'react';
import { send } from '#components/live/api.ts';
import type { Saved } from '#components/live/saved.ts';
import { Panel, TextArea, TextField, useContractForm } from '#components/ui/index.ts';
import { StudyHead, type Study } from '#contract/study.ts';
import { useAutosave } from './autosave.ts';
import { SaveTrouble } from './SaveTrouble.tsx';
import { useKeptValues } from './use-kept-values.ts';

interface QuestionProps {
  study: Study;
  onKept: (study: Study) => void;
  locked: boolean;
}

const FIELDS = ['title', 'organisation', 'question', 'decideBy'] as const;
const LABELS: Record<(typeof FIELDS)[number], string> = {
  title: 'Title',
  organisation: 'Organisation',
  question: 'Question to decide',
  decideBy: 'Decide by',
};

const headOf = ({ title, organisation, question, decideBy }: Study): StudyHead => ({
  title,
  organisation,
  question,
  decideBy,
});

function describe(version: Partial<Study>, fields: readonly (keyof Study)[]) {
  return FIELDS.filter((field) => fields.includes(field)).map((field) => (
    <span key={field} className="block font-sans text-base">
      {LABELS[field]}: {version[field] || 'nothing'}
    </span>
  ));
}

/** Title, organisation, the question and by when it is to be decided; saved on leaving a field. */
export function QuestionPanel({ study, onKept, locked }: QuestionProps) {
  const head = useMemo(() => headOf(study), [study]);
  const form = useContractForm(StudyHead, head);
  const autosave = useAutosave<Study>({
    kept: study,
    write: (change, version) =>
      send<Study & Saved>('PATCH', `/api/v1/studies/${study.id}`, { ...change, version }),
    onKept,
  });
  const basedOn = useKeptValues(form, head, autosave.settled);
  const { errors } = form.formState;
  const leave = async (field: (typeof FIELDS)[number]) => {
    if (locked || !(await form.trigger(field))) return;
    const value = StudyHead.shape[field].parse(form.getValues(field));
    if (value !== study[field]) autosave.save({ [field]: value }, basedOn());
  };
  const field = (name: (typeof FIELDS)[number]) => ({
    label: LABELS[name],
    error: errors[name],
    readOnly: locked,
    ...form.register(name, {
      onBlur: () => void leave(name),
      ...(name === 'decideBy' ? { setValueAs: (day: string | null) => day || null } : {}),
    }),
  });
  return (
    <Panel title="The question">
      <form
        className="grid gap-4 sheet:grid-cols-2 sheet:gap-14"
        noValidate
        onSubmit={(event) => event.preventDefault()}
      >
        <TextArea
          {...field('question')}
          rows={5}
          hint="What the study is to decide, in a sentence or two. It opens the memo."
        />
        <div className="grid content-start gap-4 phone:grid-cols-[11rem_1fr]">
          <TextField {...field('decideBy')} optional placeholder="YYYY-MM-DD" hint="UTC day" />
          <TextField {...field('organisation')} optional hint="Whose decision it is" />
          <div className="phone:col-span-2">
            <TextField {...field('title')} hint="Of the study, on every sheet and on the memo" />
          </div>
        </div>
      </form>
      <SaveTrouble autosave={autosave} what="this" describe={describe} />
    </Panel>
  );
}
