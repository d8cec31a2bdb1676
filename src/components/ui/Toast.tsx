import { useEffect, useState, useSyncExternalStore } from 'react';
import { Icon } from './Icon.tsx';

interface Toast {
  id: number;
  text: string;
  undo?: (() => void) | undefined;
}

const STAYS_MS = 8_000;
/** What the server drew: the region may wake after the first toast has been announced. */
const NONE: readonly Toast[] = [];
let shown = NONE;
let lastId = 0;
const listeners = new Set<() => void>();

function show(next: readonly Toast[]) {
  shown = next;
  for (const listener of listeners) listener();
}

function dismiss(id: number) {
  show(shown.filter((toast) => toast.id !== id));
}

/**
 * Says that an action is done whose result is not in view or can be undone: "9 sites added from candidates.csv".
 * For nothing else; an error stands where the result would.
 */
export function toast(text: string, undo?: () => void) {
  lastId += 1;
  show([...shown, { id: lastId, text, undo }]);
}

/** The layouts hold one of it; every island of the page speaks through `toast`. */
export function ToastRegion() {
  const toasts = useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => shown,
    () => NONE,
  );
  return (
    <div className="toasts" role="status" aria-live="polite">
      {toasts.map((item) => (
        <ToastLine key={item.id} {...item} />
      ))}
    </div>
  );
}

function ToastLine({ id, text, undo }: Toast) {
  const [held, setHeld] = useState(false);
  useEffect(() => {
    if (held) return;
    const timer = setTimeout(() => dismiss(id), STAYS_MS);
    return () => clearTimeout(timer);
  }, [held, id]);
  return (
    <div
      className="toast"
      onMouseEnter={() => setHeld(true)}
      onMouseLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
    >
      <Icon name="done" />
      <span>{text}</span>
      {undo && (
        <button
          type="button"
          className="ml-auto"
          onClick={() => {
            dismiss(id);
            undo();
          }}
        >
          Undo
        </button>
      )}
      <button type="button" className={undo ? '' : 'ml-auto'} onClick={() => dismiss(id)}>
        Close
      </button>
    </div>
  );
}
