import fs from 'node:fs';
import { describe, expect, test } from 'vitest';

/*
 * The palette against WCAG 2.2: text 4.5:1 (1.4.3), edges of controls 3:1 (1.4.11), by the standard's own formula of
 * relative luminance. Source: W3C Recommendation WCAG 2.2, "relative luminance" and "contrast ratio" [from memory].
 */

const css = fs.readFileSync(new URL('../../src/styles/tokens.css', import.meta.url), 'utf8');
const [day = '', night = ''] = css.split("[data-theme='night']");

function palette(text: string): Record<string, string> {
  return Object.fromEntries([...text.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})\b/gi)].map((m) => [m[1], m[2]]));
}

function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const c = parseInt(hex.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [light = 0, dark = 0] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (light + 0.05) / (dark + 0.05);
}

test('the formula gives the standard’s bounds: 21 for black on white, 1 for equals', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
  expect(contrast('#777777', '#777777')).toBe(1);
});

const GROUNDS = ['paper', 'sheet', 'sunk', 'wash', 'wash-refuse'];
const TEXTS = ['ink', 'ink-2', 'ink-3', 'signal', 'refuse'];

describe.each([
  ['day', palette(day)],
  ['night', { ...palette(day), ...palette(night) }],
])('%s', (_, colours) => {
  const ratio = (a: string, b: string) => contrast(colours[a] ?? '', colours[b] ?? '');

  test.each(TEXTS.flatMap((text) => GROUNDS.map((ground) => [text, ground] as const)))(
    '%s on %s can be read',
    (text, ground) => expect(ratio(text, ground)).toBeGreaterThanOrEqual(4.5),
  );

  test.each([
    ['on-ink', 'ink'],
    ['on-signal', 'signal'],
  ])('%s on %s can be read', (text, ground) => expect(ratio(text, ground)).toBeGreaterThanOrEqual(4.5));

  test.each(['paper', 'sheet', 'sunk'])('the edge of a field shows on %s', (ground) =>
    expect(ratio('field', ground)).toBeGreaterThanOrEqual(3),
  );
});
