import { useCallback, useMemo, useRef } from 'react';
import useSWR from 'swr';
import { apiFetch, send, type ApiError } from '#components/live/api.ts';
import { announceKept, announceSaved, announceSaving, type Saved } from '#components/live/saved.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { MAX_PAGE_SIZE } from '#contract/list.ts';
import type {
  SavedSite,
  Site,
  SiteDraft,
  SiteList,
  SitePatch,
  SitesRemoved,
  SitesRestored,
} from '#contract/site.ts';

const byAge = (a: Site, b: Site): number => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0);

/** All sites of the study, in the order they were added (their ids sort by time). */
async function readAll(address: string): Promise<SiteList> {
  const page = (number: number): Promise<SiteList> =>
    apiFetch<SiteList>(`${address}?pageSize=${MAX_PAGE_SIZE}&page=${number}`);
  const first = await page(1);
  const pages = Math.ceil(first.total / MAX_PAGE_SIZE);
  const rest = await Promise.all(
    Array.from({ length: Math.max(0, pages - 1) }, (_, index) => page(index + 2)),
  );
  // A change between two pages moves a site to the front and may show one twice.
  const unique = new Map([first, ...rest].flatMap(({ items }) => items.map((site) => [site.id, site])));
  return { items: [...unique.values()].sort(byAge), total: first.total };
}

export interface SiteStore {
  readonly sites: readonly Site[];
  readonly total: number;
  /** Some are still on their way. */
  readonly loading: boolean;
  readonly error: ApiError | undefined;
  reload: () => void;
  /** Shows a site as it is known to be now, without writing it. */
  show: (site: Site) => void;
  change: (site: Site, patch: SitePatch) => Promise<Site>;
  add: (draft: SiteDraft) => Promise<Site>;
  remove: (sites: readonly Site[]) => Promise<void>;
  restore: (siteIds: readonly string[]) => Promise<void>;
}

/** Says in the title block that something is saved, or that it is only kept here. */
async function saved<T extends Saved>(write: Promise<T>): Promise<T> {
  announceSaving();
  try {
    const answer = await write;
    announceSaved(answer);
    return answer;
  } catch (error) {
    announceKept();
    throw error;
  }
}

/**
 * Writes to one site one after the other, each based on what the one before made of it: two quick edits by the same
 * hand are no conflict. A change by someone else in between still is one.
 */
function useTurns() {
  const state = useRef({ last: new Map<string, Promise<unknown>>(), after: new Map<string, number>() });
  return useCallback((site: Site, write: (version: number) => Promise<Site>): Promise<Site> => {
    const { last, after } = state.current;
    const turn = async (): Promise<Site> => {
      await last.get(site.id)?.catch(() => undefined);
      let { version } = site;
      for (let next = after.get(`${site.id}/${version}`); next; next = after.get(`${site.id}/${version}`))
        version = next;
      const made = await write(version);
      if (made.version !== version) after.set(`${site.id}/${version}`, made.version);
      return made;
    };
    const taken = turn();
    last.set(site.id, taken);
    return taken;
  }, []);
}

/** A study's sites, kept fresh as others change them, and the ways to change them. */
export function useSites(studyId: string, initial: SiteList): SiteStore {
  const address = `/api/v1/studies/${studyId}/sites`;
  const complete = initial.items.length === initial.total;
  const {
    data = initial,
    error,
    mutate,
  } = useSWR<SiteList, ApiError>(`${address}#all`, () => readAll(address), {
    fallbackData: initial,
    revalidateOnMount: !complete,
    revalidateOnFocus: false,
    keepPreviousData: true,
  });

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

  const inTurn = useTurns();
  const put = useCallback(
    (edit: (items: readonly Site[]) => Site[]) =>
      mutate(
        (list = initial) => {
          const items = edit(list.items);
          return { items, total: list.total + items.length - list.items.length };
        },
        { revalidate: false },
      ),
    [mutate, initial],
  );

  return useMemo(() => {
    const show = (site: Site) => void put((items) => items.map((one) => (one.id === site.id ? site : one)));
    const merge = (added: readonly Site[]) =>
      put((items) => {
        const known = new Set(added.map(({ id }) => id));
        return [...items.filter(({ id }) => !known.has(id)), ...added].sort(byAge);
      });
    return {
      sites: data.items,
      total: data.total,
      loading: data.items.length < data.total,
      error,
      reload: () => void mutate(),
      show,
      change: async (site, patch) => {
        const answer = await inTurn(site, (version) =>
          saved(send<SavedSite>('PATCH', `${address}/${site.id}`, { ...patch, version })),
        );
        show(answer);
        return answer;
      },
      add: async (draft) => {
        const answer = await saved(send<SavedSite>('POST', address, draft));
        await merge([answer]);
        return answer;
      },
      remove: async (sites) => {
        const body = { sites: sites.map(({ id, version }) => ({ id, version })) };
        const { siteIds } = await saved(send<SitesRemoved>('POST', `${address}/remove`, body));
        await put((items) => items.filter(({ id }) => !siteIds.includes(id)));
      },
      restore: async (siteIds) => {
        const { items } = await saved(send<SitesRestored>('POST', `${address}/restore`, { siteIds }));
        await merge(items);
      },
    };
  }, [data, error, mutate, put, inTurn, address]);
}
