import { useEffect, useState, type RefObject } from 'react';

/** Up to this many rows are all drawn; beyond, those in sight and some on either side. */
const DRAWN_WHOLE = 120;
const FIRST = 50;
const BESIDE = 15;

export interface RowWindow {
  readonly from: number;
  readonly to: number;
  readonly rowPx: number;
}

/** Which rows of a long table are drawn, by where its holder is scrolled. Rows are of one height. */
export function useWindow(holder: RefObject<HTMLElement | null>, count: number): RowWindow {
  const [range, setRange] = useState<RowWindow>({ from: 0, to: FIRST, rowPx: 52 });
  useEffect(() => {
    const element = holder.current;
    if (!element || count <= DRAWN_WHOLE) return;
    const read = () => {
      const rowPx = element.querySelector<HTMLElement>('tbody tr[data-site]')?.offsetHeight ?? 52;
      const first = Math.floor(element.scrollTop / rowPx);
      const seen = Math.ceil(element.clientHeight / rowPx);
      const from = Math.max(0, first - BESIDE);
      const to = first + seen + BESIDE;
      setRange((now) =>
        now.from === from && now.to === to && now.rowPx === rowPx ? now : { from, to, rowPx },
      );
    };
    read();
    element.addEventListener('scroll', read, { passive: true });
    const observer = new ResizeObserver(read);
    observer.observe(element);
    return () => {
      element.removeEventListener('scroll', read);
      observer.disconnect();
    };
  }, [holder, count]);
  if (count <= DRAWN_WHOLE) return { from: 0, to: count, rowPx: range.rowPx };
  return { ...range, from: Math.min(range.from, Math.max(0, count - FIRST)), to: Math.min(range.to, count) };
}
