import { useId, type ComponentProps, type MouseEvent, type ReactNode } from 'react';
import { Icon, type IconName } from './Icon.tsx';

export type ButtonKind = 'primary' | 'secondary' | 'text' | 'destructive';

interface Looks {
  kind?: ButtonKind;
  size?: 'small' | undefined;
  icon?: IconName | undefined;
  children: ReactNode;
}

interface ButtonProps extends Looks, Omit<ComponentProps<'button'>, 'children'> {
  /** Not possible yet: what is missing. The button stays focusable and says so; a click does nothing. */
  notYet?: string | undefined;
  /** Its action is under way: it keeps its words and takes no second click. */
  busy?: boolean | undefined;
}

/**
 * Pressing a form's button must not leave the field first: checking it then would take its error line away, and the
 * button would move from under the pointer before the click. The submission checks every field anyway.
 */
const keepFocus = (event: MouseEvent) => event.preventDefault();

/** Verb and object in the label ("Add 9 good rows"). One primary a screen. */
export function Button({
  kind = 'secondary',
  size,
  icon,
  notYet,
  busy = false,
  children,
  onClick,
  type = 'button',
  ...rest
}: ButtonProps) {
  const reasonId = useId();
  const inert = Boolean(notYet) || busy;
  const press = (event: MouseEvent<HTMLButtonElement>) => {
    if (inert) event.preventDefault();
    else onClick?.(event);
  };
  return (
    <>
      <button
        type={type}
        className="btn"
        data-kind={kind}
        data-size={size}
        aria-disabled={inert || undefined}
        aria-busy={busy || undefined}
        aria-describedby={notYet ? reasonId : undefined}
        title={notYet}
        onClick={press}
        onMouseDown={type === 'submit' ? keepFocus : undefined}
        {...rest}
      >
        {icon && <Icon name={icon} />}
        {children}
      </button>
      {notYet && (
        <span id={reasonId} className="sr-only">
          {notYet}
        </span>
      )}
    </>
  );
}

/** A link that looks like a button, for going somewhere or fetching a file. */
export function ButtonLink({
  kind = 'secondary',
  size,
  icon,
  children,
  ...rest
}: Looks & Omit<ComponentProps<'a'>, 'children'>) {
  return (
    <a className="btn" data-kind={kind} data-size={size} {...rest}>
      {icon && <Icon name={icon} />}
      {children}
    </a>
  );
}

/** An icon alone: only in the title block and in rows where the word stands in the heading. Named, with a tooltip. */
export function IconButton({
  icon,
  label,
  ...rest
}: { icon: IconName; label: string } & Omit<ComponentProps<'button'>, 'children'>) {
  return (
    <button type="button" className="icon-button" aria-label={label} title={label} {...rest}>
      <Icon name={icon} />
    </button>
  );
}
