const EVENT = 'spinward:find';

/** Asked by the f key and the Find buttons. */
export function askToFind() {
  document.dispatchEvent(new CustomEvent(EVENT));
}

export function onFind(open: () => void): () => void {
  document.addEventListener(EVENT, open);
  return () => document.removeEventListener(EVENT, open);
}
