import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { Font } from '@react-pdf/renderer';
import { MONO, SANS } from './theme.ts';
import { unpackWoff } from './woff.ts';

// From this module, not from the working directory: the server may be started anywhere. The complete files, because
// a PDF has no unicode-range to pick among subsets.
const require = createRequire(import.meta.url);
const plex = (family: 'sans' | 'mono', style: string): string => {
  const name = `IBMPlex${family === 'sans' ? 'Sans' : 'Mono'}-${style}.woff`;
  const woff = readFileSync(require.resolve(`@ibm/plex-${family}/fonts/complete/woff/${name}`));
  return `data:font/ttf;base64,${unpackWoff(woff).toString('base64')}`;
};

/** Longest run of letters that is never parted; a longer one may break anywhere, without a hyphen of ours. */
const LONGEST_WORD = 16;

/**
 * The places where a word may part. The empty pieces between the letters tell the line breaker that a break there
 * adds no hyphen, so that a name is printed as it was entered.
 */
export function breakable(word: string | null): string[] {
  if (word === null) return [];
  const letters = [...word];
  return letters.length <= LONGEST_WORD ? [word] : letters.flatMap((letter) => [letter, '']);
}

let ready: Promise<(codePoint: number) => boolean> | undefined;

async function load(): Promise<(codePoint: number) => boolean> {
  const weights = (family: 'sans' | 'mono') => [
    { src: plex(family, 'Regular'), fontWeight: 400 as const },
    { src: plex(family, 'SemiBold'), fontWeight: 600 as const },
  ];
  Font.register({ family: SANS, fonts: weights('sans') });
  Font.register({ family: MONO, fonts: weights('mono') });
  Font.registerHyphenationCallback(breakable);
  const face = Font.getFont({ fontFamily: SANS, fontWeight: 400 });
  await face?.load();
  const data = face?.data;
  if (!data || !('hasGlyphForCodePoint' in data)) throw new Error('IBM Plex Sans did not load');
  return (codePoint) => data.hasGlyphForCodePoint(codePoint);
}

/**
 * Registers IBM Plex, once a thread.
 * @returns whether IBM Plex Sans has a glyph: for one it lacks another face would stand in, and not be embedded.
 */
export function plexCoverage(): Promise<(codePoint: number) => boolean> {
  ready ??= load();
  return ready;
}
