/** A permitted sector of launch azimuth, degrees clockwise from north, from the first bound to the second. */
export type SectorDeg = readonly [fromDeg: number, toDeg: number];

/** A candidate as the map draws it; the list's order is the table's. */
export interface MapSite {
  readonly id: string;
  readonly code: string;
  readonly name: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  /** None means all round. */
  readonly permittedAzimuthsDeg: readonly SectorDeg[];
}

/** [longitude°, latitude°], GeoJSON's order. */
export type LngLat = [longitudeDeg: number, latitudeDeg: number];

export interface MapTick {
  readonly place: LngLat;
  readonly distanceKm: number;
  /** Of the track there, clockwise from north. */
  readonly headingDeg: number;
}

/** A first orbit's ground track, ready to draw. */
export interface MapTrack {
  readonly siteId: string;
  /** Along the line: "Station supply, 51.6°". */
  readonly name: string;
  readonly pieces: readonly (readonly LngLat[])[];
  readonly ticks: readonly MapTick[];
}

/** A flown ascent; longitudes may run on past 180°, so that no line jumps. */
export interface MapFlight {
  readonly siteId: string;
  /** Along the line over the ground. */
  readonly name: string;
  readonly ground: readonly LngLat[];
  /** Trace of where it would come down, moment by moment. */
  readonly impacts: readonly LngLat[];
}

/** One moment of the chosen flight. */
export interface MapMoment {
  readonly vehicle: LngLat | null;
  readonly impact: LngLat | null;
}

export interface MapLayers {
  readonly sectors: boolean;
  readonly track: boolean;
  readonly otherTracks: boolean;
}

export type Projection = 'flat' | 'globe';

/** Everything the map shows. */
export interface MapScene {
  readonly sites: readonly MapSite[];
  readonly chosenId: string | null;
  readonly tracks: readonly MapTrack[];
  /** The launch azimuth flown from the chosen pad, degrees clockwise from north; null where there is none. */
  readonly flownAzimuthDeg: number | null;
  readonly layers: MapLayers;
  readonly flights?: readonly MapFlight[] | undefined;
  readonly moment?: MapMoment | undefined;
  /** The chosen pad's sectors while a handle is moved; they are not saved yet. */
  readonly draft: readonly SectorDeg[] | null;
}

/** Tiles end here (web mercator's square); what lies nearer the poles is drawn over the globe. */
export const TILE_LATITUDE_DEG = 85.05;
