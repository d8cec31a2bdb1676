import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { detectDelimiter } from '#core/csv/delimiter.ts';
import { DELIMITERS, tokenise } from '#core/csv/tokenise.ts';

const cells = (text: string, delimiter: ',' | ';' | '\t' = ',') =>
  tokenise(text, delimiter).map((record) => record.cells);

describe('tokenise', () => {
  // RFC 4180, section 2, examples of rules 1, 2, 5, 6 and 7 [from memory].
  test.each([
    [
      'aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      'aaa,bbb,ccc\r\nzzz,yyy,xxx',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      '"aaa","bbb","ccc"\r\nzzz,yyy,xxx',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      '"aaa","b\r\nbb","ccc"\r\nzzz,yyy,xxx',
      [
        ['aaa', 'b\r\nbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    ['"aaa","b""bb","ccc"', [['aaa', 'b"bb', 'ccc']]],
  ])('RFC 4180: %j', (text, expected) => {
    expect(cells(text)).toEqual(expected);
  });

  test('reads back whatever a general-purpose writer writes', () => {
    const table = fc.array(
      fc.array(fc.string({ unit: fc.constantFrom('a', '"', ',', ';', '\t', '\n', '°', '-', '7', ' ') }), {
        minLength: 2,
        maxLength: 4,
      }),
      { minLength: 1, maxLength: 6 },
    );
    fc.assert(
      fc.property(table, fc.constantFrom(...DELIMITERS), fc.boolean(), (rows, delimiter, quotes) => {
        const text = Papa.unparse(rows, { delimiter, quotes, newline: '\n' });
        expect(cells(text, delimiter)).toEqual(rows);
      }),
      { seed: 20310401 },
    );
  });

  test('lines are physical ones, whatever ends them', () => {
    const text = 'name,notes\r\nA,"one\ntwo\r\nthree"\rB,x\n\nC,"y"\n';
    expect(tokenise(text, ',').map(({ line }) => line)).toEqual([1, 2, 5, 6, 7]);
  });

  test('seconds of arc in a bare cell are no quotes', () => {
    expect(cells(`A,12° 41' 30" S,45° 0' 1" E`)).toEqual([['A', `12° 41' 30" S`, `45° 0' 1" E`]]);
  });

  test('spaces before an opening quote are dropped', () => {
    expect(cells('A, "b, c" ,d')).toEqual([['A', 'b, c', 'd']]);
    expect(cells(' "a","b, ""c""\r\nd" \r\n  "",e')).toEqual([
      ['a', 'b, "c"\r\nd'],
      ['', 'e'],
    ]);
  });

  test('what follows a closing quote is kept, and takes no further line with it', () => {
    expect(cells('"12° 41\' 30" S",x\r"b" c" ,"d"\n"e","f"')).toEqual([
      ['12° 41\' 30 S"', 'x'],
      ['b c"', 'd'],
      ['e', 'f'],
    ]);
  });

  test('stops after as many records as asked for', () => {
    const text = 'a,b\n"c\nd",e\n\nf,g\n';
    for (const limit of [1, 2, 3, 4]) expect(tokenise(text, ',', limit)).toHaveLength(limit);
    expect(tokenise(text, ',', 5)).toEqual(tokenise(text, ','));
  });

  test('a quote that is never closed is told', () => {
    expect(tokenise('a,"b\nc,d', ',')).toEqual([{ line: 1, cells: ['a', 'b\nc,d'], unclosed: true }]);
  });
});

describe('detectDelimiter', () => {
  test.each([
    ['name,lat,lon\nA,1,2', ','],
    ['name;lat;lon\nA;1,5;2,5', ';'],
    ['name\tlat\tlon\nA\t1,5\t2,5', '\t'],
    ['site;breite;länge;bemerkung\nA;1,5;2,5;"a, b, c, d"', ';'],
    ['sep=;\nfoo;bar\n1,2,3;4', ';'],
    ['foo;bar;baz\n1;2;3', ';'],
    ['"Name, or title"\tLatitude\tLongitude\nA\t1\t2', '\t'],
  ] as const)('%j', (text, expected) => {
    expect(detectDelimiter(text)).toBe(expected);
  });
});
