import { useMemo } from 'react';
import { formatNumber, formatSigned } from '#contract/format.ts';
import { rowOf, type RankingRow } from '#contract/ranking-rows.ts';
import { Button } from '#components/ui/Button.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import type { Sheet } from '../columns.ts';
import { FigureCell } from '../FigureCell.tsx';
import { useViewParam } from '../use-view-param.ts';
import type { RankingViewProps } from '../views.ts';
import { boutInWords, boutOf, type Bout } from './head-to-head.ts';
import { SitePicker } from './SitePicker.tsx';

const LEAST = 2;
const MOST = 4;

/** Two to four sites, criterion by criterion, with what makes the difference first. */
export function HeadToHead({ model, sheet }: Pick<RankingViewProps, 'model' | 'sheet'>) {
  const [param, setParam] = useViewParam('sites');
  const codes = useMemo(() => model.rows.map(({ site }) => model.figures.sites[site]?.code ?? ''), [model]);
  const chosen = chosenOf(param, codes);
  const listed = chosen.flatMap((code) => model.rows[codes.indexOf(code)] ?? []);
  const rows = listed.map((one) => rowOf(model, one));
  const bout = boutOf(
    model,
    rows,
    listed.map(({ site }) => site),
    sheet.decimals,
  );
  const choose = (next: readonly string[]): void => setParam(next.join(','));
  const free = codes.find((code) => !chosen.includes(code));
  return (
    <Panel
      title="Head to head"
      caption="Value × weight = term, and the terms add up to the overall value. Differences are the first site less the other; the greatest stands first."
    >
      <div className="sv-picks">
        {chosen.map((code, slot) => (
          <SitePicker
            key={code}
            label={slot === 0 ? 'Site' : 'Against'}
            model={model}
            value={code}
            taken={chosen}
            onChoose={(next) => choose(chosen.map((one, at) => (at === slot ? next : one)))}
            onLeave={chosen.length > LEAST ? () => choose(chosen.filter((one) => one !== code)) : undefined}
          />
        ))}
        {chosen.length < MOST && free !== undefined && (
          <Button icon="add" onClick={() => choose([...chosen, free])}>
            Add a site
          </Button>
        )}
      </div>
      <p className="sv-finding" role="status">
        {boutInWords(
          bout,
          rows.map(({ name }) => name),
          model.figures.criteria,
        )}
      </p>
      <TableScroll label={`Head to head: ${rows.map(({ name }) => name).join(', ')}`}>
        <table className="sv-bout table">
          <BoutHead rows={rows} />
          <tbody>
            {bout.order.map((place) => (
              <BoutRow key={place} place={place} bout={bout} rows={rows} sheet={sheet} />
            ))}
          </tbody>
          <BoutFoot bout={bout} rows={rows} />
        </table>
      </TableScroll>
      {rows.some(({ kind }) => kind === 'incomplete') && (
        <p className="caption pt-2">
          A missing figure counts 0 here, as in the least overall value of its site.
        </p>
      )}
    </Panel>
  );
}

/** The sites of the address that exist, filled up with the first of the list. */
function chosenOf(param: string | null, codes: readonly string[]): string[] {
  const asked = (param ?? '').split(',').filter((code) => codes.includes(code));
  const distinct = [...new Set(asked)].slice(0, MOST);
  const others = codes.filter((code) => !distinct.includes(code));
  return [...distinct, ...others.slice(0, Math.max(0, LEAST - distinct.length))];
}

function BoutHead({ rows }: { rows: readonly RankingRow[] }) {
  const [first, ...others] = rows;
  return (
    <thead>
      <tr>
        <th scope="col" rowSpan={2}>
          Criterion
        </th>
        <th scope="col" rowSpan={2} className="num">
          Weight
        </th>
        {rows.map(({ siteId, name }) => (
          <th key={siteId} scope="colgroup" colSpan={2} className="num sv-site">
            {name}
          </th>
        ))}
        {others.map(({ siteId, name }) => (
          <th key={siteId} scope="col" rowSpan={2} className="num sv-site">
            Difference
            <span className="unit">
              {first?.name} less {name}
            </span>
          </th>
        ))}
      </tr>
      <tr>
        {rows.flatMap(({ siteId, name }) => [
          <th key={`${siteId}-figure`} scope="col" className="num sv-sub-head sv-site">
            <span className="sr-only">{name}: </span>Figure<span className="unit">value</span>
          </th>,
          <th key={`${siteId}-term`} scope="col" className="num sv-sub-head">
            <span className="sr-only">{name}: </span>Term<span className="unit">× weight</span>
          </th>,
        ])}
      </tr>
    </thead>
  );
}

interface BoutRowProps {
  place: number;
  bout: Bout;
  rows: readonly RankingRow[];
  sheet: Sheet;
}

function BoutRow({ place, bout, rows, sheet }: BoutRowProps) {
  const column = sheet.columns[place];
  if (!column) return null;
  const { criterion, letter, decimals } = column;
  const greatest = Math.max(...bout.differences.flat().map(Math.abs));
  return (
    <tr>
      <th scope="row">
        <KeyLetter letter={letter} /> {criterion.name}
        {criterion.unit && <span className="rk-unit"> {criterion.unit}</span>}
      </th>
      <td className="num">{formatNumber(column.weight, column.weightDecimals)}</td>
      {rows.flatMap((row, at) => {
        const contribution = row.contributions[place];
        return [
          <td key={`${row.siteId}-figure`} className="num sv-site">
            {contribution && <FigureCell contribution={contribution} decimals={decimals} />}
          </td>,
          <td key={`${row.siteId}-term`} className="num">
            {contribution?.term == null ? '–' : formatNumber(bout.terms[at]?.[place] ?? 0, bout.decimals)}
          </td>,
        ];
      })}
      {bout.differences.map((steps, at) => (
        <td key={rows[at + 1]?.siteId} className="num sv-site">
          <DifferenceBar share={(steps[place] ?? 0) / (greatest || 1)} />
          {formatSigned(steps[place] ?? 0, bout.decimals)}
        </td>
      ))}
    </tr>
  );
}

function BoutFoot({ bout, rows }: { bout: Bout; rows: readonly RankingRow[] }) {
  return (
    <tfoot>
      <tr className="rk-sum">
        <th scope="row" colSpan={2}>
          Overall value
        </th>
        {rows.map((row, at) => (
          <td key={row.siteId} colSpan={2} className="num sv-site">
            {formatNumber(bout.totals[at] ?? 0, bout.decimals)}
          </td>
        ))}
        {bout.margins.map((margin, at) => (
          <td key={rows[at + 1]?.siteId} className="num sv-site">
            {formatSigned(margin, bout.decimals)}
          </td>
        ))}
      </tr>
    </tfoot>
  );
}

const HALF = 28;

/** To the right and filled for the first site, to the left and open for the other. */
function DifferenceBar({ share }: { share: number }) {
  const width = Math.abs(share) * HALF;
  return (
    <svg className="sv-difference" width={2 * HALF + 2} height="12" aria-hidden="true">
      <rect
        className={share > 0 ? 'fill-2' : 'fill-open'}
        x={share > 0 ? HALF + 1 : HALF + 1 - width}
        y="1.5"
        width={width}
        height="9"
      />
      <path className="axis" d={`M${HALF + 1} 0V12`} />
    </svg>
  );
}
