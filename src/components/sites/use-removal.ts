import { useState } from 'react';
import { ApiError } from '#components/live/api.ts';
import { toast } from '#components/ui/Toast.tsx';
import type { Site } from '#contract/site.ts';
import { sitesInWords } from './RemoveSites.tsx';
import type { SiteStore } from './use-sites.ts';

export interface Removal {
  /** The sites that are asked about; null while nothing is. */
  readonly asked: readonly Site[] | null;
  /** Why the last removal or its undoing did not happen. */
  readonly fault: string | null;
  ask: (sites: readonly Site[]) => void;
  leave: () => void;
  remove: (sites: readonly Site[]) => Promise<void>;
}

/** Taking sites out of the study: asked before, undone for a few seconds after. */
export function useRemoval(store: SiteStore, onDone: () => void): Removal {
  const [asked, ask] = useState<readonly Site[] | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const attempt = async (act: () => Promise<void>): Promise<boolean> => {
    try {
      await act();
      setFault(null);
      return true;
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFault(error.message);
      store.reload();
      return false;
    }
  };
  return {
    asked,
    fault,
    ask,
    leave: () => ask(null),
    remove: async (sites) => {
      if (await attempt(() => store.remove(sites))) {
        onDone();
        const siteIds = sites.map(({ id }) => id);
        toast(`${sitesInWords(sites)} removed`, () => void attempt(() => store.restore(siteIds)));
      }
      ask(null);
    },
  };
}
