import { useEffect, useRef, useState } from 'react';
import { formatLatitude, formatLongitude } from '#contract/format.ts';
import type { MapView } from './map-view.ts';
import type { MapSite } from './types.ts';

/** More stops than this would make Tab useless: then only the pads in view have one. */
const MOST_STOPS = 200;

interface PadButtonsProps {
  view: MapView;
  sites: readonly MapSite[];
  chosenId: string | null;
  onChoose: (siteId: string) => void;
}

/** What Tab walks: a stop at each pad, in the table's order. One out of view comes into it when it is reached. */
export function PadButtons({ view, sites, chosenId, onChoose }: PadButtonsProps) {
  const stops = useRef(new Map<string, HTMLButtonElement>());
  const [inView, setInView] = useState<readonly MapSite[]>([]);
  const few = sites.length <= MOST_STOPS;
  const shown = few ? sites : inView;

  useEffect(() => {
    const place = () => {
      const moving = view.map.isMoving();
      if (!few && !moving) {
        const found = view.padsInView().slice(0, MOST_STOPS);
        setInView((before) =>
          before.length === found.length && before.every((site, at) => site === found[at]?.site)
            ? before
            : found.map(({ site }) => site),
        );
      }
      for (const site of shown) {
        const stop = stops.current.get(site.id);
        const focused = stop === document.activeElement;
        if (!stop || (moving && !focused)) continue;
        const frame = view.frameOf(site);
        stop.style.transform = frame ? `translate(${frame.x}px, ${frame.y}px)` : '';
      }
    };
    place();
    view.map.on('moveend', place);
    const stop = view.onFrame(place);
    return () => {
      stop();
      view.map.off('moveend', place);
    };
  }, [view, few, shown]);

  return (
    <ul className="map-stops" aria-label="Pads, in the table’s order">
      {shown.map((site) => (
        <li key={site.id}>
          <button
            type="button"
            className="map-stop"
            aria-pressed={site.id === chosenId}
            ref={(element) => {
              if (element) stops.current.set(site.id, element);
              else stops.current.delete(site.id);
            }}
            onFocus={() => {
              if (!view.isInView(site)) view.flyTo(site);
            }}
            onClick={() => onChoose(site.id)}
          >
            {`${site.name}, ${formatLatitude(site.latitudeDeg)}, ${formatLongitude(site.longitudeDeg)}`}
          </button>
        </li>
      ))}
    </ul>
  );
}
