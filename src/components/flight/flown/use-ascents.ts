import { useCallback, useEffect, useRef } from 'react';
import { send } from '#components/live/api.ts';
import { useAction, useApi } from '#components/live/hooks.ts';
import { useStudyEvents, useStudyProgress } from '#components/live/study-events.ts';
import type { AscentPair, AscentsAsked, StudyAscent, StudyAscents } from '#contract/study-ascents.ts';

/** While flights are under way the screen reads again this often, even where the stream of events is lost. */
const WITHOUT_STREAM_MS = 10_000;
/** The counts are small; a list of thousands is not read at every step. */
const COUNTS_MS = 400;
const LIST_MS = 1_500;

const flying = (read: StudyAscents | undefined): boolean =>
  read !== undefined && read.counts.waiting + read.counts.flying > 0;

/** Calls `act` once for all the calls within some time. */
function useGathered(act: () => void, withinMs: number): () => void {
  const timer = useRef<number | undefined>(undefined);
  const latest = useRef(act);
  useEffect(() => {
    latest.current = act;
  });
  useEffect(() => () => window.clearTimeout(timer.current), []);
  return useCallback(() => {
    timer.current ??= window.setTimeout(() => {
      timer.current = undefined;
      latest.current();
    }, withinMs);
  }, [withinMs]);
}

const NONE: readonly StudyAscent[] = [];

/**
 * A study's flown ascents: the counts of all, and those to one orbit, or to all of them.
 * @param orbitId null for the whole manifest
 */
export function useAscents(studyId: string, orbitId: string | null) {
  const address = `/api/v1/studies/${studyId}/ascents`;
  const options = {
    revalidateOnFocus: false,
    refreshInterval: (read: StudyAscents | undefined) => (flying(read) ? WITHOUT_STREAM_MS : 0),
  };
  const whole = useApi<StudyAscents>(`${address}?list=false`, options);
  const list = useApi<StudyAscents>(orbitId === null ? address : `${address}?orbitId=${orbitId}`, options);
  const { busy, error: refused, run } = useAction();
  const readCounts = useGathered(() => void whole.mutate(), COUNTS_MS);
  const readList = useGathered(() => void list.mutate(), LIST_MS);
  const moved = useCallback(() => {
    readCounts();
    readList();
  }, [readCounts, readList]);
  useStudyProgress(studyId, moved);
  useStudyEvents(studyId, moved);
  const act = (what: () => Promise<unknown>) =>
    run(async () => {
      await what();
      await Promise.all([whole.mutate(), list.mutate()]);
    });
  return {
    whole: whole.data,
    /** While another orbit's list is still read there is none. */
    items: list.data?.items ?? NONE,
    error: whole.error ?? list.error,
    again: moved,
    busy,
    refused,
    ask: (pairs?: readonly AscentPair[]) =>
      act(() => send<AscentsAsked>('POST', address, pairs ? { pairs } : {})),
    cancel: () => act(() => send('DELETE', address)),
  };
}
export type Ascents = ReturnType<typeof useAscents>;
