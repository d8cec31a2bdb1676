import { announceStep } from '#components/live/step.ts';
import { askToFind } from './find.ts';

const KEY = 'spinward-single-keys';

function singleKeysOn(): boolean {
  try {
    return localStorage.getItem(KEY) !== 'off';
  } catch {
    return true; // storage may be barred
  }
}

function keepChoice(on: boolean) {
  try {
    if (on) localStorage.removeItem(KEY);
    else localStorage.setItem(KEY, 'off');
  } catch {
    // as above
  }
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable || target.closest('input, textarea, select') !== null)
  );
}

/** Where the digits lead: the study's sections, in order. Read from the page, which drew the same list. */
function sectionAddresses(): string[] {
  const list: unknown = JSON.parse(document.querySelector('[data-section-addresses]')?.textContent ?? '[]');
  return Array.isArray(list) ? list.filter((one) => typeof one === 'string') : [];
}

export function startKeys() {
  const dialog = document.querySelector<HTMLDialogElement>('[data-keys]');
  const switched = dialog?.querySelector<HTMLInputElement>('[data-single-keys]');
  const openKeys = () => dialog?.showModal();
  if (switched) {
    switched.checked = singleKeysOn();
    switched.addEventListener('change', () => keepChoice(switched.checked));
  }
  for (const button of document.querySelectorAll('[data-open-keys]'))
    button.addEventListener('click', openKeys);
  for (const button of document.querySelectorAll('[data-open-find]'))
    button.addEventListener('click', askToFind);

  const addresses = sectionAddresses();
  const actions: Record<string, () => void> = {
    f: askToFind,
    k: openKeys,
    n: () => announceStep(1),
    p: () => announceStep(-1),
  };
  document.addEventListener('keydown', (event) => {
    if (event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented || event.repeat) return;
    if (isTyping(event.target) || document.querySelector('dialog[open]') || !singleKeysOn()) return;
    const address = /^[1-9]$/.test(event.key) ? addresses[Number(event.key) - 1] : undefined;
    const act = Object.hasOwn(actions, event.key) ? actions[event.key] : undefined;
    if (!address && !act) return;
    event.preventDefault();
    if (address) location.assign(address);
    else act?.();
  });
}
