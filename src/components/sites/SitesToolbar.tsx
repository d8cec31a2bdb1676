import type { MapLayers } from '#components/map/types.ts';
import { Button, ButtonLink } from '#components/ui/Button.tsx';
import { Checkbox } from '#components/ui/Check.tsx';
import { Icon } from '#components/ui/Icon.tsx';
import { Segmented } from '#components/ui/Segmented.tsx';
import { formatCount } from '#contract/format.ts';

export const VIEWS = ['both', 'map', 'table'] as const;
export type View = (typeof VIEWS)[number];

const segments = [
  { value: 'both', name: 'Map and table' },
  { value: 'map', name: 'Map' },
  { value: 'table', name: 'Table' },
] as const;

interface ToolbarProps {
  studyId: string;
  view: View;
  onView: (view: View) => void;
  filter: string;
  onFilter: (filter: string) => void;
  shown: number;
  total: number;
  /** Orbits by code, for the ground track; empty where there are none. */
  orbits: readonly { value: string; name: string }[];
  orbit: string;
  onOrbit: (code: string) => void;
  layers: MapLayers;
  onLayers: (layers: MapLayers) => void;
  ticked: number;
  locked: string | null;
  onRemove: () => void;
}

const layerNames: readonly [keyof MapLayers, string][] = [
  ['sectors', 'Sectors'],
  ['track', 'Ground track'],
  ['otherTracks', 'Tracks of the others'],
];

/** What is shown: view, filter, orbit and layers; and what can be done with the sites ticked. */
export function SitesToolbar(props: ToolbarProps) {
  const { layers } = props;
  return (
    <div className="bar sites-bar">
      <Segmented legend="View" segments={segments} value={props.view} onChange={props.onView} />
      <div className="fld-box sites-find">
        <Icon name="find" />
        <input
          type="search"
          aria-label="Find a site"
          placeholder="Find a site"
          value={props.filter}
          onChange={(event) => props.onFilter(event.target.value)}
        />
      </div>
      {props.filter && (
        <span role="status">
          {props.shown} of {formatCount(props.total, 'site')}
        </span>
      )}
      {props.ticked > 0 && (
        <Button
          size="small"
          kind="destructive"
          icon="remove"
          notYet={props.locked ?? undefined}
          onClick={props.onRemove}
        >
          Remove {formatCount(props.ticked, 'site')}
        </Button>
      )}
      <span className="sites-bar-gap" />
      {props.view !== 'table' && (
        <>
          {props.orbits.length > 0 && (
            <label className="sites-orbit">
              <span>Orbit</span>
              <select value={props.orbit} onChange={(event) => props.onOrbit(event.target.value)}>
                {props.orbits.map(({ value, name }) => (
                  <option key={value} value={value}>
                    {name}
                  </option>
                ))}
              </select>
            </label>
          )}
          {layerNames
            .filter(([key]) => key === 'sectors' || props.orbits.length > 0)
            .map(([key, name]) => (
              <Checkbox
                key={key}
                label={name}
                checked={layers[key]}
                onChange={(event) => props.onLayers({ ...layers, [key]: event.target.checked })}
              />
            ))}
        </>
      )}
      <ButtonLink size="small" icon="export" href={`/api/v1/studies/${props.studyId}/sites.csv`} download="">
        Export CSV
      </ButtonLink>
      <ButtonLink
        size="small"
        icon="export"
        href={`/api/v1/studies/${props.studyId}/sites.geojson`}
        download=""
      >
        Export GeoJSON
      </ButtonLink>
    </div>
  );
}
