import { useCallback, useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { announceKept, announceSaved, announceSaving } from '#components/live/saved.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { toast } from '#components/ui/index.ts';
import type { ChangedSite, SavedSite, Site } from '#contract/site.ts';

export type SectorsDeg = Site['permittedAzimuthsDeg'];

/** A stale write, for the person to decide. */
export interface SectorConflict {
  readonly yours: SectorsDeg;
  readonly theirs: ChangedSite;
}

/** Writes a site's permitted azimuths on the version that is shown; a change by someone else in between is told. */
export function usePermitted(studyId: string, siteId: string) {
  const address = `/api/v1/studies/${studyId}/sites/${siteId}`;
  const { data: site, mutate } = useApi<Site>(address, { revalidateOnFocus: false });
  const [conflict, setConflict] = useState<SectorConflict | null>(null);
  const [error, setError] = useState<ApiError | null>(null);
  const [busy, setBusy] = useState(false);
  useStudyEvents(
    studyId,
    useCallback(
      (event: LiveEvent) => {
        if (event.kind === 'gap' || event.change.objects.some((object) => /site|upload/.test(object)))
          void mutate();
      },
      [mutate],
    ),
  );

  const write = async (base: Site, sectors: SectorsDeg): Promise<SavedSite | null> => {
    setBusy(true);
    setError(null);
    announceSaving();
    try {
      const body = { permittedAzimuthsDeg: sectors, version: base.version };
      const saved = await send<SavedSite>('PATCH', address, body);
      announceSaved(saved);
      await mutate(saved, { revalidate: false });
      return saved;
    } catch (caught) {
      announceKept();
      if (!(caught instanceof ApiError)) throw caught;
      if (caught.code === 'stale') setConflict({ yours: sectors, theirs: caught.current as ChangedSite });
      else setError(caught);
      return null;
    } finally {
      setBusy(false);
    }
  };

  const use = async (base: Site, sectors: SectorsDeg): Promise<void> => {
    const saved = await write(base, sectors);
    if (!saved) return;
    const undo = () => void write(saved, base.permittedAzimuthsDeg);
    toast(`Permitted azimuths of ${saved.name} changed`, undo);
  };

  return {
    /** Null until the site, with the version to write on, has been read. */
    use: site?.id === siteId ? (sectors: SectorsDeg) => use(site, sectors) : null,
    busy,
    error,
    conflict,
    keepTheirs: () => {
      if (conflict) void mutate(conflict.theirs, { revalidate: false });
      setConflict(null);
    },
    putYours: () => {
      if (!conflict) return;
      setConflict(null);
      void use(conflict.theirs, conflict.yours);
    },
  };
}
