const KEY = 'spinward-theme';
type Theme = 'day' | 'night';

function stored(): string | null {
  try {
    return localStorage.getItem(KEY);
  } catch {
    return null; // storage may be barred: the choice then lasts for the page
  }
}

function wear(theme: Theme) {
  document.documentElement.dataset['theme'] = theme;
}

/** Day or night by the buttons, kept on this device; without a choice the system's wish is followed as it changes. */
export function startTheme() {
  const dark = matchMedia('(prefers-color-scheme: dark)');
  dark.addEventListener('change', () => {
    if (!stored()) wear(dark.matches ? 'night' : 'day');
  });
  for (const button of document.querySelectorAll('[data-switch-theme]')) {
    button.addEventListener('click', () => {
      const next = document.documentElement.dataset['theme'] === 'night' ? 'day' : 'night';
      wear(next);
      try {
        localStorage.setItem(KEY, next);
      } catch {
        // as above
      }
    });
  }
}
