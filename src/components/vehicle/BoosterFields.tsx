import { Controller, useWatch } from 'react-hook-form';
import { Switch } from '#components/ui/index.ts';
import { Figure, type VehicleFormParts } from './Figure.tsx';
import { ENGINE_COLUMNS } from './StageTable.tsx';

/** Parallel boosters, which burn from lift-off beside the first stage; masses and thrust are for one. */
export function BoosterFields(parts: VehicleFormParts) {
  const { form, locked, onLeave } = parts;
  const has = useWatch({ control: form.control, name: 'hasBoosters' });
  return (
    <fieldset>
      <legend className="sr-only">Boosters</legend>
      <Controller
        control={form.control}
        name="hasBoosters"
        render={({ field }) => (
          <Switch
            label="Boosters"
            hint="They burn from lift-off beside the first stage and leave together. Figures are for one booster."
            disabled={locked}
            checked={field.value}
            onChange={(event) => {
              field.onChange(event.target.checked);
              onLeave();
            }}
          />
        )}
      />
      {has && (
        <div className="mt-3 grid grid-cols-2 gap-4 phone:grid-cols-3 tablet:grid-cols-6">
          <Figure {...parts} name="boosters.count" label="Boosters" hint="0 flies without" />
          {ENGINE_COLUMNS.map(({ key, name, unit, optional }) => (
            <Figure
              key={key}
              {...parts}
              name={`boosters.${key}`}
              label={name}
              unit={unit}
              hint={optional ? 'None: vacuum throughout' : undefined}
            />
          ))}
        </div>
      )}
    </fieldset>
  );
}
