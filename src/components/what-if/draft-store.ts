/*
 * The draft of each study's what-if, kept beside the views: another view of the ranking may be opened and this one come
 * back to. The browser asks before it leaves a page with a draft on it.
 */
import { useCallback, useSyncExternalStore } from 'react';
import type { Draft } from './draft.ts';

const drafts = new Map<string, Draft>();
const listeners = new Set<() => void>();
const ask = (event: BeforeUnloadEvent): void => event.preventDefault();

/** Keeps a draft that is worth asking for; null lets it go. */
export function keepDraft(studyId: string, draft: Draft | null): void {
  if (draft) drafts.set(studyId, draft);
  else drafts.delete(studyId);
  if (drafts.size > 0) addEventListener('beforeunload', ask);
  else removeEventListener('beforeunload', ask);
  for (const listener of listeners) listener();
}

function listen(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useKeptDraft(studyId: string): Draft | null {
  const read = useCallback(() => drafts.get(studyId) ?? null, [studyId]);
  return useSyncExternalStore(listen, read, () => null);
}
