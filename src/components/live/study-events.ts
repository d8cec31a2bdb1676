/*
 * One stream of server-sent events a browser, however many tabs: HTTP/1.1 allows six connections a host. The tab
 * that holds the lock reads the stream and passes every event on; when it closes, the next tab takes over.
 */
import { useEffect, useSyncExternalStore } from 'react';

export interface StudyChange {
  id: number;
  studyId: string;
  revision: number | null;
  userId: string | null;
  /** Kinds of object changed: 'site', 'criterion', 'weights', … */
  objects: string[];
}

/** A change, or a gap: changes may have been missed, so read again. */
export type LiveEvent = { kind: 'change'; change: StudyChange } | { kind: 'gap' };
export type Connection = 'connecting' | 'open' | 'lost';
type Message =
  | LiveEvent
  | { kind: 'connection'; connection: Connection }
  /** Computing for a study moved on: its flown ascents. */
  | { kind: 'progress'; studyId: string };

const NAME = 'spinward-events';
const listeners = new Set<(message: Message) => void>();
let connection: Connection = 'connecting';
let started = false;

function deliver(message: Message): void {
  if (message.kind === 'connection') connection = message.connection;
  for (const listener of listeners) listener(message);
}

const REOPEN_MS = 5_000;

function open(tell: (message: Message) => void): void {
  const source = new EventSource('/api/v1/events');
  let numbered = false;
  source.onopen = () => {
    tell({ kind: 'connection', connection: 'open' });
    // Before its first event a stream has no number to resume from: what it may have missed is read again.
    if (!numbered) tell({ kind: 'gap' });
  };
  source.onerror = () => {
    tell({ kind: 'connection', connection: 'lost' });
    // EventSource reconnects after a broken connection, but not after an answer that was an error.
    if (source.readyState === EventSource.CLOSED) setTimeout(() => open(tell), REOPEN_MS);
  };
  source.addEventListener('change', (event) => {
    numbered = true;
    tell({ kind: 'change', change: JSON.parse(event.data) as StudyChange });
  });
  source.addEventListener('progress', (event) => {
    const { studyId } = JSON.parse(event.data) as { studyId: string };
    tell({ kind: 'progress', studyId });
  });
  source.addEventListener('gap', () => tell({ kind: 'gap' }));
}

/** Reads the stream for every tab until this page goes. */
function lead(channel: BroadcastChannel): Promise<never> {
  open((message) => {
    deliver(message);
    channel.postMessage(message);
  });
  return new Promise<never>(() => undefined);
}

function start(): void {
  if (started) return;
  started = true;
  const channel = new BroadcastChannel(NAME);
  channel.onmessage = (event: MessageEvent<Message>) => deliver(event.data);
  void navigator.locks.request(NAME, () => lead(channel));
}

function listen(listener: (message: Message) => void): () => void {
  start();
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** Calls back for every change of one study made anywhere, and for gaps. @returns how to stop */
export const onStudyEvents = (studyId: string, handle: (event: LiveEvent) => void): (() => void) =>
  listen((message) => {
    if (message.kind === 'connection' || message.kind === 'progress') return;
    if (message.kind === 'gap' || message.change.studyId === studyId) handle(message);
  });

/** The same for an island. `handle` should be stable. */
export function useStudyEvents(studyId: string, handle: (event: LiveEvent) => void): void {
  useEffect(() => onStudyEvents(studyId, handle), [studyId, handle]);
}

/** For an island: calls back when a study's flown ascents moved on. `handle` should be stable. */
export function useStudyProgress(studyId: string, handle: () => void): void {
  useEffect(
    () =>
      listen((message) => {
        if (message.kind === 'progress' && message.studyId === studyId) handle();
      }),
    [studyId, handle],
  );
}

const onConnection = (changed: () => void): (() => void) =>
  listen((message) => {
    if (message.kind === 'connection') changed();
  });

/**
 * Whether changes of others arrive right now; 'lost' is worth saying on the screen. The stream may have spoken before
 * an island wakes, so waking starts from what the server drew.
 */
export function useConnection(): Connection {
  return useSyncExternalStore(
    onConnection,
    () => connection,
    () => 'connecting',
  );
}
