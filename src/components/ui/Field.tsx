import { useId, type ComponentProps, type ReactNode } from 'react';
import { Icon } from './Icon.tsx';

/** What react-hook-form's `errors.x` gives, or a plain sentence. */
export type FieldError = string | { message?: string | undefined } | undefined;

export interface FieldLooks {
  label: ReactNode;
  /** Stands inside the field at its right; for screen readers it belongs to the description. */
  unit?: string | undefined;
  /** Default, frame, usual range. */
  hint?: ReactNode;
  /** What the typed text was read as: "read as −12.6917". */
  reading?: ReactNode;
  /** What is wrong, the allowed range and, if there is one, the likely meant value. */
  error?: FieldError;
  optional?: boolean | undefined;
  /** The label is for screen readers only: a field in a table row whose heading names it. */
  labelHidden?: boolean | undefined;
}

export interface FieldIds {
  id: string;
  describedBy: string | undefined;
  invalid: boolean;
}

export function messageOf(error: FieldError): string | undefined {
  return typeof error === 'string' ? error : error?.message;
}

interface FieldProps extends FieldLooks {
  id?: string | undefined;
  locked?: boolean | undefined;
  /** False where the control draws its own edge. */
  boxed?: boolean;
  children: (ids: FieldIds) => ReactNode;
}

/** Label above, unit inside, hint or error below: the frame of every control of a form. */
export function Field(props: FieldProps) {
  const made = useId();
  const id = props.id ?? made;
  const message = messageOf(props.error);
  const notes = [
    props.unit && `${id}-unit`,
    props.hint && `${id}-hint`,
    props.reading && `${id}-reading`,
    message && `${id}-error`,
  ].filter(Boolean);
  const control = props.children({
    id,
    describedBy: notes.length > 0 ? notes.join(' ') : undefined,
    invalid: Boolean(message),
  });
  return (
    <div className="fld" data-invalid={message ? '' : undefined} data-locked={props.locked ? '' : undefined}>
      <label className={props.labelHidden ? 'sr-only' : 'fld-label'} htmlFor={id}>
        {props.label}
        {props.optional && <span className="fld-optional"> (optional)</span>}
      </label>
      {props.boxed === false ? (
        control
      ) : (
        <div className="fld-box">
          {control}
          {props.unit && (
            <span className="fld-unit" id={`${id}-unit`}>
              {props.unit}
            </span>
          )}
        </div>
      )}
      <FieldNotes id={id} {...props} />
    </div>
  );
}

function FieldNotes({ id, hint, reading, error }: { id: string } & Omit<FieldLooks, 'label'>) {
  const message = messageOf(error);
  return (
    <>
      {hint && (
        <p className="fld-hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
      {reading && (
        <p className="fld-reading" id={`${id}-reading`} aria-live="polite">
          {reading}
        </p>
      )}
      {message && (
        <p className="fld-error" id={`${id}-error`}>
          <Icon name="refused" size={14} />
          <span>{message}</span>
        </p>
      )}
    </>
  );
}

export type TextFieldProps = FieldLooks & ComponentProps<'input'>;

/** `<TextField label="Name" error={errors.name} {...register('name')} />` */
export function TextField(props: TextFieldProps) {
  const { label, unit, hint, reading, error, optional, labelHidden, id, ...input } = props;
  const looks = { label, unit, hint, reading, error, optional, labelHidden, id };
  return (
    <Field {...looks} locked={input.readOnly}>
      {(ids) => (
        <input
          type="text"
          {...input}
          id={ids.id}
          aria-describedby={ids.describedBy}
          aria-invalid={ids.invalid || undefined}
        />
      )}
    </Field>
  );
}

/**
 * A figure. The text stays as typed (a browser's number field drops what it can't read); give
 * `register('x', asTypedNumber)` so that the schema gets a number and refuses anything else.
 */
export function NumberField(props: TextFieldProps) {
  return <TextField inputMode="decimal" autoComplete="off" {...props} className="num" />;
}

export function TextArea(props: FieldLooks & ComponentProps<'textarea'>) {
  const { label, unit, hint, reading, error, optional, labelHidden, id, ...area } = props;
  const looks = { label, unit, hint, reading, error, optional, labelHidden, id };
  return (
    <Field {...looks} locked={area.readOnly}>
      {(ids) => (
        <textarea
          rows={3}
          {...area}
          id={ids.id}
          aria-describedby={ids.describedBy}
          aria-invalid={ids.invalid || undefined}
        />
      )}
    </Field>
  );
}

export interface Choice {
  value: string;
  name: string;
}

export function Select(props: FieldLooks & { choices: readonly Choice[] } & ComponentProps<'select'>) {
  const { label, unit, hint, reading, error, optional, labelHidden, id, choices, ...select } = props;
  const looks = { label, unit, hint, reading, error, optional, labelHidden, id };
  return (
    <Field {...looks} locked={select.disabled}>
      {(ids) => (
        <select
          {...select}
          id={ids.id}
          aria-describedby={ids.describedBy}
          aria-invalid={ids.invalid || undefined}
        >
          {choices.map((choice) => (
            <option key={choice.value} value={choice.value}>
              {choice.name}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}
