import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { writeCsv, writeSites, type ExportedSite } from '#core/csv/export.ts';
import { readSites } from '#core/csv/read-sites.ts';
import type { FigureBounds } from '#core/csv/row.ts';
import { writeRefused } from '#core/csv/refused.ts';

const CRITERIA = [
  { id: 'c1', name: 'Cost to first launch', unit: 'M€' },
  { id: 'c2', name: '=Owner', unit: '' },
  { id: 'c3', name: 'Height of the fence', unit: 'posts (of 2 m)' },
];
const SITE: ExportedSite = {
  code: 'PV',
  name: '=HYPERLINK("http://x")',
  latitudeDeg: -4.7418,
  longitudeDeg: -37.3014,
  elevationM: -3.5,
  permittedAzimuthsDeg: [
    [325, 92],
    [100, 120.5],
  ],
  notes: '-see "annex"; 3,\r\nand more',
  values: { c1: -332.5, c2: '@quay' },
};

describe('writeSites', () => {
  test('figures are plain, texts like formulas are guarded, a general-purpose reader reads it', () => {
    const text = writeSites([SITE], CRITERIA);
    expect(Papa.parse(text, { skipEmptyLines: true }).data).toEqual([
      [
        'code',
        'name',
        'latitude_deg',
        'longitude_deg',
        'elevation_m',
        'permitted_azimuths',
        'notes',
        'Cost to first launch (M€)',
        "'=Owner",
        'Height of the fence',
      ],
      [
        'PV',
        `'=HYPERLINK("http://x")`,
        '-4.7418',
        '-37.3014',
        '-3.5',
        '325-92; 100-120.5',
        `'-see "annex"; 3,\r\nand more`,
        '-332.5',
        "'@quay",
        '',
      ],
    ]);
  });

  test('low and high follow their figure where any site has one, and keep clear of a criterion of such a name', () => {
    const bounded = { ...SITE, particulars: { c1: { low: -340 } } };
    const heading = (criteria: typeof CRITERIA) => writeSites([SITE, bounded], criteria).split('\r\n')[0];
    expect(heading(CRITERIA)).toContain(
      'notes,Cost to first launch (M€),Cost to first launch_low (M€),Cost to first launch_high (M€)',
    );
    const named = [...CRITERIA, { id: 'c4', name: 'cost to first launch_High', unit: '' }];
    expect(heading(named)).toContain('Cost to first launch low (M€),Cost to first launch high (M€)');
  });

  test('any sites come back as they were', () => {
    const word = fc.string({
      unit: fc.constantFrom('a', 'B', ' ', '=', '-', "'", '"', ',', ';', '@', 'é', '北'),
      minLength: 1,
      maxLength: 12,
    });
    const figure = fc.double({ min: -1e6, max: 1e6, noNaN: true }).map((value) => value + 0);
    const clean = word.map((text) => `x${text.replace(/\s+/g, ' ')}`.trim());
    const text = word.map((raw) => raw.trim()).filter((raw) => raw !== '' && /[a-zé北=@]/i.test(raw));
    const site = fc.record({
      name: clean,
      latitudeDeg: fc.double({ min: -90, max: 90, noNaN: true }).map((value) => value + 0),
      longitudeDeg: fc
        .double({ min: -180, max: 180, noNaN: true, minExcluded: true })
        .map((value) => value + 0),
      elevationM: fc.double({ min: -500, max: 9000, noNaN: true }).map((value) => value + 0),
      permittedAzimuthsDeg: fc.constantFrom<ExportedSite['permittedAzimuthsDeg']>(
        [],
        [[0, 360]],
        [
          [342, 95.25],
          [100, 120],
        ],
      ),
      notes: text,
      values: fc.record({ c1: figure, c2: text }),
      less: fc.option(fc.nat(1000), { nil: undefined }),
      more: fc.option(fc.nat(1000), { nil: undefined }),
    });
    fc.assert(
      fc.property(
        fc.uniqueArray(site, { minLength: 1, maxLength: 8, selector: ({ name }) => name.toLowerCase() }),
        (drawn) => {
          const sites = drawn.map(({ less, more, ...one }, i) => {
            const bounds = {
              ...(less === undefined ? {} : { low: one.values.c1 - less }),
              ...(more === undefined ? {} : { high: one.values.c1 + more }),
            };
            const bounded = Object.keys(bounds).length > 0;
            const particulars: Record<string, FigureBounds> = bounded ? { c1: bounds } : {};
            return { ...one, code: `S${i}`, particulars };
          });
          const file = readSites(new TextEncoder().encode(writeSites(sites, CRITERIA.slice(0, 2))), {
            existing: [],
          });
          if (file.kind === 'refused') throw new Error(file.message);
          expect(file.rows.map(({ outcome, site: back }) => ({ outcome, back }))).toEqual(
            sites.map(({ values, particulars, ...rest }) => ({
              outcome: 'new',
              back: {
                ...rest,
                values: { 'Cost to first launch': values.c1, '=Owner': values.c2 },
                particulars: particulars['c1'] ? { 'Cost to first launch': particulars['c1'] } : {},
              },
            })),
          );
        },
      ),
      { seed: 20310401 },
    );
  });
});

test('writeCsv leaves a number a number, even as text, and guards the rest', () => {
  expect(writeCsv([['-4.5', '-4 30 S', '+1', "'quoted", 7, '']])).toBe(`-4.5,'-4 30 S,+1,'quoted,7,\r\n`);
});

test('writeRefused gives the refused rows to put right, which can be uploaded again', () => {
  const text = 'Ort;Breite;Länge;Kosten\nA;-4,5;200;1,5\nB;x;-7,25;2\nC;97;=1;"a;b"\n';
  const columns = [{ column: 'Ort', field: 'name' }] as const;
  const file = readSites(new TextEncoder().encode(text), { existing: [], columns });
  if (file.kind === 'refused') throw new Error(file.message);
  const refused = writeRefused(file);
  expect(Papa.parse(refused, { delimiter: ';', skipEmptyLines: true }).data).toEqual([
    ['Ort', 'Breite', 'Länge', 'Kosten', 'Line in the file', 'Why it was refused'],
    ['B', 'x', "'-7,25", '2', '3', 'Latitude “x” is not a number of degrees.'],
    [
      'C',
      '97',
      "'=1",
      'a;b',
      '4',
      'Latitude 97 is outside −90 to 90. Longitude “=1” is not a number of degrees.',
    ],
  ]);
  const again = readSites(new TextEncoder().encode(refused.replace(';x;', ';1;')), { existing: [], columns });
  expect(again).toMatchObject({
    counts: { new: 1, refused: 1 },
    rows: [{ site: { name: 'B', longitudeDeg: -7.25, values: { Kosten: 2 } } }, { outcome: 'refused' }],
  });
});
