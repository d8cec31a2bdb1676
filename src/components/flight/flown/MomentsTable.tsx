import { TableScroll } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';
import type { FlightEvent } from './events.ts';
import type { Flown } from './ProfileCharts.tsx';
import { PROFILES } from './profile.ts';

interface MomentsTableProps {
  flown: readonly Flown[];
  /** Of the first flight. */
  events: readonly FlightEvent[];
}

/** The charts as a table, a row a moment. */
export function MomentsTable({ flown, events }: MomentsTableProps) {
  const words = new Map(events.map((event) => [event.timeS, event.words]));
  return flown.map(({ code, name, moments }, which) => (
    <div key={code} className="mt-3 max-h-96 overflow-y-auto">
      <TableScroll label={`Moments of the ascent from ${name}`}>
        <table className="table" data-dense="">
          <caption className="caption text-left">{name}</caption>
          <thead>
            <tr>
              <th scope="col" className="num">
                Time<span className="unit">s</span>
              </th>
              <th scope="col" className="num">
                Downrange<span className="unit">km</span>
              </th>
              {PROFILES.map(({ key, name: figure, unit }) => (
                <th key={key} scope="col" className="num">
                  {figure}
                  <span className="unit">{unit}</span>
                </th>
              ))}
              <th scope="col">Event</th>
            </tr>
          </thead>
          <tbody>
            {moments.map((moment, at) => (
              <tr key={`${at} ${moment.timeS}`}>
                <td className="num">{formatNumber(moment.timeS, 1)}</td>
                <td className="num">{formatNumber(moment.downrangeKm, 1)}</td>
                {PROFILES.map(({ key, decimals }) => (
                  <td key={key} className="num">
                    {formatNumber(moment[key], decimals)}
                  </td>
                ))}
                <td>{which === 0 ? words.get(moment.timeS) : ''}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
    </div>
  ));
}
