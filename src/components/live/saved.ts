/** Between the islands that save and the title block's Revision cell. */

export interface Saved {
  revision: number;
  /** ISO 8601, UTC. */
  savedAt: string;
}

/** `saving` while a write is on its way, `kept` when it failed and what was typed is only here. */
export type SaveState = { kind: 'saved'; saved: Saved } | { kind: 'saving' } | { kind: 'kept' };

const EVENT = 'spinward:saved';

export function announceSaved(saved: Saved) {
  announce({ kind: 'saved', saved });
}

export function announceSaving() {
  announce({ kind: 'saving' });
}

export function announceKept() {
  announce({ kind: 'kept' });
}

function announce(state: SaveState) {
  document.dispatchEvent(new CustomEvent<SaveState>(EVENT, { detail: state }));
}

export function onSaved(hear: (state: SaveState) => void) {
  document.addEventListener(EVENT, (event) => {
    if (event instanceof CustomEvent) hear(event.detail as SaveState);
  });
}
