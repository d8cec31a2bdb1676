import { useId, type ComponentProps, type ReactNode } from 'react';

interface CheckProps extends ComponentProps<'input'> {
  label: ReactNode;
  /** A second, smaller line. */
  hint?: ReactNode;
}

/** `<Checkbox label="Sectors" {...register('sectors')} />` */
export function Checkbox({ label, hint, ...input }: CheckProps) {
  return <Ticked kind="checkbox" className="check" label={label} hint={hint} {...input} />;
}

/** Takes effect at once; a checkbox waits for its form. */
export function Switch({ label, hint, ...input }: CheckProps) {
  return (
    <Ticked kind="checkbox" role="switch" className="check switch" label={label} hint={hint} {...input} />
  );
}

export function Radio({ label, hint, ...input }: CheckProps) {
  return <Ticked kind="radio" className="check" label={label} hint={hint} {...input} />;
}

function Ticked({ kind, className, label, hint, ...input }: CheckProps & { kind: 'checkbox' | 'radio' }) {
  const hintId = useId();
  return (
    <label className={className}>
      <input type={kind} aria-describedby={hint ? hintId : undefined} {...input} />
      <span className="check-text">
        {label}
        {hint && <small id={hintId}>{hint}</small>}
      </span>
    </label>
  );
}
