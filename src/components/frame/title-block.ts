import { formatTimeUtc } from '#contract/format.ts';
import { onSaved, type SaveState } from '#components/live/saved.ts';
import { send } from '#components/live/api.ts';
import { startTheme } from './theme.ts';

const STUCK_AFTER_PX = 16;

function write(selector: string, text: string) {
  for (const element of document.querySelectorAll(selector)) element.textContent = text;
}

function showSaveState(state: SaveState) {
  if (state.kind === 'saving') write('[data-saved-note]', 'saving');
  if (state.kind === 'kept') write('[data-saved-note]', 'not saved');
  if (state.kind !== 'saved') return;
  write('[data-revision-number]', String(state.saved.revision));
  write('[data-saved-note]', `saved ${formatTimeUtc(state.saved.savedAt)}`);
}

async function signOut() {
  await send('POST', '/api/auth/sign-out', {});
  location.assign('/sign-in');
}

/** The live parts of the title block: shrinking on scroll, the Revision cell, theme, sign-out. */
export function startTitleBlock() {
  const block = document.querySelector('[data-title-block]');
  const stick = () => block?.toggleAttribute('data-stuck', scrollY > STUCK_AFTER_PX);
  addEventListener('scroll', stick, { passive: true });
  stick();
  onSaved(showSaveState);
  startTheme();
  for (const button of document.querySelectorAll('[data-sign-out]')) {
    button.addEventListener('click', () => void signOut());
  }
}
