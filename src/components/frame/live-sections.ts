import { announceSaved, onSaved } from '#components/live/saved.ts';
import { apiFetch } from '#components/live/api.ts';
import { onStudyEvents } from '#components/live/study-events.ts';
import type { StudySections } from '#contract/sections.ts';

/** Changes come in runs: a run is read once, when it has settled. */
const SETTLED_MS = 400;

function show({ sections }: StudySections) {
  for (const { key, fact, outstanding } of sections)
    for (const element of document.querySelectorAll<HTMLElement>(`[data-section="${key}"]`)) {
      element.toggleAttribute('data-outstanding', outstanding);
      for (const line of element.querySelectorAll('[data-fact]')) line.textContent = fact;
      for (const word of element.querySelectorAll('[data-standing]'))
        word.textContent = outstanding ? ', something outstanding' : ', in order';
    }
}

/** Keeps the sections' lines of fact, and the revision, as they are now: after a save here, or a change elsewhere. */
export function startLiveSections(studyId: string) {
  let waiting: ReturnType<typeof setTimeout> | undefined;
  let shown = 0;
  const read = async () => {
    const now = await apiFetch<StudySections>(`/api/v1/studies/${studyId}/sections`).catch(() => undefined);
    // Without an answer the old facts stay; the next change reads them again.
    if (!now) return;
    show(now);
    shown = now.revision;
    announceSaved(now);
  };
  const soon = () => {
    clearTimeout(waiting);
    waiting = setTimeout(() => void read(), SETTLED_MS);
  };
  onSaved((state) => {
    if (state.kind === 'saved' && state.saved.revision !== shown) soon();
  });
  onStudyEvents(studyId, (event) => {
    if (event.kind === 'change') soon();
  });
}
