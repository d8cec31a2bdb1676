import { useEffect, useMemo, useState } from 'react';
import type { MapView } from '#components/map/map-view.ts';
import { SiteMap } from '#components/map/SiteMap.tsx';
import type { MapSite, Projection } from '#components/map/types.ts';
import { Button } from '#components/ui/index.ts';
import type { NearPlace, StudyCorridor } from '#contract/downrange.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { addCorridor, dotsOf, fillsOf, outlinesOf } from './corridor-layers.ts';
import { frameOf, type FrameKind } from './corridor-frame.ts';

interface DownrangeMapProps {
  sites: readonly InputSite[];
  site: InputSite;
  azimuthDeg: number;
  answer: StudyCorridor | undefined;
  around: readonly NearPlace[];
  onSite: (code: string) => void;
}

const LAYERS = { sectors: true, track: true, otherTracks: false };
const FRAMES: readonly { kind: FrameKind; name: string }[] = [
  { kind: 'zone', name: 'Exclusion zone' },
  { kind: 'near', name: 'First 1,000 km' },
  { kind: 'whole', name: 'Whole corridor' },
];

/** The map that is drawn, with the corridor's layers on it. */
function useCorridor(answer: StudyCorridor | undefined, around: readonly NearPlace[]) {
  const [drawn, setDrawn] = useState<{ view: MapView; layers: ReturnType<typeof addCorridor> } | null>(null);
  useEffect(() => () => drawn?.layers.stop(), [drawn]);
  useEffect(() => {
    drawn?.layers.show({
      'corridor-fills': fillsOf(answer),
      'corridor-edges': outlinesOf(answer),
      'corridor-dots': dotsOf(answer, around),
    });
  }, [drawn, answer, around]);
  const take = (view: MapView | null) => setDrawn(view && { view, layers: addCorridor(view.map) });
  return { view: drawn?.view, take };
}

/** The corridor and the exclusion zone on the map, with the settlements inside filled and those beside it open. */
export function DownrangeMap({ sites, site, azimuthDeg, answer, around, onSite }: DownrangeMapProps) {
  const [projection, setProjection] = useState<Projection>('flat');
  const pads = useMemo(() => sites.map(({ siteId, ...one }): MapSite => ({ ...one, id: siteId })), [sites]);
  const { view, take } = useCorridor(answer, around);
  const show = (kind: FrameKind) => {
    const frame = answer && frameOf(answer, site, kind);
    if (frame) view?.map.fitBounds(frame, { padding: 40, maxZoom: 11, animate: false });
  };
  return (
    <>
      <SiteMap
        sites={pads}
        chosenId={site.siteId}
        tracks={[]}
        flownAzimuthDeg={azimuthDeg}
        layers={LAYERS}
        projection={projection}
        onProjection={setProjection}
        onChoose={(siteId) => onSite(sites.find((one) => one.siteId === siteId)?.code ?? site.code)}
        placing={false}
        onPlace={() => undefined}
        onView={take}
      />
      <div className="downrange-frames" role="group" aria-label="Show on the map">
        {FRAMES.map(({ kind, name }) => (
          <Button key={kind} size="small" onClick={() => show(kind)}>
            {name}
          </Button>
        ))}
      </div>
      <p className="caption">
        Hatched: the corridor. Dark about the pad: the overflight exclusion zone. Circles: listed settlements,
        area by people, filled where inside, open where outside within 100 km of the pad. The sector’s radius
        is a picture, not a range.
      </p>
    </>
  );
}
