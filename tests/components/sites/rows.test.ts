import { describe, expect, test } from 'vitest';
import { moveFocus } from '#components/sites/grid-keys.ts';
import { nextSort, shownSites, sortOf } from '#components/sites/rows.ts';
import type { Site } from '#contract/site.ts';

const site = (code: string, name: string, latitudeDeg: number, notes = ''): Site => ({
  id: code,
  code,
  name,
  latitudeDeg,
  longitudeDeg: 0,
  elevationM: 0,
  permittedAzimuthsDeg: [],
  notes,
  values: {},
  particulars: {},
  version: 1,
});
const sites = [site('B2', 'Pad 10', 10), site('A1', 'Pad 9', -5, 'old quay'), site('C3', 'Éire Head', 52)];
const names = (list: readonly Site[]): string[] => list.map(({ name }) => name);

describe('the rows shown', () => {
  test('hold the text in code, name or notes, whatever its case', () => {
    expect(names(shownSites(sites, 'QUAY', null))).toEqual(['Pad 9']);
    expect(names(shownSites(sites, 'c3', null))).toEqual(['Éire Head']);
    expect(shownSites(sites, ' ', null)).toHaveLength(3);
  });

  test('sort by number where there are numbers, in names too', () => {
    expect(names(shownSites(sites, '', sortOf('name')))).toEqual(['Éire Head', 'Pad 9', 'Pad 10']);
    expect(names(shownSites(sites, '', sortOf('-latitudeDeg')))).toEqual(['Éire Head', 'Pad 10', 'Pad 9']);
  });

  test('a heading sorts up, down, and not at all', () => {
    const steps = ['name', '-name', null];
    expect(steps.map((now) => nextSort(sortOf(now), 'name'))).toEqual(['-name', null, 'name']);
    expect(sortOf('notes')).toBeNull();
  });
});

describe('the keyboard in the grid', () => {
  const at = { row: 3, column: 2 };
  const press = (key: string, ctrlKey = false) => moveFocus(at, { key, ctrlKey }, 12);

  test('arrows, Home, End and pages', () => {
    expect(press('ArrowDown')).toEqual({ row: 4, column: 2 });
    expect(press('Home')).toEqual({ row: 3, column: 0 });
    expect(press('End', true)).toEqual({ row: 11, column: 6 });
    expect(press('PageDown')).toEqual({ row: 11, column: 2 });
    expect(press('PageUp')).toEqual({ row: 0, column: 2 });
  });

  test('other keys move nothing', () => {
    expect(press('a')).toBeUndefined();
  });
});
