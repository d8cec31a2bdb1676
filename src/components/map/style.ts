import type {
  ExpressionSpecification,
  LayerSpecification,
  SourceSpecification,
  StyleSpecification,
  SymbolLayerSpecification,
} from 'maplibre-gl';
import { graticule } from './graticule.ts';
import { fontFaces, worldAddress } from './library.ts';
import type { Palette } from './palette.ts';
import type { Projection } from './types.ts';

/** 1° lines from this zoom. */
const closeIn = 5;
const empty: SourceSpecification = { type: 'geojson', data: { type: 'FeatureCollection', features: [] } };
const ofWorld = (layer: string) => ({ source: 'world', 'source-layer': layer }) as const;

function ground(p: Palette): LayerSpecification[] {
  const flat = { 'line-join': 'round' } as const;
  return [
    { id: 'sea', type: 'background', paint: { 'background-color': p.sea } },
    { id: 'land', type: 'fill', ...ofWorld('land'), paint: { 'fill-color': p.land } },
    {
      id: 'lake',
      type: 'fill',
      ...ofWorld('lake'),
      paint: { 'fill-color': p.sea },
    },
    {
      id: 'shore',
      type: 'line',
      ...ofWorld('lake'),
      minzoom: 3,
      layout: flat,
      paint: { 'line-color': p.coast, 'line-width': 0.6 },
    },
    {
      id: 'river',
      type: 'line',
      ...ofWorld('river'),
      minzoom: 3,
      layout: flat,
      paint: { 'line-color': p.coast, 'line-width': 0.6, 'line-opacity': 0.5 },
    },
    {
      id: 'graticule',
      type: 'line',
      source: 'graticule',
      filter: ['any', ['get', 'ten'], ['>=', ['zoom'], closeIn]],
      paint: { 'line-color': p.graticule, 'line-width': 1 },
    },
    {
      id: 'border',
      type: 'line',
      ...ofWorld('border'),
      layout: flat,
      paint: { 'line-color': p.border, 'line-width': 0.8, 'line-dasharray': [5, 2.5, 1.25, 2.5] },
    },
    {
      id: 'coast',
      type: 'line',
      ...ofWorld('coast'),
      layout: flat,
      paint: { 'line-color': p.coast, 'line-width': 0.9 },
    },
  ];
}

function names(p: Palette): LayerSpecification[] {
  return [
    {
      id: 'place',
      type: 'symbol',
      ...ofWorld('place'),
      minzoom: 3,
      layout: {
        'icon-image': 'place',
        'text-field': ['get', 'name'],
        'text-font': ['Plex Sans'],
        'text-size': 11,
        'text-variable-anchor': ['left', 'right', 'top', 'bottom'],
        'text-radial-offset': 0.5,
        'symbol-sort-key': ['-', ['get', 'people']],
      },
      paint: { 'text-color': p.label, 'text-halo-color': p.land, 'text-halo-width': 1.5 },
    },
    {
      id: 'country',
      type: 'symbol',
      ...ofWorld('country'),
      maxzoom: 8,
      layout: {
        'text-field': ['get', 'name'],
        'text-transform': 'uppercase',
        'text-font': ['Plex Sans'],
        'text-size': 11,
        'text-letter-spacing': 0.12,
        'text-max-width': 9,
        'symbol-sort-key': ['get', 'zoom'],
      },
      paint: { 'text-color': p.label, 'text-halo-color': p.land, 'text-halo-width': 2 },
    },
    {
      id: 'sea-name',
      type: 'symbol',
      ...ofWorld('sea'),
      layout: {
        'text-field': ['get', 'name'],
        'text-font': ['Plex Sans Italic'],
        'text-size': 11.5,
        'text-letter-spacing': 0.12,
        'text-max-width': 7,
        'symbol-sort-key': ['get', 'zoom'],
      },
      paint: { 'text-color': p.label, 'text-halo-color': p.sea, 'text-halo-width': 2 },
    },
  ];
}

function tracks(p: Palette): LayerSpecification[] {
  const chosen: ExpressionSpecification = ['get', 'chosen'];
  return [
    {
      id: 'track',
      type: 'line',
      source: 'tracks',
      layout: { 'line-join': 'round', 'line-cap': 'round', 'line-sort-key': ['to-number', chosen] },
      paint: { 'line-color': ['case', chosen, p.chosen, p.ink], 'line-width': ['case', chosen, 2.2, 1.2] },
    },
    {
      id: 'track-tick',
      type: 'symbol',
      source: 'ticks',
      layout: {
        'icon-image': 'tick',
        'icon-rotate': ['get', 'headingDeg'],
        'icon-rotation-alignment': 'map',
        'icon-allow-overlap': true,
        'icon-ignore-placement': true,
        'text-field': ['get', 'label'],
        'text-font': ['Plex Mono'],
        'text-size': 11,
        'text-variable-anchor': ['left', 'right'],
        'text-radial-offset': 1,
        'text-optional': true,
      },
      paint: { 'text-color': p.secondInk, 'text-halo-color': p.sea, 'text-halo-width': 2 },
    },
    {
      id: 'track-name',
      type: 'symbol',
      source: 'tracks',
      filter: chosen,
      layout: {
        'symbol-placement': 'line',
        'symbol-spacing': 260,
        'text-field': ['get', 'name'],
        'text-font': ['Plex Sans Medium'],
        'text-size': 12,
        'text-offset': [0, -0.9],
      },
      paint: { 'text-color': p.chosen, 'text-halo-color': p.sea, 'text-halo-width': 2 },
    },
  ];
}

function flights(p: Palette): LayerSpecification[] {
  const colour: ExpressionSpecification = ['case', ['get', 'chosen'], p.chosen, p.ink];
  const width: ExpressionSpecification = ['case', ['get', 'chosen'], 2.2, 1.2];
  const round = { 'line-join': 'round', 'line-sort-key': ['to-number', ['get', 'chosen']] } as const;
  return [
    {
      id: 'flight-impacts',
      type: 'line',
      source: 'flights',
      filter: ['==', ['get', 'kind'], 'impacts'],
      layout: structuredClone(round) as object,
      paint: { 'line-color': colour, 'line-width': width, 'line-dasharray': [3, 1] },
    },
    {
      id: 'flight',
      type: 'line',
      source: 'flights',
      filter: ['==', ['get', 'kind'], 'ground'],
      layout: structuredClone(round) as object,
      paint: { 'line-color': colour, 'line-width': width },
    },
    {
      id: 'moment',
      type: 'circle',
      source: 'moment',
      paint: {
        'circle-radius': 5,
        'circle-color': ['match', ['get', 'kind'], 'vehicle', p.chosen, p.sea],
        'circle-stroke-color': ['match', ['get', 'kind'], 'vehicle', p.sea, p.chosen],
        'circle-stroke-width': ['match', ['get', 'kind'], 'vehicle', 1, 2],
      },
    },
  ];
}

function pads(p: Palette): LayerSpecification[] {
  const label: NonNullable<SymbolLayerSpecification['layout']> = {
    'text-field': ['get', 'name'],
    'text-font': ['Plex Sans Medium'],
    'text-size': 12,
    'text-variable-anchor': [
      'top',
      'bottom',
      'left',
      'right',
      'bottom-left',
      'bottom-right',
      'top-left',
      'top-right',
    ],
    'text-radial-offset': 1,
    'text-max-width': 12,
    'text-optional': true,
    'icon-allow-overlap': true,
  };
  const halo = { 'text-halo-color': p.sea, 'text-halo-width': 2 };
  return [
    {
      id: 'pad',
      type: 'symbol',
      source: 'pads',
      layout: {
        ...structuredClone(label),
        'icon-image': 'pad',
        'symbol-sort-key': ['get', 'order'],
      } as object,
      paint: { 'text-color': p.ink, ...halo },
    },
    {
      id: 'chosen-pad',
      type: 'symbol',
      source: 'chosen',
      layout: { ...label, 'icon-image': 'chosen-pad' },
      paint: { 'text-color': p.chosen, ...halo },
    },
  ];
}

export const layersOf = (palette: Palette): LayerSpecification[] => [
  ...ground(palette),
  ...names(palette),
  ...tracks(palette),
  ...flights(palette),
  ...pads(palette),
];

/** The map's style by role: colours from the theme, faces and tiles from our own origin, sites set in later. */
export function styleOf(palette: Palette, projection: Projection): StyleSpecification {
  return {
    version: 8,
    projection: { type: projection === 'globe' ? 'globe' : 'mercator' },
    transition: { duration: 0 },
    'font-faces': fontFaces,
    sources: {
      world: { type: 'vector', url: worldAddress },
      graticule: { type: 'geojson', data: graticule() },
      pads: empty,
      chosen: empty,
      tracks: empty,
      ticks: empty,
      flights: empty,
      moment: empty,
    },
    layers: layersOf(palette),
  };
}
