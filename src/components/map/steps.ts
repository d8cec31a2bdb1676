/** Degrees between the neatline's changes of ink and paper, coarse to fine. */
const neatSteps = [30, 10, 5, 1, 0.5, 0.1, 0.05, 0.01] as const;

/**
 * The step of the neatline: 5°, unless its blocks would be too short to see or too long to read a place from.
 * @param pxPerDegree along the frame
 */
export function neatStep(pxPerDegree: number): number {
  const long = (step: number): boolean => step * pxPerDegree >= 16;
  if (long(5) && 5 * pxPerDegree <= 260) return 5;
  return neatSteps.findLast(long) ?? 30;
}

/** Which multiples of the step are printed, so that two labels never touch. */
export function labelStep(step: number, pxPerDegree: number): number {
  const factor = [1, 2, 6, 10].find((times) => step * times * pxPerDegree >= 64) ?? 18;
  return step * factor;
}

const decimalsOf = (step: number): number => (step >= 1 ? 0 : step >= 0.1 ? 1 : 2);

/** Multiples of a step within a span; whole numbers of steps, so that 0.1 stays 0.1. */
export function multiples(step: number, from: number, to: number): number[] {
  const first = Math.ceil(from / step - 1e-9);
  const count = Math.floor(to / step + 1e-9) - first + 1;
  return Array.from({ length: Math.max(0, count) }, (_, index) =>
    Number(((first + index) * step).toFixed(decimalsOf(step))),
  );
}

const half = (degrees: number, positive: string, negative: string): string =>
  degrees === 0 ? '' : degrees > 0 ? ` ${positive}` : ` ${negative}`;

/** 70° W, 0°, 180°: the world's copies carry the same longitudes. */
export function longitudeLabel(degrees: number, step: number): string {
  const turned = Number((degrees - 360 * Math.round(degrees / 360)).toFixed(6));
  const edge = Math.abs(turned) === 180;
  return `${Math.abs(turned).toFixed(decimalsOf(step))}°${edge ? '' : half(turned, 'E', 'W')}`;
}

export function latitudeLabel(degrees: number, step: number): string {
  return `${Math.abs(degrees).toFixed(decimalsOf(step))}°${half(degrees, 'N', 'S')}`;
}

/** The longest of 1, 2, 5 × 10ⁿ km that fits, with its length in px. */
export function scaleBar(metresPerPx: number, mostPx: number): { km: number; px: number } {
  const most = (metresPerPx * mostPx) / 1000;
  const power = 10 ** Math.floor(Math.log10(most));
  const km = ([5, 2].find((times) => times * power <= most) ?? 1) * power;
  return { km, px: (km * 1000) / metresPerPx };
}
