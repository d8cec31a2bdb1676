import { formatCount, formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import { figureText } from '#contract/rating.ts';
import { letterOf } from '#contract/ranking-words.ts';
import type { FigureParticulars } from '#contract/site.ts';
import { cell, figures, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';
import { memoNames } from './names.ts';

/** Rows of figures and of files; the rest is counted and points to the CSV. */
const MOST_FIGURES = 150;
const MOST_FILES = 60;

interface EnteredFigure {
  site: number;
  criterion: number;
  figure: number;
  known: FigureParticulars | undefined;
}

/** Every entered figure, site by site in the study's order. */
function enteredFigures({ figures: { criteria, cells, particulars } }: MemoFacts): EnteredFigure[] {
  const known = new Map(particulars.map(([site, criterion, what]) => [`${site} ${criterion}`, what]));
  return cells.flatMap((line, site) =>
    line.flatMap((figure, criterion) =>
      typeof figure === 'number' && criteria[criterion]?.source !== 'computed'
        ? [{ site, criterion, figure, known: known.get(`${site} ${criterion}`) }]
        : [],
    ),
  );
}

function figuresTable(facts: MemoFacts, entered: readonly EnteredFigure[]): MemoTable {
  const { criteria, sites } = facts.figures;
  const text = (criterion: number, figure: number | undefined): string => {
    const of = criteria[criterion];
    return of === undefined || figure === undefined
      ? '–'
      : figureText(of, figure, facts.decimals[criterion] ?? 0);
  };
  const listed = entered.slice(0, MOST_FIGURES);
  return table(
    'Entered figures and where they come from',
    [
      words('Site', 16, true),
      words('Criterion', 19, true),
      figures('Figure', 'likely', 11, true),
      figures('Low', '', 8),
      figures('High', '', 8),
      words('Source', 17),
      words('Date', 11),
      words('Confidence', 10),
    ],
    listed.map(({ site, criterion, figure, known }) =>
      row([
        cell(sites[site]?.name ?? ''),
        cell(`${letterOf(criterion)} ${criteria[criterion]?.name ?? ''}`),
        cell(text(criterion, figure)),
        cell(text(criterion, known?.low)),
        cell(text(criterion, known?.high)),
        cell(known?.source ?? 'no source'),
        cell(known?.date ?? '–'),
        cell(known?.confidence ?? '–'),
      ]),
    ),
    entered.length > listed.length
      ? [`${formatCount(entered.length - listed.length, 'further figure')}: see the sites as CSV.`]
      : [],
  );
}

function evidenceTable(facts: MemoFacts): MemoTable[] {
  const { files, total } = facts.evidence;
  if (files.length === 0) return [];
  const names = memoNames(facts);
  const listed = files.slice(0, MOST_FILES);
  return [
    table(
      'Evidence files, by their SHA-256',
      [words('Site and criterion', 27, true), words('File', 23, true), words('SHA-256', 50)],
      listed.map(({ siteId, criterionId, fileName, sha256 }) =>
        row([
          cell(`${names.site(siteId)}, ${names.lettered(criterionId)}`),
          cell(fileName),
          cell(`${sha256.slice(0, 32)} ${sha256.slice(32)}`),
        ]),
      ),
      [
        'The file is had from the study; its checksum shows that it is the one this memo rests on. The 64 digits are parted in the middle.',
        ...(total > listed.length
          ? [`${formatCount(total - listed.length, 'further file')} not listed.`]
          : []),
      ],
    ),
  ];
}

/** What was entered, from where, and what has no source. */
export function enteredBlocks(facts: MemoFacts): MemoBlock[] {
  const entered = enteredFigures(facts);
  if (entered.length === 0)
    return [{ kind: 'paragraph', text: ['Every figure is computed; none is entered.'] }];
  const bare = entered.filter(({ known }) => known?.source === undefined).length;
  const counted =
    bare === 0
      ? `Each of ${formatCount(entered.length, 'entered figure')} has a source.`
      : `${formatNumber(bare)} of ${formatCount(entered.length, 'entered figure')} ${bare === 1 ? 'has' : 'have'} no source.`;
  return [{ kind: 'paragraph', text: [counted] }, figuresTable(facts, entered), ...evidenceTable(facts)];
}
