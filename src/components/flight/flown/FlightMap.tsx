import { useMemo, useState } from 'react';
import { SiteMap } from '#components/map/SiteMap.tsx';
import type { MapFlight, MapSite, Projection } from '#components/map/types.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { placesAt, type FlightPath } from './path.ts';

export interface MappedFlight {
  site: InputSite;
  path: FlightPath;
}

interface FlightMapProps {
  flights: readonly MappedFlight[];
  /** Of the first flight. */
  timeS: number;
  onChoose: (code: string) => void;
}

const LAYERS = { sectors: false, track: false, otherTracks: false };

const padOf = ({ siteId, ...site }: InputSite): MapSite => ({ ...site, id: siteId });

const toMap = ({ site, path }: MappedFlight): MapFlight => ({
  siteId: site.siteId,
  name: site.name,
  ground: path.ground,
  impacts: path.impacts,
});

/** The flight over the ground and where it would come down, with its place at the moment chosen. */
export function FlightMap({ flights, timeS, onChoose }: FlightMapProps) {
  const [projection, setProjection] = useState<Projection>('flat');
  const sites = useMemo(() => flights.map(({ site }) => padOf(site)), [flights]);
  const drawn = useMemo(() => flights.map(toMap), [flights]);
  const path = flights[0]?.path;
  const moment = useMemo(() => (path ? placesAt(path, timeS) : undefined), [path, timeS]);
  return (
    <SiteMap
      sites={sites}
      chosenId={sites[0]?.id ?? null}
      tracks={[]}
      flownAzimuthDeg={null}
      layers={LAYERS}
      flights={drawn}
      moment={moment}
      projection={projection}
      onProjection={setProjection}
      onChoose={(siteId) => onChoose(sites.find(({ id }) => id === siteId)?.code ?? '')}
      placing={false}
      onPlace={() => undefined}
    />
  );
}
