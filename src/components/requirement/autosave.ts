import { useCallback, useEffect, useRef, useState } from 'react';
import { ApiError } from '#components/live/api.ts';
import { announceKept, announceSaved, announceSaving, type Saved } from '#components/live/saved.ts';

export interface Versioned {
  version: number;
}

/** A stale write: what the person meant and what someone else saved meanwhile. */
export interface Clash<T> {
  mine: Partial<T>;
  theirs: T;
  /** When it was noticed. ISO 8601, UTC. */
  at: string;
}

interface AutosaveOptions<T extends Versioned> {
  /** What the server holds, as far as is known here. */
  kept: T;
  write: (change: Partial<T>, version: number) => Promise<T & Saved>;
  onKept: (next: T) => void;
}

export interface Autosave<T> {
  /**
   * Saves a change. `basedOn` holds the values its fields were edited from: where someone else's are there now, the
   * person chooses before anything is written.
   */
  save: (change: Partial<T>, basedOn?: Partial<T>) => void;
  clash: Clash<T> | null;
  keepTheirs: () => void;
  putMine: () => void;
  failure: ApiError | null;
  /** Sends again what a failure kept back. */
  retry: () => void;
  /** Goes up when a clash is settled: the form then shows what is saved. */
  settled: number;
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** Whether someone else changed a field that is being written here. */
function clashes<T extends Versioned>(mine: Partial<T>, basedOn: Partial<T>, theirs: T): boolean {
  return (Object.keys(mine) as (keyof T)[]).some(
    (field) => field in basedOn && !same(theirs[field], basedOn[field]) && !same(theirs[field], mine[field]),
  );
}

/**
 * Saves changes of one versioned object as they come, one write at a time. A stale write whose fields nobody else
 * touched goes again on the newer version; one whose fields they did waits for the person to choose.
 */
export function useAutosave<T extends Versioned>({ kept, write, onKept }: AutosaveOptions<T>): Autosave<T> {
  const [clash, setClash] = useState<Clash<T> | null>(null);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const [settled, setSettled] = useState(0);
  const base = useRef(kept);
  const pending = useRef<Partial<T> | null>(null);
  const busy = useRef(false);
  const options = useRef({ write, onKept });
  useEffect(() => {
    options.current = { write, onKept };
    if (!busy.current && kept.version > base.current.version) base.current = kept;
  });

  const take = useCallback((next: T) => {
    base.current = next;
    options.current.onKept(next);
  }, []);

  /** @returns whether to go on with what is pending */
  const refused = useCallback(
    (error: ApiError, change: Partial<T>): boolean => {
      const theirs = error.code === 'stale' ? (error.current as T | undefined) : undefined;
      if (!theirs) {
        pending.current = { ...change, ...pending.current };
        setFailure(error);
        announceKept();
        return false;
      }
      if (clashes(change, base.current, theirs)) {
        setClash({ mine: change, theirs, at: new Date().toISOString() });
        announceKept();
        return false;
      }
      take(theirs);
      pending.current = { ...change, ...pending.current };
      return true;
    },
    [take],
  );

  const pump = useCallback(async () => {
    if (busy.current) return;
    busy.current = true;
    let goesOn = true;
    while (goesOn && pending.current) {
      const change: Partial<T> = pending.current;
      pending.current = null;
      setFailure(null);
      announceSaving();
      try {
        const next = await options.current.write(change, base.current.version);
        take(next);
        announceSaved({ revision: next.revision, savedAt: next.savedAt });
      } catch (error) {
        if (!(error instanceof ApiError)) throw error;
        goesOn = refused(error, change);
      }
    }
    busy.current = false;
  }, [refused, take]);

  const save = useCallback(
    (change: Partial<T>, basedOn?: Partial<T>) => {
      if (basedOn && clashes(change, basedOn, base.current)) {
        setClash({ mine: change, theirs: base.current, at: new Date().toISOString() });
        announceKept();
        return;
      }
      pending.current = { ...pending.current, ...change };
      void pump();
    },
    [pump],
  );
  const keepTheirs = () => {
    if (clash) take(clash.theirs);
    setClash(null);
    setSettled((count) => count + 1);
  };
  const putMine = () => {
    if (!clash) return;
    take(clash.theirs);
    setClash(null);
    save(clash.mine);
  };
  return { save, clash, keepTheirs, putMine, failure, retry: () => void pump(), settled };
}
