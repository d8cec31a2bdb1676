import { formatFull, formatNumber, formatShare } from '#contract/format.ts';
import { missingInWords, rankRange } from '#contract/ranking-words.ts';
import type { RankingRow } from '#contract/ranking-rows.ts';
import { Icon } from '#components/ui/Icon.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { isLeading, Reasons, whereabouts } from './cells.tsx';
import type { Sheet } from './columns.ts';
import { FigureText } from './FigureCell.tsx';
import { ValueBar } from './ValueBar.tsx';

const BAR_WIDTH = 302;
const BAR_HEIGHT = 18;

interface RankingListProps {
  sheet: Sheet;
  rows: readonly RankingRow[];
  /** Code of the site chosen. */
  chosen: string | null;
}

/** The ranking for a narrow screen: the whole reading in one column, the terms of each site a tap away. */
export function RankingList({ sheet, rows, chosen }: RankingListProps) {
  return (
    <ol className="rk-list">
      {rows.map((row, index) => [
        row.kind === 'set-aside' && rows[index - 1]?.kind !== 'set-aside' && (
          <li key="band" className="rk-list-band">
            Set aside: each fails a must-meet limit
          </li>
        ),
        <ListRow key={row.siteId} row={row} sheet={sheet} open={index === 0 || row.code === chosen} />,
      ])}
    </ol>
  );
}

function ListRow({ row, sheet, open }: { row: RankingRow; sheet: Sheet; open: boolean }) {
  return (
    <li
      data-lead={isLeading(row) ? '' : undefined}
      data-set-aside={row.kind === 'set-aside' ? '' : undefined}
    >
      <ListHead row={row} sheet={sheet} />
      {row.kind !== 'set-aside' && (
        <ValueBar
          contributions={row.contributions}
          names={sheet.names}
          value={row.value}
          bestValue={row.kind === 'incomplete' ? row.bestValue : undefined}
          width={BAR_WIDTH}
          height={BAR_HEIGHT}
          decimals={sheet.decimals}
        />
      )}
      <details open={open}>
        <summary>
          {row.kind === 'set-aside' ? 'Its figures' : 'What it is made of'}
          <span className="sr-only">, {row.name}</span>
        </summary>
        <ListTerms row={row} sheet={sheet} />
      </details>
    </li>
  );
}

function ListHead({ row, sheet }: { row: RankingRow; sheet: Sheet }) {
  const figure = (value: number): string => formatNumber(value, sheet.decimals);
  return (
    <div className="rk-list-head">
      <span className="rk-list-rank" data-range={row.kind === 'incomplete' ? '' : undefined}>
        {row.kind === 'ranked' && formatNumber(row.rank)}
        {row.kind === 'incomplete' && rankRange(row).replace(' to ', '–')}
        {row.kind === 'set-aside' && <Icon name="set-aside" />}
      </span>
      <span className="rk-list-name">{row.name}</span>
      {row.kind !== 'set-aside' && (
        <span className="rk-list-value" title={formatFull(row.value)}>
          {figure(row.value)}
          {row.kind === 'incomplete' && <> to {figure(row.bestValue)}</>}
        </span>
      )}
      <span className="rk-list-sub">
        {isLeading(row) && <b className="rk-list-word">Leads, </b>}
        {row.kind === 'incomplete' && (
          <>
            <b>Incomplete</b>: {missingInWords(sheet.ranking, row.missing)}
          </>
        )}
        {row.kind === 'set-aside' ? (
          <Reasons reasons={row.reasons} />
        ) : (
          row.kind === 'ranked' && whereabouts(row)
        )}
      </span>
    </div>
  );
}

/** Figure, unit and value × weight, so that anyone can add the total up by hand. */
function ListTerms({ row, sheet }: { row: RankingRow; sheet: Sheet }) {
  return (
    <ul className="rk-list-terms">
      {sheet.columns.map(({ criterion, place, letter, decimals, weight, weightDecimals }) => {
        const contribution = row.contributions[place];
        if (!contribution) return null;
        return (
          <li key={criterion.id}>
            <KeyLetter letter={letter} />
            <span>{criterion.name}</span>
            <span className="num">
              <FigureText contribution={contribution} decimals={decimals} />{' '}
              <span className="rk-unit">{criterion.unit}</span>
            </span>
            <span className="num rk-unit">
              {contribution.value !== null &&
                `${formatShare(contribution.value)} × ${formatNumber(weight, weightDecimals).replace(/^0\./, '.')}`}
            </span>
          </li>
        );
      })}
    </ul>
  );
}
