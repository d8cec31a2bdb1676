import { describe, expect, test } from 'vitest';
import { appendChoices, chooseField, columnChoices, NO_CHOICES } from '#components/sites/upload/choices.ts';
import { countStates, filterRows, sameRows } from '#components/sites/upload/row-filter.ts';
import { commitLabel, countsInWords, doneInWords, unitOf } from '#components/sites/upload/words.ts';
import { UploadOptions } from '#contract/upload.ts';
import { readSites, type SitesFile } from '#core/csv/read-sites.ts';

const existing = [{ id: 'es', code: 'ES', name: 'Essery Bank', latitudeDeg: 7.3, longitudeDeg: -58.5 }];

function read(text: string): SitesFile {
  const file = readSites(new TextEncoder().encode(text), { existing });
  if (file.kind === 'refused') throw new Error(file.message);
  return file;
}

const file = read(
  'name,code,lat,lon,alt_ft,Cost (M€)\nA,,1,2,100,3\nB,,1,200,,4\nC,,95,2,,5\nEssery Bank,,10,10,,6\nD,,1.001,2,,7\nE,,-40,60,,tbd\n',
);

describe('rows', () => {
  test('states, and the filter that puts the worst first', () => {
    expect(countStates(file.rows)).toEqual({ refused: 1, changed: 1, warned: 3, duplicate: 1, accepted: 0 });
    expect(filterRows(file.rows, 'telling').map((row) => row.line)).toEqual([4, 5, 3, 2, 6, 7]);
    expect(filterRows(file.rows, 'all').map((row) => row.line)).toEqual([2, 3, 4, 5, 6, 7]);
    expect(filterRows(file.rows, 'duplicate').map((row) => row.line)).toEqual([5]);
  });

  test('what the server read is compared line by line', () => {
    const [first, ...rest] = file.rows;
    if (!first) throw new Error('no rows');
    expect(sameRows(file.rows, [...file.rows])).toBe(true);
    expect(sameRows(file.rows, rest)).toBe(false);
    expect(sameRows(file.rows, [{ line: 2, outcome: 'duplicate' }, ...rest])).toBe(false);
  });
});

describe('words', () => {
  test('the counts, the button and what was done', () => {
    const good = file.rows.filter((row) => row.outcome !== 'refused');
    expect(countsInWords(file.rows)).toBe(
      '6 rows read: 3 accepted, 1 changed, 1 in the study already, 1 refused.',
    );
    expect(commitLabel(good, 'update', true)).toBe('Add 4 good rows, update 1 site');
    expect(commitLabel(good, 'add', false)).toBe('Add 5 chosen rows');
    expect(
      commitLabel(
        good.filter((row) => row.outcome === 'duplicate'),
        'update',
        false,
      ),
    ).toBe('Update 1 site');
    const done = { uploadId: '', skipped: 0, sites: [], revision: 2, savedAt: '' };
    expect(doneInWords({ ...done, added: 9, updated: 2 }, 'a.csv')).toBe(
      '9 sites added and 2 updated from a.csv',
    );
    expect(doneInWords({ ...done, added: 0, updated: 1 }, 'a.csv')).toBe('1 site updated from a.csv');
    expect(doneInWords({ ...done, added: 0, updated: 0 }, 'a.csv')).toBe('Nothing changed from a.csv');
    expect(file.columns.map(unitOf)).toEqual(['text', 'text', '°', '°', 'ft → m', 'M€']);
  });
});

describe('choices', () => {
  test('a field given to a second column is taken from the first, and the server reads the form alike', () => {
    const [name, , lat, lon] = file.columns;
    if (!name || !lat || !lon) throw new Error('no columns');
    const choices = chooseField(chooseField(NO_CHOICES, lat, 'longitudeDeg'), lon, 'longitudeDeg');
    expect(columnChoices(choices)).toEqual([
      { column: 2, field: 'unused' },
      { column: 3, field: 'longitudeDeg' },
    ]);
    const form = new FormData();
    appendChoices(form, { ...choices, delimiter: '\t', encoding: 'windows-1252' });
    expect(UploadOptions.parse(Object.fromEntries(form))).toEqual({
      columns: columnChoices(choices),
      delimiter: '\t',
      encoding: 'windows-1252',
    });
  });
});
