import { useMemo, useState } from 'react';
import { Button, EmptyState, Panel, TableScroll, TextField } from '#components/ui/index.ts';
import type { SettlementInside, StudyCorridor } from '#contract/downrange.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import { sortedSettlements, type SettlementOrder } from './settlement-order.ts';

const STEP = 25;
const COLUMNS: readonly { key: SettlementOrder; name: string; unit?: string }[] = [
  { key: 'name', name: 'Settlement' },
  { key: 'people', name: 'People' },
  { key: 'downrangeKm', name: 'Downrange', unit: 'km' },
  { key: 'crossrangeKm', name: 'Off the flight line', unit: 'km' },
];

function Head({ order, onOrder }: { order: SettlementOrder; onOrder: (order: SettlementOrder) => void }) {
  return (
    <thead>
      <tr>
        {COLUMNS.map(({ key, name, unit }) => (
          <th
            key={key}
            scope="col"
            className={key === 'name' ? undefined : 'num'}
            aria-sort={order === key ? (key === 'people' ? 'descending' : 'ascending') : undefined}
          >
            <button type="button" className="underline" onClick={() => onOrder(key)}>
              {name}
            </button>
            {unit && <span className="unit">{unit}</span>}
          </th>
        ))}
      </tr>
    </thead>
  );
}

function Row({ place }: { place: SettlementInside }) {
  const { crossrangeKm } = place;
  return (
    <tr>
      <th scope="row">
        {place.name} <span className="text-ink-3">{place.countryCode}</span>
        {place.excluded && <span className="sub">in the exclusion zone</span>}
      </th>
      <td className="num">{place.people === 0 ? 'no figure' : formatNumber(place.people)}</td>
      <td className="num">{formatNumber(place.downrangeKm, 1)}</td>
      <td className="num">
        {formatNumber(Math.abs(crossrangeKm), 1)} {crossrangeKm < 0 ? 'left' : 'right'}
      </td>
    </tr>
  );
}

/** The settlements inside the corridor, sorted and searched; a few dozen at a time. */
export function SettlementsTable({ answer }: { answer: StudyCorridor }) {
  const { settlements, total } = answer;
  const [order, setOrder] = useState<SettlementOrder>('people');
  const [find, setFind] = useState('');
  const [shown, setShown] = useState(STEP);
  const found = useMemo(() => sortedSettlements(settlements, order, find), [settlements, order, find]);
  const rest = found.length - shown;
  const listed =
    settlements.length < total
      ? `The ${formatNumber(settlements.length)} most populous of ${formatNumber(total)}.`
      : formatCount(total, 'settlement') + '.';
  return (
    <Panel
      title="Listed settlements in the corridor"
      caption={`${listed} Each is one point, by the GeoNames gazetteer; smaller places, ships and aircraft are not in it.`}
    >
      {total === 0 ? (
        <EmptyState fact="No listed settlement was found inside.">
          The gazetteer holds places of about 1,000 people and more. Nobody listed is not nobody there.
        </EmptyState>
      ) : (
        <>
          <TextField
            label="Find a settlement"
            value={find}
            onChange={(event) => {
              setFind(event.target.value);
              setShown(STEP);
            }}
          />
          <TableScroll label="Listed settlements in the corridor">
            <table className="mt-3 table" data-dense="">
              <Head order={order} onOrder={setOrder} />
              <tbody>
                {found.slice(0, shown).map((place) => (
                  <Row key={`${place.name}/${place.latitudeDeg}/${place.longitudeDeg}`} place={place} />
                ))}
              </tbody>
            </table>
          </TableScroll>
          {found.length === 0 && <p className="mt-3">No settlement inside has “{find}” in its name.</p>}
          {rest > 0 && (
            <p className="mt-3">
              <Button size="small" onClick={() => setShown(shown + 4 * STEP)}>
                {`Show ${formatNumber(Math.min(rest, 4 * STEP))} more of ${formatNumber(rest)}`}
              </Button>
            </p>
          )}
        </>
      )}
    </Panel>
  );
}
