/** The colours of the map by role, as the theme has them now. */
const tokens = {
  sea: '--map-sea',
  land: '--map-land',
  coast: '--map-coast',
  border: '--map-border',
  graticule: '--map-graticule',
  label: '--map-label',
  pad: '--map-pad',
  chosen: '--map-chosen',
  sector: '--map-sector',
  chosenSector: '--map-sector-chosen',
  ink: '--ink',
  secondInk: '--ink-2',
  paper: '--paper',
  onSignal: '--on-signal',
} as const;

export type Palette = Readonly<Record<keyof typeof tokens, string>>;

export function readPalette(): Palette {
  const styles = getComputedStyle(document.documentElement);
  const entries = Object.entries(tokens).map(([role, token]) => [
    role,
    styles.getPropertyValue(token).trim(),
  ]);
  return Object.fromEntries(entries) as Palette;
}

/** Calls back when the theme is changed. @returns how to stop */
export function onThemeChange(callback: () => void): () => void {
  const observer = new MutationObserver(callback);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
  return () => observer.disconnect();
}
