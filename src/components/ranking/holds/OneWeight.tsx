import type { LeaderChangeOf } from '#contract/sensitivity.ts';
import {
  leaderChangeInWords,
  nearestChange,
  nearestChangeInWords,
  weightFigure,
  type Names,
} from '#contract/sensitivity-words.ts';
import { Chart, XAxis } from '#components/ui/chart.tsx';
import { Panel } from '#components/ui/Finding.tsx';
import { KeyLetter } from '#components/ui/States.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import type { Sheet } from '../columns.ts';
import { shortened } from './shorten.ts';

const WIDTH = 640;
const LEFT = 218;
const RIGHT = WIDTH - 14;
const TOP = 26;
const ROW = 50;
const TICKS = [0, 0.25, 0.5, 0.75, 1];
const CHARACTER = 6.7;
const NAME_LENGTH = 30;

const at = (weight: number): number => LEFT + weight * (RIGHT - LEFT);

interface OneWeightProps {
  changes: readonly LeaderChangeOf[];
  names: Names;
  sheet: Sheet;
}

/** For each criterion how far its weight may move, the others keeping their proportions, before the leader changes. */
export function OneWeight({ changes, names, sheet }: OneWeightProps) {
  const nearest = nearestChange(changes);
  const letters = new Map(sheet.columns.map(({ criterion, letter }) => [criterion.id, letter]));
  const bottom = TOP + changes.length * ROW;
  return (
    <Panel
      title={nearestChangeInWords(changes, names)}
      caption="One weight at a time, the others keeping their proportions. The lead holds along the heavy line; at each end the site named takes it. The circle is the weight now."
    >
      <Chart
        label={changes
          .map((change) => `${names.criterion(change.criterionId)}: ${leaderChangeInWords(change, names)}`)
          .join(' ')}
        width={WIDTH}
        height={bottom + 4}
        table={<ChangesTable changes={changes} names={names} letters={letters} />}
      >
        <XAxis ticks={TICKS} at={at} decimals={2} from={TOP - 6} to={bottom} labelY={TOP - 12} />
        {changes.map((change, place) => (
          <WeightRow
            key={change.criterionId}
            change={change}
            y={TOP + place * ROW + ROW / 2}
            title={`${letters.get(change.criterionId) ?? ''} ${names.criterion(change.criterionId)}`}
            nearest={nearest?.criterionId === change.criterionId}
            names={names}
          />
        ))}
      </Chart>
    </Panel>
  );
}

interface WeightRowProps {
  change: LeaderChangeOf;
  y: number;
  title: string;
  nearest: boolean;
  names: Names;
}

function WeightRow({ change: { weight, below, above }, y, title, nearest, names }: WeightRowProps) {
  const [from, to] = [at(below?.weight ?? 0), at(above?.weight ?? 1)];
  const end = (change: { weight: number; siteId: string }): string =>
    `${weightFigure(change.weight)} ${names.site(change.siteId)}`;
  return (
    <g>
      <text className={nearest ? 'strong' : undefined} x="0" y={y + 4}>
        {shortened(title, NAME_LENGTH)}
      </text>
      <path className="line-2 dotted" d={`M${at(0)} ${y}H${at(1)}`} />
      <path className="line sv-holds-line" d={`M${from} ${y}H${to}`} />
      {below && <EndTick x={from} y={y} words={end(below)} strong={nearest} under={above !== null} />}
      {above && <EndTick x={to} y={y} words={end(above)} strong={nearest} under={false} />}
      {!below && !above && (
        <text className="label-2" x={RIGHT} y={y - 9} textAnchor="end">
          no weight changes the leader
        </text>
      )}
      <circle className="candidate" cx={at(weight)} cy={y} r="5" />
    </g>
  );
}

interface EndTickProps {
  x: number;
  y: number;
  words: string;
  strong: boolean;
  /** The words stand under the line, because those of the other end stand over it. */
  under: boolean;
}

function EndTick({ x, y, words, strong, under }: EndTickProps) {
  const fits = x + words.length * CHARACTER <= RIGHT;
  return (
    <>
      <path className="axis" d={`M${x} ${y - 7}V${y + 7}`} />
      <text
        className={strong ? 'halo strong' : 'halo'}
        x={fits ? x : Math.min(x, RIGHT)}
        y={under ? y + 19 : y - 10}
        textAnchor={fits ? 'start' : 'end'}
      >
        {words}
      </text>
    </>
  );
}

interface ChangesTableProps {
  changes: readonly LeaderChangeOf[];
  names: Names;
  letters: ReadonlyMap<string, string>;
}

function ChangesTable({ changes, names, letters }: ChangesTableProps) {
  return (
    <TableScroll label="The weight at which the leader changes">
      <table className="table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Criterion</th>
            <th scope="col" className="num">
              Weight now
            </th>
            <th scope="col">When the leader changes</th>
          </tr>
        </thead>
        <tbody>
          {changes.map((change) => (
            <tr key={change.criterionId}>
              <th scope="row">
                <KeyLetter letter={letters.get(change.criterionId) ?? ''} />{' '}
                {names.criterion(change.criterionId)}
              </th>
              <td className="num">{weightFigure(change.weight)}</td>
              <td>{leaderChangeInWords(change, names)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}
