import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { AdoptDialog } from '#components/what-if/AdoptDialog.tsx';
import { ChangeList } from '#components/what-if/ChangeList.tsx';
import {
  change,
  draftOf,
  isUnsaved,
  stepped,
  takenBack,
  undone,
  type Draft,
} from '#components/what-if/draft.ts';
import { layOut } from '#components/what-if/moves-layout.ts';
import { RankMoves } from '#components/what-if/RankMoves.tsx';
import { noSiteMeant, siteMeant } from '#components/what-if/SiteField.tsx';
import type { LiveWhatIf } from '#components/what-if/use-what-if.ts';
import { notAdopted, whatIfLockOf } from '#components/what-if/WhatIfDesk.tsx';
import { pointsOf, WhatIfWeights } from '#components/what-if/WhatIfWeights.tsx';
import { sheetOf } from '#components/ranking/columns.ts';
import type { Viewer } from '#components/ranking/viewer.ts';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import { pointsStatement } from '#contract/weights.ts';
import { applyWhatIf, NO_CHANGES, rankMoves, shownMoves } from '#contract/what-if-model.ts';
import { changeLines, leadInWords } from '#contract/what-if-words.ts';
import type { WhatIf, WhatIfChanges } from '#contract/what-if.ts';
import { COST, criteria, DAYS, four, trialFigures, trialModel } from '#tests/components/ranking/trial.ts';

const STUDY = pointsStatement({ [COST]: 60, [DAYS]: 40 });
const idOf = (name: string): string => four.sites.find((site) => site.name === name)?.siteId ?? '';
const known = trialFigures(
  four.sites.map(({ name }, at) => ({ name, cells: four.cells[at] ?? [] })),
  { particulars: [[0, 0, { low: 240, high: 260 }]] },
);
const CHANGES: WhatIfChanges = {
  weights: pointsStatement({ [COST]: 30, [DAYS]: 70 }),
  limits: { [COST]: null },
  figures: [{ siteId: idOf('Near'), criterionId: COST, value: 235.5 }],
  leftOut: [idOf('Far')],
};
const LINES = changeLines(CHANGES, { figures: known, statement: STUDY });

function modelsOf(changes: Partial<WhatIfChanges>, figures = four) {
  const applied = applyWhatIf(figures, STUDY, { ...NO_CHANGES, ...changes });
  return {
    before: rankFigures(prepareFigures(figures), STUDY),
    after: rankFigures(prepareFigures(applied.figures), applied.statement),
  };
}
const textOf = (html: string): string =>
  html
    .replace(/<[^>]+>/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();

describe('changes in words', () => {
  test('say what the study has, what is tried, and what falls away', () => {
    expect(LINES.map(({ what, from, to, each, falls }) => [what, from, to, ...each, falls])).toEqual([
      ['Weights', '', '', 'Cost 0.600 → 0.300', 'Launch days 0.400 → 0.700', ''],
      ['Limit of Cost', '≤ 390 M€', 'none', ''],
      ['Cost of Near', '250 M€', '235.5 M€', 'low 240 M€ no longer holds and falls away'],
      ['Far', 'in the ranking', 'left out', ''],
    ]);
  });

  test('an entry that is gone has no line, and a rating is said by its step', () => {
    const [cost, days] = criteria;
    if (!cost || !days) throw new Error('no criteria');
    const steps = ['Very poor', 'Poor', 'Fair', 'Good', 'Very good'];
    const rated = trialFigures([{ name: 'Near', cells: [250, 2] }], {
      criteria: [cost, { ...days, source: 'rating', unit: '', steps }],
    });
    const figures = [
      { siteId: rated.sites[0]?.siteId ?? '', criterionId: DAYS, value: 4 },
      { siteId: '00000000-0000-7000-8000-00000000dead', criterionId: DAYS, value: 4 },
    ];
    const lines = changeLines({ ...NO_CHANGES, figures }, { figures: rated, statement: STUDY });
    expect(lines).toMatchObject([{ what: 'Launch days of Near', from: 'Fair (2)', to: 'Very good (4)' }]);
  });

  test('the lead is compared in as many digits as the margins need', () => {
    const lead = (changes: Partial<WhatIfChanges>) => {
      const { before, after } = modelsOf(changes);
      return leadInWords(presentRanking(before, 'study'), presentRanking(after, 'study'));
    };
    const near = (value: number) => ({
      figures: [{ siteId: idOf('Near'), criterionId: COST, value }],
    });
    expect(lead({})).toBe('Far keeps the lead, and its margin of 0.050.');
    // Near: (400 − 260) / 200 × 0.6 + 0.2 = 0.62
    expect(lead(near(260))).toBe('Far keeps the lead; its margin grows from 0.050 to 0.080.');
    expect(lead(near(240))).toBe('Far keeps the lead; its margin shrinks from 0.050 to 0.020.');
    expect(lead(near(200))).toBe('Near takes the lead from Far.');
  });
});

describe('a draft', () => {
  const kept = { id: 'w', name: 'Dearer land', version: 3, changes: NO_CHANGES };
  const points = (draft: Draft, cost: number): Draft =>
    stepped(
      draft,
      { key: 'points cost', label: 'points for Cost' },
      { ...draft.changes, weights: pointsStatement({ [COST]: cost }) },
    );

  test('a dragged slider is one step, and undone whole', () => {
    const dragged = points(points(points(draftOf(kept, 7), 10), 20), 30);
    expect(dragged.steps).toHaveLength(1);
    expect(isUnsaved(dragged, kept)).toBe(true);
    const out = stepped(
      dragged,
      { key: 'site', label: 'leaving out Far' },
      change.leaveOut(dragged.changes, 'far'),
    );
    expect(out.steps.at(-1)?.label).toBe('leaving out Far');
    expect(undone(out).changes).toEqual(dragged.changes);
    const back = undone(undone(out));
    expect(back.changes).toEqual(NO_CHANGES);
    expect(isUnsaved(back, kept)).toBe(false);
    expect(undone(back)).toBe(back);
  });

  test('another name is unsaved too, and one figure is tried once', () => {
    expect(isUnsaved({ ...draftOf(kept, 7), name: 'Dear land' }, kept)).toBe(true);
    const cell = { siteId: 's', criterionId: 'c' };
    const twice = change.figure(change.figure(NO_CHANGES, { ...cell, value: 1 }), { ...cell, value: 2 });
    expect(twice.figures).toEqual([{ ...cell, value: 2 }]);
  });

  test('each change can be taken back by itself', () => {
    const rest = LINES.reduce((changes, { at }) => takenBack(changes, at), CHANGES);
    expect(rest).toEqual(NO_CHANGES);
    expect(takenBack(CHANGES, { kind: 'limit', criterionId: COST })).toEqual({ ...CHANGES, limits: {} });
  });
});

describe('the drawn parts', () => {
  const { before, after } = modelsOf({ limits: { [COST]: { kind: 'at-most', value: 290 } } });
  const moves = rankMoves(before, after);

  test('the chart says its finding, marks the leader alone with the signal, and has its table', () => {
    const html = renderToStaticMarkup(<RankMoves moves={moves} narrow={false} />);
    expect(html).not.toContain('style=');
    expect(html).toContain(
      'Rank moves: Far now set aside, Near up 1 and =Unknown now incomplete, 1 to 2; 1 stay.',
    );
    expect(html.match(/wi-leads/g)).toHaveLength(1);
    expect(html.match(/fill-signal/g)).toHaveLength(2);
    expect(textOf(html)).toContain('Near 2 1 up 1');
    expect(textOf(html)).toContain('Far 1 set aside now set aside');
  });

  test('a long list keeps its rows apart and says how many lie between', () => {
    const many = trialFigures(
      Array.from({ length: 5_000 }, (_, at) => ({ name: `S${at}`, cells: [200 + at / 50, 100] })),
    );
    const figures = [{ siteId: many.sites[3_000]?.siteId ?? '', criterionId: COST, value: 200.01 }];
    const long = modelsOf({ figures }, many);
    const layout = layOut(shownMoves(rankMoves(long.before, long.after)), false);
    const rows = layout.lines.map(({ from }) => from.y).sort((a, b) => a - b);
    expect(rows.every((y, at) => at === 0 || y - (rows[at - 1] ?? 0) >= 32)).toBe(true);
    // S0 to S11 lead the study's list and S12 to S17, all down one, are the six drawn beside; then S3000.
    expect(layout.gaps.some(({ between }) => between === 2_982)).toBe(true);
    expect(Math.max(...rows)).toBeLessThan(layout.height);
  });

  test('the list of changes names each one that can be taken back', () => {
    const html = renderToStaticMarkup(<ChangeList lines={LINES} onTakeBack={() => undefined} />);
    expect(html.match(/aria-label="Take back /g)).toHaveLength(4);
    expect(renderToStaticMarkup(<ChangeList lines={LINES} />)).not.toContain('Take back');
    expect(textOf(renderToStaticMarkup(<ChangeList lines={[]} />))).toMatch(/^Nothing is tried yet/);
  });

  test('adoption is asked with everything that will change', () => {
    const html = renderToStaticMarkup(
      <AdoptDialog
        name="Dearer land"
        revision={14}
        lines={LINES}
        ignored={2}
        busy={false}
        error={null}
        onClose={() => undefined}
        onAdopt={() => undefined}
      />,
    );
    const text = textOf(html);
    for (const words of [
      'Revision 14 becomes 15',
      'Weights: Cost 0.600 → 0.300, Launch days 0.400 → 0.700.',
      'Limit of Cost: ≤ 390 M€ becomes none.',
      'Cost of Near: 250 M€ becomes 235.5 M€; low 240 M€ no longer holds and falls away.',
      'Far is removed from Sites; it can be brought back there.',
      '2 entries are left aside',
    ])
      expect(text).toContain(words);
  });

  test('weights stand beside the study’s, and points by another method start from its weights', () => {
    const model = trialModel();
    const { columns } = sheetOf(presentRanking(model, 'study'), model);
    const html = renderToStaticMarkup(
      <WhatIfWeights
        statement={STUDY}
        study={columns}
        here={columns}
        groupNames={new Map()}
        locked="A reader looks on."
        onChange={() => undefined}
      />,
    );
    expect(textOf(html)).toContain('A Cost 0.60 0.60');
    expect(html.match(/type="range"[^>]*aria-disabled="true"/g)).toHaveLength(2);
    // Rank-order centroid of two: 0.75 and 0.25.
    const byOrder = { method: 'centroid' as const, points: {}, order: [DAYS, COST], judgements: [] };
    expect(pointsOf(criteria, byOrder)).toEqual({ [COST]: 25, [DAYS]: 75 });
  });
});

test('a site is meant by its code or its name, whatever the case', () => {
  expect(siteMeant(four.sites, ' ne ')?.name).toBe('Near');
  expect(siteMeant(four.sites, 'FAR')?.name).toBe('Far');
  expect(siteMeant(four.sites, 'Farther')).toBeUndefined();
});

describe('who may do what', () => {
  const viewer = (over: Partial<Viewer> = {}): Viewer => ({
    role: 'lead',
    state: 'draft',
    archived: false,
    ...over,
  });
  test('where no site is meant the words say whether one was chosen at all', () => {
    expect(noSiteMeant('  ')).toBe('Choose a site.');
    expect(noSiteMeant('QQ')).toMatch(/name or code/);
  });

  test('readers look on, and nobody tries anything in an archived study', () => {
    expect(whatIfLockOf(viewer({ role: 'reviewer', state: 'in-review' }))).toBeUndefined();
    expect(whatIfLockOf(viewer({ role: 'reader' }))).toMatch(/^A reader/);
    expect(whatIfLockOf(viewer({ archived: true }))).toMatch(/archived/);
  });

  test('what is saved, seen against the present revision and changes something can be adopted', () => {
    const whatIf = { kept: {} as WhatIf, unsaved: false, movedOn: false } as LiveWhatIf;
    const said = (over: { viewer?: Partial<Viewer>; whatIf?: Partial<LiveWhatIf>; lines?: number }) =>
      notAdopted({
        viewer: viewer(over.viewer),
        whatIf: { ...whatIf, ...over.whatIf },
        lines: over.lines ?? 1,
      });
    expect(said({})).toBeUndefined();
    expect(said({ viewer: { state: 'in-review' } })).toMatch(/^In review/);
    expect(said({ whatIf: { unsaved: true } })).toMatch(/^Save/);
    expect(said({ whatIf: { kept: null } })).toMatch(/^Save/);
    expect(said({ whatIf: { movedOn: true } })).toMatch(/moved on/);
    expect(said({ lines: 0 })).toMatch(/changes nothing/);
  });
});
