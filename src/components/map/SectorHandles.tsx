import { useEffect, useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { formatNumber } from '#contract/format.ts';
import { arrowStep, handlesOf, moveHandle, type Handle } from './handles.ts';
import type { MapView } from './map-view.ts';
import { along, azimuthTo } from './pad-frame.ts';
import { chosenRadius } from './sectors.ts';
import type { MapSite, SectorDeg } from './types.ts';

interface HandlesProps {
  view: MapView;
  site: MapSite;
  /** As they stand, moved ends included. */
  sectors: readonly SectorDeg[];
  /** Left out where they may not be moved: then the ends are only drawn. */
  onMove?: ((sectors: readonly SectorDeg[]) => void) | undefined;
  onSettle: () => void;
}

const degrees = (azimuth: number): string => `${formatNumber(azimuth, Number.isInteger(azimuth) ? 0 : 1)}°`;
const endNames = ['from', 'to'] as const;
const KEY_PAUSE_MS = 700;

/** The ends of the chosen pad's sectors: round handles to drag, or to turn with the arrow keys. */
export function SectorHandles({ view, site, sectors, onMove, onSettle }: HandlesProps) {
  const holder = useRef<HTMLDivElement>(null);
  const pause = useRef<number | undefined>(undefined);
  const handles = handlesOf(sectors);

  useEffect(() => {
    const place = () => {
      const frame = view.frameOf(site);
      const radius = chosenRadius(view.map.getContainer().clientWidth);
      const ends = [...(holder.current?.children ?? [])] as HTMLElement[];
      ends.forEach((element, index) => {
        const handle = handles[index];
        element.hidden = !frame || !handle;
        if (!frame || !handle) return;
        const [x, y] = along(frame, handle.azimuthDeg, radius);
        element.style.transform = `translate(${x}px, ${y}px)`;
        element.dataset['side'] = x < frame.x ? 'left' : 'right';
      });
    };
    place();
    return view.onFrame(place);
  });
  useEffect(() => () => window.clearTimeout(pause.current), []);

  const drag = (event: PointerEvent<HTMLElement>, handle: Handle) => {
    const frame = view.frameOf(site);
    const box = view.map.getContainer().getBoundingClientRect();
    if (!frame || !onMove || !event.currentTarget.hasPointerCapture(event.pointerId)) return;
    const azimuth = azimuthTo(frame, { x: event.clientX - box.left, y: event.clientY - box.top });
    onMove(moveHandle(sectors, handle, event.shiftKey ? azimuth : Math.round(azimuth)));
  };
  const turn = (event: KeyboardEvent, handle: Handle) => {
    const step = arrowStep(event.key, event.shiftKey);
    if (step === undefined || !onMove) return;
    event.preventDefault();
    onMove(moveHandle(sectors, handle, handle.azimuthDeg + step));
    window.clearTimeout(pause.current);
    pause.current = window.setTimeout(onSettle, KEY_PAUSE_MS);
  };

  return (
    <div ref={holder} className="map-handles">
      {handles.map((handle) => {
        const key = `${handle.sector}/${handle.end}`;
        const words = degrees(handle.azimuthDeg);
        if (!onMove)
          return (
            <span key={key} className="map-handle" aria-hidden="true">
              <b>{words}</b>
            </span>
          );
        return (
          <div
            key={key}
            className="map-handle"
            role="slider"
            tabIndex={0}
            aria-label={`${site.name}, sector ${handle.sector + 1}, ${endNames[handle.end]}`}
            aria-valuemin={0}
            aria-valuemax={360}
            aria-valuenow={handle.azimuthDeg}
            aria-valuetext={`${words} clockwise from north`}
            onPointerDown={(event) => event.currentTarget.setPointerCapture(event.pointerId)}
            onPointerMove={(event) => drag(event, handle)}
            onPointerUp={onSettle}
            onKeyDown={(event) => turn(event, handle)}
            onBlur={onSettle}
          >
            <b>{words}</b>
          </div>
        );
      })}
    </div>
  );
}
