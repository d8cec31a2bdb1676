import { useFieldArray } from 'react-hook-form';
import { Button, IconButton } from '#components/ui/index.ts';
import { blankStage, type StageFields } from './fields.ts';
import { Figure, type VehicleFormParts } from './Figure.tsx';

export const ENGINE_COLUMNS: readonly {
  key: keyof StageFields;
  name: string;
  unit: string;
  optional?: boolean;
}[] = [
  { key: 'dryKg', name: 'Dry mass', unit: 'kg' },
  { key: 'propellantKg', name: 'Propellant', unit: 'kg' },
  { key: 'thrustVacKn', name: 'Thrust in vacuum', unit: 'kN' },
  { key: 'ispVacS', name: 'Impulse in vacuum', unit: 's' },
  { key: 'ispSeaLevelS', name: 'Impulse at sea level', unit: 's', optional: true },
];

const MOST_STAGES = 8;

interface RowProps extends VehicleFormParts {
  index: number;
  /** None where the vehicle has one stage alone. */
  onRemove: (() => void) | null;
}

function StageRow({ index, onRemove, ...parts }: RowProps) {
  return (
    <tr>
      <th scope="row" className="num">
        {index + 1}
      </th>
      {ENGINE_COLUMNS.map(({ key, name, unit }) => (
        <td key={key} className="py-2 align-top">
          <Figure
            {...parts}
            name={`stages.${index}.${key}`}
            label={`${name} of stage ${index + 1}`}
            labelHidden
            unit={unit}
          />
        </td>
      ))}
      {!parts.locked && (
        <td>
          {onRemove && <IconButton icon="remove" label={`Remove stage ${index + 1}`} onClick={onRemove} />}
        </td>
      )}
    </tr>
  );
}

/** The stages, first to last, a row each. */
export function StageTable(parts: VehicleFormParts) {
  const { form, locked, onLeave } = parts;
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'stages' });
  const drop = (index: number) => {
    remove(index);
    const stages = fields.length - 1;
    if (form.getValues('fairingLeavesAfterStage') > stages) form.setValue('fairingLeavesAfterStage', stages);
    onLeave();
  };
  return (
    <>
      <div className="table-scroll" role="region" aria-label="Stages" tabIndex={0}>
        <table className="table min-w-[44rem] table-fixed">
          <thead>
            <tr>
              <th scope="col" className="w-16">
                Stage
              </th>
              {ENGINE_COLUMNS.map(({ key, name, optional }) => (
                <th key={key} scope="col">
                  {name} {optional && <span className="unit">none: vacuum throughout</span>}
                </th>
              ))}
              {!locked && (
                <th scope="col" className="w-12">
                  <span className="sr-only">Remove</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {fields.map((field, index) => (
              <StageRow
                key={field.id}
                {...parts}
                index={index}
                onRemove={fields.length > 1 ? () => drop(index) : null}
              />
            ))}
          </tbody>
        </table>
      </div>
      {!locked && (
        <div className="mt-3">
          <Button
            size="small"
            icon="add"
            notYet={fields.length >= MOST_STAGES ? `A vehicle has ${MOST_STAGES} stages at most.` : undefined}
            onClick={() => append(blankStage())}
          >
            Add stage
          </Button>
        </div>
      )}
    </>
  );
}
