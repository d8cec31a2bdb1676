import { useEffect, useId, useRef, useState, type ReactNode, type RefObject } from 'react';
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

const STEPS: Record<string, number> = { ArrowDown: 1, ArrowUp: -1 };

/** While a menu is open: arrows walk its entries, Escape, a choice or a press elsewhere closes it. */
function useOpenMenu(root: RefObject<HTMLDivElement | null>, open: boolean, close: (back: boolean) => void) {
  const latest = useRef(close);
  useEffect(() => {
    latest.current = close;
  });
  useEffect(() => {
    const element = root.current;
    if (!open || !element) return;
    const entries = () => [...element.querySelectorAll<HTMLElement>('.menu :is(a, button)')];
    entries()[0]?.focus();
    const walk = (event: KeyboardEvent) => {
      const step = STEPS[event.key];
      if (event.key === 'Escape') latest.current(true);
      else if (step !== undefined) {
        const all = entries();
        const here = all.findIndex((entry) => entry === document.activeElement);
        all[(here + step + all.length) % all.length]?.focus();
      } else return;
      event.preventDefault();
      event.stopPropagation();
    };
    const choose = (event: MouseEvent) => {
      if (event.target instanceof Element && event.target.closest('.menu :is(a, button)'))
        latest.current(false);
    };
    const away = (event: PointerEvent) => {
      if (event.target instanceof Node && !element.contains(event.target)) latest.current(false);
    };
    element.addEventListener('keydown', walk);
    element.addEventListener('click', choose);
    document.addEventListener('pointerdown', away);
    return () => {
      element.removeEventListener('keydown', walk);
      element.removeEventListener('click', choose);
      document.removeEventListener('pointerdown', away);
    };
  }, [root, open]);
}

/** A button that opens a short list of actions. Arrows walk, Escape closes and goes back to the button. */
export function Menu({ label, icon, size, iconOnly = false, children }: MenuProps) {
  const [open, setOpen] = useState(false);
  const root = useRef<HTMLDivElement>(null);
  const id = useId();
  useOpenMenu(root, open, (back) => {
    setOpen(false);
    if (back) root.current?.querySelector('button')?.focus();
  });
  return (
    <div className="relative inline-block" ref={root}>
      <button
        type="button"
        className={iconOnly ? 'icon-button' : 'btn'}
        data-size={size}
        aria-expanded={open}
        aria-controls={open ? id : undefined}
        aria-label={iconOnly ? label : undefined}
        title={iconOnly ? label : undefined}
        onClick={() => setOpen(!open)}
      >
        {icon && <Icon name={icon} />}
        {!iconOnly && label}
        {!iconOnly && <Icon name="down" />}
      </button>
      {open && (
        <div className="menu right-0 z-(--z-map-control)" id={id}>
          {children}
        </div>
      )}
    </div>
  );
}
