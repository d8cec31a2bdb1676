import { useEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { Icon, type IconName } from './Icon.tsx';

interface MenuProps {
  /** The button's words, with verb or object. */
  label: string;
  icon?: IconName | undefined;
  size?: 'small' | undefined;
  /** Show the icon alone; the label is then its name. */
  iconOnly?: boolean;
  /** Buttons and links; choosing one closes the menu. */
  children: ReactNode;
}

/** A button that opens a short list of actions. Arrows walk, Escape closes and goes back to the button. */
export function Menu({ label, icon, size, iconOnly = false, children }: MenuProps) {
  const [open, setOpen] = useState(false);
  const root = useRef<HTMLDivElement>(null);
  const id = useId();
  useEffect(() => {
    if (!open) return;
    root.current?.querySelector<HTMLElement>('.menu :is(a, button)')?.focus();
    const away = (event: PointerEvent) => {
      if (event.target instanceof Node && !root.current?.contains(event.target)) setOpen(false);
    };
    document.addEventListener('pointerdown', away);
    return () => document.removeEventListener('pointerdown', away);
  }, [open]);
  const close = () => {
    setOpen(false);
    root.current?.querySelector('button')?.focus();
  };
  return (
    <div className="relative inline-block" ref={root}>
      <button
        type="button"
        className={iconOnly ? 'icon-button' : 'btn'}
        data-size={size}
        aria-expanded={open}
        aria-controls={id}
        aria-label={iconOnly ? label : undefined}
        title={iconOnly ? label : undefined}
        onClick={() => setOpen(!open)}
      >
        {icon && <Icon name={icon} />}
        {!iconOnly && label}
        {!iconOnly && <Icon name="down" />}
      </button>
      {open && <MenuList id={id} onLeave={close} onChoose={() => setOpen(false)} items={children} />}
    </div>
  );
}

interface MenuListProps {
  id: string;
  items: ReactNode;
  onLeave: () => void;
  onChoose: () => void;
}

function MenuList({ id, items, onLeave, onChoose }: MenuListProps) {
  const list = useRef<HTMLDivElement>(null);
  const walk = (event: KeyboardEvent) => {
    if (event.key === 'Escape') {
      event.stopPropagation();
      onLeave();
      return;
    }
    const step = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
    if (step === 0) return;
    event.preventDefault();
    const entries = [...(list.current?.querySelectorAll<HTMLElement>('a, button') ?? [])];
    const here = entries.findIndex((entry) => entry === document.activeElement);
    entries[(here + step + entries.length) % entries.length]?.focus();
  };
  return (
    // The keys are heard as they rise from the buttons inside; the list itself is no control.
    // eslint-disable-next-line jsx-a11y/no-static-element-interactions
    <div className="menu right-0 z-(--z-map-control)" id={id} ref={list} onKeyDown={walk} onClick={onChoose}>
      {items}
    </div>
  );
}
