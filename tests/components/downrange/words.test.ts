import { describe, expect, test } from 'vitest';
import { edgesOf } from '#components/downrange/corridor-layers.ts';
import { sortedSettlements } from '#components/downrange/settlement-order.ts';
import { corridorFinding, formatPower, roughly, zoneFinding } from '#components/downrange/words.ts';

type Corridor = Parameters<typeof corridorFinding>[1];
const corridor = (fields: Partial<Corridor>): Corridor =>
  ({
    azimuthDeg: 90,
    rangeNm: 5000,
    coastKm: 2,
    firstLandKm: null,
    firstLandName: null,
    people: 0,
    settlements: 0,
    ...fields,
  }) as Corridor;

describe('the finding', () => {
  test('says what was found, and of nothing that none was found', () => {
    const site = { name: 'Tern Head' };
    expect(corridorFinding(site, corridor({}))).toBe(
      'At 90° from Tern Head no land was found along the flight line within 9,260 km; the corridor holds no listed settlement.',
    );
    expect(
      corridorFinding(
        site,
        corridor({
          azimuthDeg: 42.3,
          firstLandKm: 2310.4,
          firstLandName: 'Cape Verde',
          people: 12400,
          settlements: 3,
        }),
      ),
    ).toBe(
      'At 42.3° from Tern Head the first land lies 2,310 km downrange, in Cape Verde; the corridor holds 3 listed settlements with 12,400 people.',
    );
    expect(corridorFinding(site, corridor({ coastKm: null }))).toContain('stays over land for all 9,260 km');
  });

  test('names what is unknown or spread in the exclusion zone', () => {
    type Zone = Parameters<typeof zoneFinding>[0];
    const zone = { settlements: 2, people: 300, settlementsWithoutFigure: 1, spreadPeople: 12.4 } as Zone;
    expect(zoneFinding(zone)).toBe(
      'The overflight exclusion zone holds 2 listed settlements with 300 people, 1 of them without a figure; about 12 more people are spread over its land.',
    );
    expect(zoneFinding({ ...zone, settlements: 0, people: 0, settlementsWithoutFigure: 0 })).toBe(
      'The overflight exclusion zone holds no listed settlement; about 12 people are spread over its land.',
    );
  });

  test('never claims safety or approval', () => {
    const words = [
      corridorFinding({ name: 'A' }, corridor({})),
      corridorFinding({ name: 'A' }, corridor({ coastKm: null })),
    ];
    expect(words.join(' ')).not.toMatch(/approv|complian|\bsafe\b|nobody/i);
  });
});

test('small numbers stand with their power of ten', () => {
  expect([1.6251e-3, 1e-4, 0, 5.445e-8, 1.908].map(formatPower)).toEqual([
    '1.63 × 10⁻³',
    '1.00 × 10⁻⁴',
    '0',
    '5.45 × 10⁻⁸',
    '1.91',
  ]);
  expect([12.4, 1234.5, 2_345_678].map(roughly)).toEqual(['12', '1,230', '2,350,000']);
});

test('settlements are sorted and found whatever their accents', () => {
  const place = (name: string, people: number, crossrangeKm = 0) => ({
    name,
    people,
    crossrangeKm,
    countryCode: 'XX',
    latitudeDeg: 0,
    longitudeDeg: 0,
    downrangeKm: people,
    excluded: false,
  });
  const places = [place('Belém', 5, -30), place('Acará', 9, 10), place('Óbidos', 7, -20)];
  const names = (order: Parameters<typeof sortedSettlements>[1], find = '') =>
    sortedSettlements(places, order, find).map(({ name }) => name);
  expect(names('people')).toEqual(['Acará', 'Óbidos', 'Belém']);
  expect(names('name')).toEqual(['Acará', 'Belém', 'Óbidos']);
  expect(names('crossrangeKm')).toEqual(['Acará', 'Óbidos', 'Belém']);
  expect(names('people', 'obi')).toEqual(['Óbidos']);
  expect(places[0]?.name).toBe('Belém');
});

test('a corridor cut at the date line has no edge there', () => {
  const ring = [
    [170, 10],
    [180, 10],
    [180, 20],
    [170, 20],
    [170, 10],
  ];
  expect(edgesOf(ring)).toEqual([
    [
      [170, 10],
      [180, 10],
    ],
    [
      [180, 20],
      [170, 20],
      [170, 10],
    ],
  ]);
});
