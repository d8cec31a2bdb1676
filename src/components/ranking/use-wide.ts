import { useSyncExternalStore } from 'react';

function useMedia(query: string): boolean {
  return useSyncExternalStore(
    (changed) => {
      const media = matchMedia(query);
      media.addEventListener('change', changed);
      return () => media.removeEventListener('change', changed);
    },
    () => matchMedia(query).matches,
    () => false,
  );
}

/** From here on the grid is worth its code; the server draws for a narrower screen. */
export const useGridFits = (): boolean => useMedia('(min-width: 40rem)');

const WIDE_BAR = 286;
const NARROW_BAR = 180;

/** The value bar narrows under 1,440 px. */
export const useBarWidth = (): number => (useMedia('(min-width: 90rem)') ? WIDE_BAR : NARROW_BAR);
