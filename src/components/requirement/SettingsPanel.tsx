import { useMemo } from 'react';
import { useForm } from 'react-hook-form';
import { send } from '#components/live/api.ts';
import type { Saved } from '#components/live/saved.ts';
import { asTypedNumber, Button, NumberField, Panel } from '#components/ui/index.ts';
import { DEFAULT_TURN_SPEED_FRACTION } from '#contract/evaluate.ts';
import { formatFull } from '#contract/format.ts';
import { TurnSpeedFraction, type StudySettings } from '#contract/requirement.ts';
import { useAutosave } from './autosave.ts';
import { SaveTrouble } from './SaveTrouble.tsx';
import { useKeptValues } from './use-kept-values.ts';

interface SettingsProps {
  studyId: string;
  kept: StudySettings;
  onKept: (next: StudySettings) => void;
  locked: boolean;
}

interface Fields {
  turnSpeedFraction: number | undefined;
}

/** The study's settings, each with its default beside it. */
export function SettingsPanel({ studyId, kept, onKept, locked }: SettingsProps) {
  const { turnSpeedFraction } = kept;
  const fields = useMemo<Fields>(() => ({ turnSpeedFraction }), [turnSpeedFraction]);
  const form = useForm<Fields>({ defaultValues: fields });
  const autosave = useAutosave<StudySettings>({
    kept,
    write: (change, version) =>
      send<StudySettings & Saved>('PATCH', `/api/v1/studies/${studyId}/settings`, { ...change, version }),
    onKept,
  });
  const basedOn = useKeptValues(form, fields, autosave.settled);
  const leave = () => {
    const read = TurnSpeedFraction.safeParse(form.getValues('turnSpeedFraction'));
    const message = read.error?.issues[0]?.message;
    if (message) form.setError('turnSpeedFraction', { message });
    else form.clearErrors();
    if (read.success && read.data !== turnSpeedFraction)
      autosave.save({ turnSpeedFraction: read.data }, basedOn());
  };
  const isDefault = turnSpeedFraction === DEFAULT_TURN_SPEED_FRACTION;
  return (
    <Panel title="Settings">
      <form
        className="flex flex-wrap items-end gap-4"
        noValidate
        onSubmit={(event) => event.preventDefault()}
      >
        <div className="w-full phone:w-96">
          <NumberField
            label="Share of the injection speed flown when a dogleg turns"
            hint={`Default ${DEFAULT_TURN_SPEED_FRACTION}, up to 7° of arc; from there it rises to 1 at 15°`}
            readOnly={locked}
            error={form.formState.errors.turnSpeedFraction}
            {...form.register('turnSpeedFraction', { ...asTypedNumber, onBlur: leave })}
          />
        </div>
        {!locked && !isDefault && (
          <Button
            onClick={() => {
              form.setValue('turnSpeedFraction', DEFAULT_TURN_SPEED_FRACTION);
              leave();
            }}
          >
            Back to {DEFAULT_TURN_SPEED_FRACTION}
          </Button>
        )}
      </form>
      <SaveTrouble
        autosave={autosave}
        what="this setting"
        describe={({ turnSpeedFraction: share }) => (share === undefined ? 'nothing' : formatFull(share))}
      />
    </Panel>
  );
}
