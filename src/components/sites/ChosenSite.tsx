import { wayInWords } from '#components/flight/words.ts';
import type { MapTrack } from '#components/map/types.ts';
import { Button } from '#components/ui/Button.tsx';
import type { OrbitResult } from '#contract/evaluate.ts';
import { formatLatitude, formatLongitude, formatNumber } from '#contract/format.ts';
import type { Site } from '#contract/site.ts';
import { azimuthWords } from './read-site.ts';

interface ChosenProps {
  site: Site;
  /** Of the orbit looked at, with its title; null where the study has none. */
  flight: { title: string; result: OrbitResult } | null;
  track: MapTrack | null;
  onOpen: () => void;
}

/** In words and figures what the map draws for the chosen pad: sectors, launch azimuth, ground track. */
export function ChosenSite({ site, flight, track, onOpen }: ChosenProps) {
  return (
    <section className="chosen-site" aria-label={`Chosen: ${site.name}`}>
      <div className="chosen-site-head">
        <h2>{site.name}</h2>
        <Button size="small" onClick={onOpen}>
          Open details
        </Button>
      </div>
      <dl>
        <dt>Position</dt>
        <dd className="num">
          {formatLatitude(site.latitudeDeg, 4)}, {formatLongitude(site.longitudeDeg, 4)}
        </dd>
        <dt>Permitted azimuths</dt>
        <dd className="num">{azimuthWords(site.permittedAzimuthsDeg)}</dd>
        {flight && (
          <>
            <dt>{flight.title}</dt>
            <dd>
              {flight.result.way === 'out-of-reach' ? (
                wayInWords(flight.result)
              ) : (
                <>
                  launch azimuth{' '}
                  <span className="num">{formatNumber(flight.result.launchAzimuthDeg, 1)}°</span>,{' '}
                  {wayInWords(flight.result)}
                </>
              )}
            </dd>
          </>
        )}
      </dl>
      {track && <TrackTable track={track} />}
    </section>
  );
}

function TrackTable({ track }: { track: MapTrack }) {
  return (
    <details className="track-table">
      <summary>First orbit’s ground track as a table</summary>
      <div className="table-scroll">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th className="num">
                From the pad<span className="unit">km</span>
              </th>
              <th className="num">Latitude</th>
              <th className="num">Longitude</th>
              <th className="num">
                Heading<span className="unit">°</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {track.ticks.map(({ distanceKm, place: [longitude, latitude], headingDeg }) => (
              <tr key={distanceKm}>
                <td className="num">{formatNumber(distanceKm)}</td>
                <td className="num">{formatLatitude(latitude, 1)}</td>
                <td className="num">{formatLongitude(longitude, 1)}</td>
                <td className="num">{formatNumber(headingDeg, 1)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
