import latinExtUrl from '@fontsource/ibm-plex-sans/files/ibm-plex-sans-latin-ext-400-normal.woff2?url';
import latinItalicUrl from '@fontsource/ibm-plex-sans/files/ibm-plex-sans-latin-400-italic.woff2?url';
import latinMediumUrl from '@fontsource/ibm-plex-sans/files/ibm-plex-sans-latin-500-normal.woff2?url';
import latinExtMediumUrl from '@fontsource/ibm-plex-sans/files/ibm-plex-sans-latin-ext-500-normal.woff2?url';
import latinUrl from '@fontsource/ibm-plex-sans/files/ibm-plex-sans-latin-400-normal.woff2?url';
import monoUrl from '@fontsource/ibm-plex-mono/files/ibm-plex-mono-latin-400-normal.woff2?url';
import vietnameseUrl from '@fontsource/ibm-plex-sans/files/ibm-plex-sans-vietnamese-400-normal.woff2?url';
import { addProtocol, setWorkerUrl, type StyleSpecification } from 'maplibre-gl';
import workerUrl from 'maplibre-gl/dist/maplibre-gl-worker.mjs?worker&url';
import { Protocol } from 'pmtiles';

const here = (address: string): string => new URL(address, location.origin).href;
const latin = ['U+0000-00FF', 'U+0131', 'U+0152-0153', 'U+02BB-02BC', 'U+2000-206F', 'U+2212'];
const latinExt = ['U+0100-02BA', 'U+02BD-02FF', 'U+1E00-1E9F'];
const vietnamese = ['U+1EA0-1EF1'];

const face = (url: string, range: string[]) => ({ url: here(url), 'unicode-range': range });

/** The faces that labels are set in; served by Spinward like all else. */
export const fontFaces: NonNullable<StyleSpecification['font-faces']> = {
  'Plex Sans': [face(latinUrl, latin), face(latinExtUrl, latinExt), face(vietnameseUrl, vietnamese)],
  'Plex Sans Medium': [face(latinMediumUrl, latin), face(latinExtMediumUrl, latinExt)],
  'Plex Sans Italic': [face(latinItalicUrl, latin)],
  'Plex Mono': [face(monoUrl, latin)],
};

export const worldAddress = `pmtiles://${here('/world.pmtiles')}`;

let ready = false;

/** Tells the library, once, where its worker lies and how the archive is read: all of it from our own origin. */
export function prepareLibrary(): void {
  if (ready) return;
  setWorkerUrl(here(workerUrl));
  addProtocol('pmtiles', new Protocol().tile);
  ready = true;
}

/** Whether this browser can draw the map at all. */
export function canDraw(): boolean {
  return document.createElement('canvas').getContext('webgl2') !== null;
}
