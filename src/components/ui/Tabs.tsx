import { useEffect, useId, useRef, type KeyboardEvent, type ReactNode } from 'react';

export interface Tab<V extends string> {
  value: V;
  name: string;
  /** A second, smaller line: "51.6°, 420 × 420 km, 4 a year". */
  fact?: string | undefined;
}

interface TabsProps<V extends string> {
  label: string;
  tabs: readonly Tab<V>[];
  value: V;
  onChange: (value: V) => void;
  children: ReactNode;
}

const STEPS: Record<string, number> = { ArrowRight: 1, ArrowLeft: -1, Home: -Infinity, End: Infinity };

/** A row of tabs over one panel: one tab stop, arrows, Home and End choose. */
export function Tabs<V extends string>({ label, tabs, value, onChange, children }: TabsProps<V>) {
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (list.current) bringInView(list.current);
  }, [value]);
  const move = (event: KeyboardEvent) => {
    const step = STEPS[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const here = tabs.findIndex((tab) => tab.value === value);
    const there = Math.min(Math.max(here + step, 0), tabs.length - 1);
    const tab = tabs[there];
    if (!tab) return;
    onChange(tab.value);
    list.current?.querySelectorAll('button')[there]?.focus();
  };
  return (
    <>
      <div className="tabs" role="tablist" aria-label={label} tabIndex={-1} ref={list} onKeyDown={move}>
        {tabs.map((tab) => (
          <button
            key={tab.value}
            type="button"
            role="tab"
            id={`${id}-${tab.value}`}
            aria-selected={tab.value === value}
            aria-controls={`${id}-panel`}
            tabIndex={tab.value === value ? 0 : -1}
            onClick={() => onChange(tab.value)}
          >
            {tab.name}
            {tab.fact && <small>{tab.fact}</small>}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${id}-panel`} aria-labelledby={`${id}-${value}`}>
        {children}
      </div>
    </>
  );
}

/** Scrolls a row that is wider than its place, and nothing else, so that the chosen tab is seen whole. */
function bringInView(row: HTMLElement): void {
  const tab = row.querySelector<HTMLElement>('[aria-selected="true"]');
  if (!tab) return;
  const left = tab.offsetLeft - row.offsetLeft;
  const right = left + tab.offsetWidth;
  if (left < row.scrollLeft) row.scrollLeft = left;
  else if (right > row.scrollLeft + row.clientWidth) row.scrollLeft = right - row.clientWidth;
}
