/**
 * The units of core: SI only. A branded number says which unit it carries, so that kilometres cannot be handed
 * where metres are meant. Brands exist for the type checker alone; at run time they are plain numbers.
 */
declare const unit: unique symbol;

type Quantity<U extends string> = number & { readonly [unit]: U };

export type Metres = Quantity<'m'>;
export type Seconds = Quantity<'s'>;
export type MetresPerSecond = Quantity<'m/s'>;
export type Radians = Quantity<'rad'>;
export type Kilograms = Quantity<'kg'>;
export type Newtons = Quantity<'N'>;

export const metres = (value: number): Metres => value as Metres;
export const seconds = (value: number): Seconds => value as Seconds;
export const metresPerSecond = (value: number): MetresPerSecond => value as MetresPerSecond;
export const radians = (value: number): Radians => value as Radians;
export const kilograms = (value: number): Kilograms => value as Kilograms;
export const newtons = (value: number): Newtons => value as Newtons;

const DEGREE = Math.PI / 180;

/** Degrees to radians; zero and sense stay as they were. */
export const fromDegrees = (degrees: number): Radians => radians(degrees * DEGREE);

/** Radians to degrees; multiples of 90° come back exactly. */
export const toDegrees = (angle: Radians): number => (angle * 180) / Math.PI;

export const fromKilometres = (kilometres: number): Metres => metres(kilometres * 1000);
export const toKilometres = (length: Metres): number => length / 1000;
export const fromKilonewtons = (kilonewtons: number): Newtons => newtons(kilonewtons * 1000);
