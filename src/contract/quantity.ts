/** What a computed criterion can be of, in the unit it is shown, levelled and limited in. */
export interface Quantity {
  name: string;
  unit: string;
  direction: 'more' | 'less';
  decimals: number;
  /** Whether it is asked for one orbit, for the whole manifest, or for either. */
  scope: 'orbit' | 'manifest' | 'either';
  /** How the whole manifest comes to one figure. */
  overManifest: string;
}

/** A line of the Δv budget: less of it is better, and the worst orbit stands for the manifest. */
const budgetLine = (name: string) =>
  ({
    name,
    unit: 'm/s',
    direction: 'less',
    decimals: 0,
    scope: 'either',
    overManifest: 'greatest of the orbits',
  }) as const satisfies Quantity;

export const QUANTITIES = {
  'payload-per-year': {
    name: 'Payload a year',
    unit: 't/yr',
    direction: 'more',
    decimals: 1,
    scope: 'manifest',
    overManifest: 'flights a year × payload, added up over the orbits',
  },
  payload: {
    name: 'Payload',
    unit: 'kg',
    direction: 'more',
    decimals: 0,
    scope: 'orbit',
    overManifest: '',
  },
  'delta-v': {
    name: 'Δv',
    unit: 'm/s',
    direction: 'less',
    decimals: 0,
    scope: 'either',
    overManifest: 'greatest of the orbits',
  },
  'required-speed': budgetLine('Required speed'),
  losses: budgetLine('Losses'),
  'turn-cost': budgetLine('Cost of the turn'),
  dogleg: budgetLine('Dogleg'),
  'plane-change': budgetLine('Plane change'),
  transfer: budgetLine('Transfer'),
  shortfall: budgetLine('Δv shortfall'),
  'rotation-speed': {
    name: 'Rotation speed of the site',
    unit: 'm/s',
    direction: 'more',
    decimals: 1,
    scope: 'manifest',
    overManifest: 'the site’s own speed due east, whatever it flies to',
  },
  'rotation-gain': {
    name: 'Rotation gain',
    unit: 'm/s',
    direction: 'more',
    decimals: 0,
    scope: 'either',
    overManifest: 'least of the orbits',
  },
  turn: {
    name: 'Turn',
    unit: '°',
    direction: 'less',
    decimals: 1,
    scope: 'either',
    overManifest: 'greatest of the orbits; dogleg or plane change',
  },
  'lowest-inclination': {
    name: 'Lowest inclination flown directly',
    unit: '°',
    direction: 'less',
    decimals: 1,
    scope: 'manifest',
    overManifest: 'from the permitted azimuths, into a circular orbit at 185 km',
  },
  'orbits-fallen-short': {
    name: 'Orbits without payload',
    unit: 'orbits',
    direction: 'less',
    decimals: 0,
    scope: 'manifest',
    overManifest: 'number of orbits out of reach or fallen short of',
  },
  'orbits-out-of-reach': {
    name: 'Orbits out of reach',
    unit: 'orbits',
    direction: 'less',
    decimals: 0,
    scope: 'manifest',
    overManifest: 'number of orbits no way is flown to',
  },
} as const satisfies Record<string, Quantity>;

export type QuantityKey = keyof typeof QUANTITIES;
export const QUANTITY_KEYS = Object.keys(QUANTITIES) as [QuantityKey, ...QuantityKey[]];

export const isQuantity = (key: string): key is QuantityKey => Object.hasOwn(QUANTITIES, key);

/** The name a computed criterion is offered under; its maker may give it another. */
export function quantityName(key: QuantityKey, orbitName: string | null): string {
  const { name, scope } = QUANTITIES[key];
  if (orbitName !== null) return `${name} to ${orbitName}`;
  return scope === 'either' ? `${name}, worst orbit` : name;
}
