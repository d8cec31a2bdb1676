import type { ReferenceKey } from './references.ts';

/** A constant with its unit and the key of its source in references.ts. */
export interface Constant {
  readonly symbol: string;
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly source: ReferenceKey;
}

/** Everything the closed form takes as given; the memo prints this table whole. */
export const constants = {
  equatorialRadius: {
    symbol: 'a',
    name: 'Equatorial radius of the Earth',
    value: 6_378_137,
    unit: 'm',
    source: 'wgs84',
  },
  inverseFlattening: {
    symbol: '1/f',
    name: 'Inverse flattening of the Earth',
    value: 298.257223563,
    unit: '1',
    source: 'wgs84',
  },
  gravitationalParameter: {
    symbol: 'μ',
    name: 'Gravitational parameter of the Earth, atmosphere included',
    value: 3.986004418e14,
    unit: 'm³/s²',
    source: 'wgs84',
  },
  rotationRate: {
    symbol: 'ω',
    name: 'Rotation rate of the Earth',
    value: 7.292115e-5,
    unit: 'rad/s',
    source: 'wgs84',
  },
  secondZonalHarmonic: {
    symbol: 'J₂',
    name: 'Second zonal harmonic, derived from the normalised C₂₀',
    value: 1.082629821e-3,
    unit: '1',
    source: 'wgs84',
  },
  standardGravity: {
    symbol: 'g₀',
    name: 'Standard acceleration of gravity',
    value: 9.80665,
    unit: 'm/s²',
    source: 'cgpm1901',
  },
  tropicalYear: {
    symbol: 'T',
    name: 'Tropical year, in which the Sun goes once round',
    value: 365.2421897 * 86_400,
    unit: 's',
    source: 'tropicalYear',
  },
} as const satisfies Record<string, Constant>;
