import { useCallback, useEffect, useMemo, useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { announceKept, announceSaved, announceSaving, type Saved } from '#components/live/saved.ts';
import type { WeightMethod, Weights, WeightsDraft, WeightStatement } from '#contract/weights.ts';

export type Points = Readonly<Record<string, number>>;

/** `waiting`: typed and not yet sent. `failed`: kept here alone. `conflict`: someone saved this set meanwhile. */
export type Saving =
  | { kind: 'saved' }
  | { kind: 'waiting' }
  | { kind: 'saving' }
  | { kind: 'failed'; error: ApiError }
  | { kind: 'conflict'; theirs: Weights };

export interface WeightSet {
  /** The set as the server keeps it. */
  kept: Weights;
  /** What is said on this screen, saved or not. */
  statement: WeightStatement;
  points: Points;
  saving: Saving;
  /** Gives points to criteria or groups by id, the others keeping theirs. */
  give: (points: Points) => void;
  /** Says the whole set anew, by any method. */
  state: (statement: WeightStatement) => void;
  /** Statements that lack something yet, one a method: kept on this screen alone and asked for before they are lost. */
  held: Held;
  hold: (method: WeightMethod, statement: WeightStatement | null) => void;
  /** Shows one's own set to the study's members, or hides it again. */
  share: (shared: boolean) => void;
  /** Writes why the study's weights are as they are. */
  explain: (reason: string) => void;
  keepTheirs: () => void;
  putMine: () => void;
  retry: () => void;
  /** Reads the set again, unless something of it waits to be saved. */
  refresh: () => void;
}

export type Held = Readonly<Partial<Record<WeightMethod, WeightStatement>>>;

/** What was typed, and the version of the set it was typed over: a newer one must not be written over unseen. */
interface Draft {
  statement: WeightStatement;
  /** What else of the set was changed with it. */
  also: Pick<WeightsDraft, 'shared' | 'reason'>;
  base: number;
}

const PAUSE_MS = 600;

/** A set of weights, edited at once on this screen and saved in the background after a pause. */
export function useWeightSet(studyId: string, initial: Weights): WeightSet {
  const address = `/api/v1/studies/${studyId}/weights?weights=${initial.weights}`;
  const { data, mutate } = useApi<Weights>(address, { fallbackData: initial });
  const kept = data ?? initial;
  const [draft, setDraft] = useState<Draft | null>(null);
  const [saving, setSaving] = useState<Saving>({ kind: 'saved' });
  const [held, setHeld] = useState<Held>({});

  const save = useCallback(
    async (sent: Draft) => {
      setSaving({ kind: 'saving' });
      announceSaving();
      try {
        const body: WeightsDraft = { ...sent.statement, ...sent.also, version: sent.base };
        const { revision, savedAt, ...answer } = await send<Weights & Saved>('PUT', address, body);
        await mutate(answer, { revalidate: false });
        setDraft((now) => (now === sent || now === null ? null : { ...now, base: answer.version }));
        setSaving({ kind: 'saved' });
        announceSaved({ revision, savedAt });
      } catch (error) {
        if (!(error instanceof ApiError)) throw error;
        announceKept();
        setSaving(
          error.code === 'stale'
            ? { kind: 'conflict', theirs: error.current as Weights }
            : { kind: 'failed', error },
        );
      }
    },
    [address, mutate],
  );

  const idle = saving.kind === 'saved' || saving.kind === 'waiting';
  useEffect(() => {
    if (!draft || !idle) return;
    const timer = setTimeout(() => void save(draft), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [draft, idle, save]);
  useLeaveGuard(draft !== null || Object.keys(held).length > 0);
  const refresh = useCallback(() => void mutate(), [mutate]);

  const keptStatement = useMemo(() => statementOf(kept), [kept]);
  const statement = draft?.statement ?? keptStatement;
  const change = (next: WeightStatement, also: Draft['also'] = {}): void =>
    setDraft((now) => ({
      statement: next,
      also: { ...now?.also, ...also },
      base: now?.base ?? kept.version,
    }));
  return {
    kept,
    statement,
    points: statement.points,
    saving: draft && saving.kind === 'saved' ? { kind: 'waiting' } : saving,
    give: (points) => change({ ...statement, points: { ...statement.points, ...points } }),
    state: (next) => change(next),
    held,
    hold: (method, next) => setHeld((now) => withHeld(now, method, next)),
    share: (shared) => change(statement, { shared }),
    explain: (reason) => change(statement, { reason }),
    keepTheirs: () => {
      if (saving.kind === 'conflict') void mutate(saving.theirs, { revalidate: false });
      setDraft(null);
      setSaving({ kind: 'saved' });
    },
    putMine: () => {
      if (saving.kind !== 'conflict') return;
      const { version } = saving.theirs;
      setDraft((now) => now && { ...now, base: version });
      setSaving({ kind: 'saved' });
    },
    retry: () => setSaving({ kind: 'saved' }),
    refresh,
  };
}

const statementOf = ({ method, points, order, judgements }: Weights): WeightStatement => ({
  method,
  points,
  order,
  judgements,
});

function withHeld(held: Held, method: WeightMethod, statement: WeightStatement | null): Held {
  const { [method]: _, ...rest } = held;
  return statement ? { ...rest, [method]: statement } : rest;
}

/** The browser asks before it leaves a page on which something is not saved yet. */
function useLeaveGuard(unsaved: boolean): void {
  useEffect(() => {
    if (!unsaved) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener('beforeunload', ask);
    return () => removeEventListener('beforeunload', ask);
  }, [unsaved]);
}
