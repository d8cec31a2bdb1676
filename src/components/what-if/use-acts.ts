import { useState } from 'react';
import type { ApiError } from '#components/live/api.ts';
import { send } from '#components/live/api.ts';
import { useAction } from '#components/live/hooks.ts';
import { announceSaved } from '#components/live/saved.ts';
import type { WhatIf, WhatIfAdopted, WhatIfChanges } from '#contract/what-if.ts';
import type { LiveWhatIf } from './use-what-if.ts';

export interface WhatIfActs {
  busy: boolean;
  error: ApiError | null;
  /** What the server holds, where it was changed since this screen read it. */
  theirs: WhatIf | null;
  /** Saves over one's own, or keeps a new one under the name given. */
  save: (changes: WhatIfChanges) => Promise<boolean>;
  share: (shared: boolean) => Promise<boolean>;
  letGo: () => Promise<boolean>;
  keepTheirs: () => void;
  /** Goes on with this screen's changes from the newest version; saving them writes over it. */
  putMine: () => void;
  /** @param revision of the study that was looked at */
  adopt: (reason: string, revision: number) => Promise<WhatIfAdopted | null>;
}

/** What can be done with the what-if chosen; one at a time. */
export function useActs({ address, kept, draft, readAgain, open, rebase }: LiveWhatIf): WhatIfActs {
  const { busy, error, run } = useAction();
  const [settled, setSettled] = useState<ApiError | null>(null);
  const fresh = error === settled ? null : error;
  const theirs = fresh?.code === 'stale' && isWhatIf(fresh.current) ? fresh.current : null;
  const one = `${address}/${kept?.id ?? ''}`;
  return {
    busy,
    error: theirs ? null : fresh,
    theirs,
    save: (changes) =>
      run(async () => {
        const name = draft.name.trim();
        const saved = kept?.mine
          ? await send<WhatIf>('PATCH', one, { name, changes, version: draft.version })
          : await send<WhatIf>('POST', address, { name, changes });
        await readAgain();
        open(saved.id);
      }),
    share: (shared) =>
      run(async () => {
        const { version } = await send<WhatIf>('PATCH', one, { shared, version: draft.version });
        rebase(version);
        await readAgain();
      }),
    letGo: () =>
      run(async () => {
        await send('DELETE', one, undefined, { ifMatch: `"${kept?.version ?? 0}"` });
        open(null);
        await readAgain();
      }),
    keepTheirs: () => {
      setSettled(error);
      open(kept?.id ?? null);
      void readAgain();
    },
    putMine: () => {
      setSettled(error);
      if (theirs) rebase(theirs.version);
    },
    adopt: async (reason, revision) => {
      const answers: WhatIfAdopted[] = [];
      await run(async () => {
        const body = { reason, revision, version: kept?.version ?? 0 };
        answers.push(await send<WhatIfAdopted>('POST', `${one}/adopt`, body));
      });
      const [adopted] = answers;
      if (!adopted) return null;
      announceSaved({ revision: adopted.revision, savedAt: adopted.savedAt });
      return adopted;
    },
  };
}

const isWhatIf = (current: unknown): current is WhatIf =>
  typeof current === 'object' && current !== null && 'changes' in current;
