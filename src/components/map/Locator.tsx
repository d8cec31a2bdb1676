import { geoEquirectangular, geoPath } from 'd3-geo';
import { useEffect, useMemo, useRef } from 'react';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import land110 from 'world-atlas/land-110m.json';
import type { MapView } from './map-view.ts';
import type { MapSite } from './types.ts';

const WIDTH = 160;
const HEIGHT = 84;
const topology = land110 as unknown as Topology<{ land: GeometryCollection }>;
const projection = geoEquirectangular()
  .scale(WIDTH / (2 * Math.PI))
  .translate([WIDTH / 2, HEIGHT / 2 + 2]);

const xOf = (longitude: number): number => ((longitude + 180) / 360) * WIDTH;
const yOf = (latitude: number): number => HEIGHT / 2 + 2 - (latitude / 360) * WIDTH;

const landPath = geoPath(projection)(feature(topology, topology.objects.land)) ?? '';

function padsPath(sites: readonly MapSite[]): string {
  return sites
    .map(
      ({ longitudeDeg, latitudeDeg }) =>
        `M${xOf(longitudeDeg).toFixed(1)},${(yOf(latitudeDeg) - 3).toFixed(1)}`,
    )
    .map((start) => `${start}l3.2,5.6h-6.4z`)
    .join('');
}

/** Where the view lies in the world, with every pad. */
export function Locator({
  view,
  sites,
  chosen,
}: {
  view: MapView;
  sites: readonly MapSite[];
  chosen: MapSite | undefined;
}) {
  const frame = useRef<SVGPathElement>(null);
  const pads = useMemo(() => padsPath(sites), [sites]);

  useEffect(() => {
    const place = () => {
      const bounds = view.map.getBounds();
      const [west, east] = [bounds.getWest(), bounds.getEast()];
      const [top, bottom] = [yOf(Math.min(85, bounds.getNorth())), yOf(Math.max(-85, bounds.getSouth()))];
      const whole = view.projection === 'globe' || east - west >= 360;
      // Drawn once for each copy of the world that the view may touch; the edge of the picture cuts the rest.
      const boxes = [-360, 0, 360].map(
        (turn) => `M${xOf(west + turn)},${top}H${xOf(east + turn)}V${bottom}H${xOf(west + turn)}Z`,
      );
      frame.current?.setAttribute('d', whole ? '' : boxes.join(''));
    };
    place();
    return view.onFrame(place);
  }, [view]);

  return (
    <svg className="map-locator" viewBox={`0 0 ${WIDTH} ${HEIGHT}`} aria-hidden="true">
      <rect width={WIDTH} height={HEIGHT} className="locator-sea" />
      <path d={landPath} className="locator-land" />
      <path d={pads} className="locator-pads" />
      {chosen && <path d={padsPath([chosen])} className="locator-chosen" />}
      <path ref={frame} className="locator-frame" />
    </svg>
  );
}
