import { describe, expect, test } from 'vitest';
import type { ExistingSite } from '#core/csv/outcomes.ts';
import { readSites, type ReadOptions, type SitesFile } from '#core/csv/read-sites.ts';
import { expectSoon } from '#tests/support/soon.ts';

const ESSERY: ExistingSite = {
  id: 'site-es',
  code: 'ES',
  name: 'Essery Bank',
  latitudeDeg: 7.3306,
  longitudeDeg: -58.5002,
};
const bytes = (text: string) => new TextEncoder().encode(text);
const read = (text: string, options: Partial<ReadOptions> = {}) =>
  readSites(bytes(text), { existing: [ESSERY], ...options });

function rowsOf(text: string, options: Partial<ReadOptions> = {}): SitesFile['rows'] {
  const file = read(text, options);
  if (file.kind === 'refused') throw new Error(file.message);
  return file.rows;
}

/** One row under a full heading: what becomes of it and why. */
function fate(row: string, options: Partial<ReadOptions> = {}) {
  const [found] = rowsOf(`name,code,lat,lon,elevation_m,permitted_azimuths,notes\n${row}\n`, options);
  return {
    outcome: found?.outcome,
    reasons: found?.reasons.map(({ code, field, severity }) => `${severity} ${code} ${field ?? '-'}`),
  };
}

describe('a row by itself', () => {
  test.each([
    ['A,,1,2,,,', 'new', []],
    [',,1,2,,,', 'refused', ['refusal empty name']],
    ['A,,,2,,,', 'refused', ['refusal empty latitudeDeg']],
    ['A,,1,,,,', 'refused', ['refusal empty longitudeDeg']],
    ['A,,x,2,,,', 'refused', ['refusal not-a-number latitudeDeg']],
    ['A,,1,-180.5,,,', 'refused', ['refusal out-of-range longitudeDeg']],
    ['A,,97.2,11,,,', 'refused', ['refusal out-of-range latitudeDeg', 'warning swapped latitudeDeg']],
    [
      'A,,12 E,7 N,,,',
      'refused',
      ['refusal hemisphere latitudeDeg', 'refusal hemisphere longitudeDeg', 'warning swapped latitudeDeg'],
    ],
    ['A,,1,184.86,,,', 'new', ['change longitude-brought-in longitudeDeg']],
    ['A,,1,-180,,,', 'new', ['change longitude-brought-in longitudeDeg']],
    ['A,X,1,2,,,', 'refused', ['refusal code-malformed code']],
    ['A,TOOLONGCODE,1,2,,,', 'refused', ['refusal code-malformed code']],
    ['A,Ä1,1,2,,,', 'refused', ['refusal code-malformed code']],
    ['A,,1,2,high,,', 'refused', ['refusal not-a-number elevationM']],
    ['A,,1,2,12000,,', 'refused', ['refusal out-of-range elevationM']],
    ['A,,1,2,,140-140,', 'refused', ['refusal sector permittedAzimuthsDeg']],
    [`${'n'.repeat(120)},,1,2,,,${'m'.repeat(2000)}`, 'new', []],
    [`${'n'.repeat(121)},,1,2,,,`, 'refused', ['refusal too-long name']],
    [`A,,1,2,,,${'m'.repeat(2001)}`, 'refused', ['refusal too-long notes']],
    [`${'🛰'.repeat(120)},,1,2,,,`, 'new', []],
    ['A,,1,2,,,,extra', 'refused', ['refusal too-many-columns -']],
    ['A,,1,2,,,,', 'new', []],
    ['A,,1,2', 'refused', ['refusal too-few-columns -']],
    ['A,,1,2,,,"open', 'refused', ['refusal unclosed-quote -']],
    ['Essery North,ES,1,2,,,', 'refused', ['refusal code-taken code']],
    ['Essery North,es,1,2,,,', 'refused', ['refusal code-taken code']],
    [' essery  BANK ,,20,20,,,', 'duplicate', ['note duplicate name']],
    ['Essery Bank,ES,20,20,,,', 'duplicate', ['note duplicate name']],
    ['Essery Bank,EX,20,20,,,', 'duplicate', ['note duplicate name']],
    ['Essery Quay,,7.3306,-58.4952,,,', 'new', ['warning near -']],
    ['Essery Bank,,7.3306,-58.4952,,,', 'duplicate', ['note duplicate name']],
    ['Far,,-58.5002,7.3306,,,', 'new', ['warning swapped latitudeDeg']],
  ])('%s', (row, outcome, reasons) => {
    expect(fate(row)).toEqual({ outcome, reasons });
  });

  test('says in words what is wrong', () => {
    const rows = rowsOf(
      'name,code,lat,lon\nKreuzhuk,KR,97.2150,11.4020\nEssery North,ES,7.5110,-58.4127\nTavake Point,TA,-21.2217,184.8600\n',
    );
    expect(rows.map((row) => row.reasons[0]?.message)).toEqual([
      'Latitude 97.2150 is outside −90 to 90.',
      'Code ES is taken by Essery Bank. Give this row another code.',
      'Longitude 184.8600 brought into −180 to 180.',
    ]);
  });
});

describe('rows among each other', () => {
  test('a name or code twice in the file: the first stands', () => {
    const rows = rowsOf('name,code,lat,lon\nA,AA,1,2\nb,BB,10,20\n a ,CC,30,40\nD,bb,50,60\n');
    expect(rows.map(({ line, outcome }) => [line, outcome])).toEqual([
      [2, 'new'],
      [3, 'new'],
      [4, 'refused'],
      [5, 'refused'],
    ]);
    expect(rows[2]?.reasons[0]).toMatchObject({
      code: 'duplicate-in-file',
      message: 'a is also on line 2. One row a site.',
    });
    expect(rows[3]?.reasons[0]).toMatchObject({
      code: 'code-taken',
      message: 'Code BB is taken by b on line 3. Give this row another code.',
    });
  });

  test('a refused row takes neither name nor code from a good one', () => {
    expect(rowsOf('name,code,lat,lon\nA,AA,100,2\nA,AA,1,2\n').map((row) => row.outcome)).toEqual([
      'refused',
      'new',
    ]);
  });

  test('made codes avoid the study’s and those given further down', () => {
    const rows = rowsOf('name,code,lat,lon\nEast Shore,,1,2\nAnother,EA,10,20\n');
    expect(rows.map((row) => row.site.code)).toEqual(['ET', 'EA']);
  });

  test('a duplicate without a code keeps the site’s', () => {
    expect(rowsOf('name,lat,lon\nEssery Bank,20,20\n')[0]).toMatchObject({
      duplicateOf: 'site-es',
      site: { code: 'ES' },
    });
  });

  test('two rows under 1 km apart warn of each other, and 1.2 km do not', () => {
    const rows = rowsOf('name,lat,lon\nA,0,179.998\nB,0,-179.996\nC,0,-179.985\n');
    expect(rows.map((row) => row.reasons.map((reason) => reason.message))).toEqual([
      ['668 m from B on line 3: less than 1 km.'],
      ['668 m from A on line 2: less than 1 km.'],
      [],
    ]);
  });

  test('a file whose two columns are exchanged warns on every row', () => {
    const rows = rowsOf('name,lat,lon\nA,145,-14\nB,122,16\nC,49,-17\n');
    expect(rows.every((row) => row.reasons.some((reason) => reason.code === 'swapped'))).toBe(true);
    expect(rows.map((row) => row.outcome)).toEqual(['refused', 'refused', 'new']);
  });
});

describe('the file as a whole', () => {
  test('feet by the heading, decimal comma by the semicolon, notes with newlines, lines counted', () => {
    const file = read(
      '\ufeffSite;Lat;Long;Alt_ft;Az_ok;Remarks\r\nA;−4,5;37,25;100;35-120/200,5-250;"one\r\ntwo"\r\n\r\nB;5,5;1,5;;all;\r\n',
    );
    expect(file).toMatchObject({
      kind: 'read',
      encoding: 'utf-8',
      delimiter: ';',
      decimalComma: true,
      counts: { new: 2, duplicate: 0, refused: 0 },
      rows: [
        {
          line: 2,
          site: {
            latitudeDeg: -4.5,
            longitudeDeg: 37.25,
            elevationM: 30.48,
            permittedAzimuthsDeg: [
              [35, 120],
              [200.5, 250],
            ],
            notes: 'one\r\ntwo',
          },
        },
        { line: 5, site: { latitudeDeg: 5.5, elevationM: 0, permittedAzimuthsDeg: [] } },
      ],
    });
  });

  test('a table pasted with tabs and decimal commas', () => {
    expect(rowsOf('Name\tLat\tLon\tCost (M€)\nA\t−4,5\t37,25\t1,5\n')[0]?.site).toMatchObject({
      latitudeDeg: -4.5,
      values: { Cost: 1.5 },
    });
    expect(rowsOf('Name\tLat\tLon\tCost\nA\t−4.5\t37.25\t1,500\n')[0]?.site.values).toEqual({
      Cost: '1,500',
    });
  });

  test('other columns are entered criteria: numbers, or text kept as given', () => {
    const file = read(
      'name,lat,lon,Cost (M€),Owner,Lease,,Cost [k$]\nA,1,2,332,=Kustverk,007,,1\nB,10,20,tbd,"Ost, AG",12b,,\nC,-10,20,271,,3a,,\n',
    );
    if (file.kind === 'refused') throw new Error(file.message);
    expect(file.columns.slice(3)).toEqual([
      {
        index: 3,
        heading: 'Cost (M€)',
        field: 'criterion',
        unit: 'M€',
        criterion: 'Cost',
        criterionId: null,
        kind: 'number',
        part: 'likely',
      },
      {
        index: 4,
        heading: 'Owner',
        field: 'criterion',
        unit: '',
        criterion: 'Owner',
        criterionId: null,
        kind: 'text',
        part: 'likely',
      },
      {
        index: 5,
        heading: 'Lease',
        field: 'criterion',
        unit: '',
        criterion: 'Lease',
        criterionId: null,
        kind: 'text',
        part: 'likely',
      },
      {
        index: 6,
        heading: '',
        field: 'unused',
        unit: null,
        criterion: null,
        criterionId: null,
        kind: null,
        part: null,
      },
      {
        index: 7,
        heading: 'Cost [k$]',
        field: 'criterion',
        unit: 'k$',
        criterion: 'Cost (2)',
        criterionId: null,
        kind: 'number',
        part: 'likely',
      },
    ]);
    expect(file.rows.map((row) => row.site.values)).toEqual([
      { Cost: 332, Owner: '=Kustverk', Lease: '007', 'Cost (2)': 1 },
      { Cost: 'tbd', Owner: 'Ost, AG', Lease: '12b' },
      { Cost: 271, Lease: '3a' },
    ]);
    expect(file.rows[1]?.reasons).toMatchObject([
      { code: 'text-figure', severity: 'warning', field: 'Cost' },
    ]);
  });

  test('a column fills the study’s criterion of its name, unless the unit differs or it is computed', () => {
    const criteria = [
      { id: 'c1', name: 'Cost', unit: 'M€', kind: 'number' },
      { id: 'c2', name: 'Lease', unit: '', kind: 'text' },
      { id: 'c3', name: 'Turn', unit: '°', kind: 'computed' },
      { id: 'c4', name: 'Fence (old)', unit: '', kind: 'number' },
    ] as const;
    const file = read('name,lat,lon,COST (k€),cost [M€],lease,Turn,fence  (old)\nA,1,2,3,4,5,6,7\n', {
      criteria,
    });
    if (file.kind === 'refused') throw new Error(file.message);
    expect(
      file.columns
        .slice(3)
        .map(({ criterion, criterionId, unit, kind }) => [criterion, criterionId, unit, kind]),
    ).toEqual([
      ['COST (2)', null, 'k€', 'number'],
      ['Cost', 'c1', 'M€', 'number'],
      ['Lease', 'c2', '', 'text'],
      ['Turn (2)', null, '', 'number'],
      ['Fence (old)', 'c4', '', 'number'],
    ]);
    expect(file.rows[0]?.site.values).toEqual({
      'COST (2)': 3,
      Cost: 4,
      Lease: '5',
      'Turn (2)': 6,
      'Fence (old)': 7,
    });
  });

  describe('low and high', () => {
    test.each([
      ['Cost (M€)', 'Cost_low (M€)', 'Cost_high (M€)'],
      ['Cost (M€)', 'cost LOW [m€]', 'Cost (M€)_high'],
      ['cost_m', 'cost_m_low', 'cost_m-high'],
      ['Sea (calm) (d)', 'Sea (calm) low', 'Sea (calm)_high (d)'],
    ])('%s takes %s and %s', (x, low, high) => {
      const file = read(
        `name,lat,lon,${high},${x},${low}\nA,1,2,360,300,250\nB,10,20,,300,\nC,-10,20,310,300,\n`,
      );
      if (file.kind === 'refused') throw new Error(file.message);
      const name = file.columns[4]?.criterion ?? '';
      expect(file.columns.slice(3).map(({ criterion, part }) => [criterion, part])).toEqual([
        [name, 'high'],
        [name, 'likely'],
        [name, 'low'],
      ]);
      expect(file.rows.map(({ site }) => site.values)).toEqual(Array(3).fill({ [name]: 300 }));
      expect(file.rows.map(({ site }) => site.particulars)).toEqual([
        { [name]: { high: 360, low: 250 } },
        {},
        { [name]: { high: 310 } },
      ]);
    });

    test('without such a figure, in another unit, twice or as a criterion of the study it is a figure itself', () => {
      const file = read(
        'name,lat,lon,Tide low (m),Cost (M€),Cost_low (k€),Fog,Fog_low,fog low,Wind,Wind low\nA,1,2,1,2,3,4,3,5,6,7\n',
        {
          criteria: [{ id: 'w', name: 'Wind low', unit: '', kind: 'number' }],
        },
      );
      if (file.kind === 'refused') throw new Error(file.message);
      expect(file.columns.slice(3).map(({ criterion, part }) => [criterion, part])).toEqual([
        ['Tide low', 'likely'],
        ['Cost', 'likely'],
        ['Cost_low', 'likely'],
        ['Fog', 'likely'],
        ['Fog', 'low'],
        ['fog low', 'likely'],
        ['Wind', 'likely'],
        ['Wind low', 'likely'],
      ]);
    });

    test('a row whose low and high do not hold its figure is refused, and says why', () => {
      const rows = rowsOf(
        'name;lat;lon;x;x_low;x_high\nA;1;2;3,5;4;3\nB;10;20;;4;\nC;-10;20;3;n/a;\nD;-20;20;tbd;;9\nE;-30;20;3;3;3\n',
      );
      expect(
        rows.map(({ outcome, reasons }) => [
          outcome,
          ...reasons.map(({ code, field, message }) => [code, field, message]),
        ]),
      ).toEqual([
        [
          'refused',
          ['low-high', 'x', 'x: low 4 is above the figure, 3.5.'],
          ['low-high', 'x', 'x: high 3 is below the figure, 3.5.'],
        ],
        ['refused', ['low-high', 'x', 'x: low 4 has no figure to belong to.']],
        ['refused', ['not-a-number', 'x', 'x low: “n/a” is no number.']],
        [
          'refused',
          ['text-figure', 'x', 'x: “tbd” is no number and counts as no figure.'],
          ['low-high', 'x', 'x: high 9 has no figure to belong to.'],
        ],
        ['new'],
      ]);
    });

    test('a text’s low is left out with a warning', () => {
      const rows = rowsOf('name,lat,lon,Owner,Owner low\nA,1,2,Kustverk,4\n');
      expect(rows[0]).toMatchObject({
        outcome: 'new',
        site: { values: { Owner: 'Kustverk' }, particulars: {} },
        reasons: [{ code: 'low-high', severity: 'warning' }],
      });
    });
  });

  test('a rating takes the numbers of its steps or their names', () => {
    const steps = ['Very poor', 'Poor', 'Fair', 'Good', 'Very good'];
    const criteria = [{ id: 'r', name: 'Standing', unit: '', kind: 'rating', steps }] as const;
    const rows = rowsOf(
      'name,lat,lon,Standing,Standing_low\nA,1,2,very  GOOD,Fair\nB,10,20,0,\nC,-10,20,5,\nD,-20,20,2.5,\nE,-30,20,Godo,\nF,-40,20,1,Good\n',
      { criteria },
    );
    expect(rows.map(({ outcome, site }) => [outcome, site.values, site.particulars])).toEqual([
      ['new', { Standing: 4 }, { Standing: { low: 2 } }],
      ['new', { Standing: 0 }, {}],
      ['refused', { Standing: 5 }, {}],
      ['refused', { Standing: 2.5 }, {}],
      ['new', { Standing: 'Godo' }, {}],
      ['refused', { Standing: 1 }, { Standing: { low: 3 } }],
    ]);
    expect(rows.map(({ reasons }) => reasons[0]?.message)).toEqual([
      undefined,
      undefined,
      'Standing: 5 is none of the steps 0 to 4.',
      'Standing: 2.5 is none of the steps 0 to 4.',
      'Standing: “Godo” is none of its steps and counts as no figure.',
      'Standing: low 3 is above the figure, 1.',
    ]);
  });

  test('the match can be changed', () => {
    const text = 'ort,y,x,remarks\nA,1,2,hello\n';
    expect(read(text)).toMatchObject({
      kind: 'refused',
      code: 'heading',
      message: 'The heading names no column for a name.',
    });
    const columns = [
      { column: 'Ort', field: 'name' },
      { column: 1, field: 'longitudeDeg' },
      { column: 2, field: 'latitudeDeg' },
      { column: 3, field: 'unused' },
    ] as const;
    expect(rowsOf(text, { columns })[0]?.site).toMatchObject({
      name: 'A',
      latitudeDeg: 2,
      longitudeDeg: 1,
      notes: '',
      values: {},
    });
    expect(read(text, { columns: [{ column: 'nowhere', field: 'name' }] })).toMatchObject({
      code: 'columns',
    });
  });

  test.each([
    ['', 'empty'],
    ['\n\n', 'empty'],
    [',,\n', 'empty'],
    ['name,lat,lon\n', 'empty'],
    ['A,1,2\nB,3,4\n', 'heading'],
    ['\u0000\u0001\u0002\u0000', 'binary'],
  ])('%j: %s', (text, code) => {
    expect(read(text)).toMatchObject({ kind: 'refused', code });
  });

  test('10,000 rows are read, 10,001 and more than 5 MB are not', () => {
    const rows = (n: number) =>
      `name,lat,lon\n${Array.from({ length: n }, (_, i) => `S${i},${(i % 179) - 89},${i % 360}`).join('\n')}`;
    expect(read(rows(10_000))).toMatchObject({ kind: 'read', counts: { new: 10_000 } });
    expect(read(rows(10_001))).toMatchObject({ kind: 'refused', code: 'too-many-rows' });
    expect(readSites(new Uint8Array(5 * 1024 * 1024 + 1), { existing: [] })).toMatchObject({
      code: 'too-large',
    });
  });

  test('10,000 like rows in one place take under a second', () => {
    const text = `name,lat,lon,elev,azimuths,notes,Cost,Days\n${Array.from({ length: 10_000 }, (_, i) => `Site ${i},12°41'30"S,45.${i % 7},12,"35-120; 200-250",note,${i},${i % 300}`).join('\n')}`;
    const started = performance.now();
    expect(read(text)).toMatchObject({ kind: 'read', counts: { new: 10_000 } });
    expectSoon('reading 10,000 rows', performance.now() - started, 1_000);
  });
});
