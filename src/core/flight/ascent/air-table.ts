import type { Air } from './atmosphere.ts';
import { TOP_OF_AIR } from './atmosphere.ts';

const BOTTOM = -2000;
const SEAM = 92_000;
const FINE = 100;
const COARSE = 1000;
const FINE_NODES = (SEAM - BOTTOM) / FINE;
const COARSE_NODES = (TOP_OF_AIR - SEAM) / COARSE;
/** Of each quantity the value and the slope; kept together, so that a look-up touches one line of memory. */
const STRIDE = 6;

/**
 * An atmosphere laid out on a grid of heights with cubics between: a look-up costs a tenth of the formulas, and a
 * flight makes hundreds of thousands. It answers in its own fields, so that nothing is made in the inner loop.
 * It rounds off the corners of the formulas, by 1e-4 between layers and 3e-3 between the published rows above 86 km,
 * and is far closer elsewhere.
 * @see tests/core/flight/ascent/atmosphere.test.ts
 */
export class AirTable {
  density = 0;
  /** dρ/dh in kg/m⁴. */
  densitySlope = 0;
  pressure = 0;
  soundSpeed = 0;
  private readonly fine: Float64Array;
  private readonly coarse: Float64Array;

  /** @param air the formulas, by height in m */
  constructor(air: (height: number) => Air) {
    this.fine = sampled(air, BOTTOM, FINE, FINE_NODES);
    this.coarse = sampled(air, SEAM, COARSE, COARSE_NODES);
  }

  /** Reads the air at a height above the ellipsoid in m. */
  look(height: number): void {
    if (height < SEAM) this.read(this.fine, (height - BOTTOM) / FINE, FINE);
    else if (height < TOP_OF_AIR) this.read(this.coarse, (height - SEAM) / COARSE, COARSE);
    else this.density = this.densitySlope = this.pressure = 0;
  }

  private read(table: Float64Array, place: number, step: number): void {
    const node = place < 0 ? 0 : Math.floor(place);
    const t = place < 0 ? 0 : place - node;
    const at = node * STRIDE;
    const s = 1 - t;
    // Cubic Hermite: the four weights of two values and two slopes.
    const v0 = s * s * (1 + 2 * t);
    const v1 = t * t * (3 - 2 * t);
    const d0 = t * s * s;
    const d1 = -t * t * s;
    this.density =
      v0 * (table[at] as number) +
      v1 * (table[at + STRIDE] as number) +
      d0 * (table[at + 1] as number) +
      d1 * (table[at + STRIDE + 1] as number);
    this.densitySlope =
      (6 * t * s * ((table[at + STRIDE] as number) - (table[at] as number)) +
        s * (1 - 3 * t) * (table[at + 1] as number) +
        t * (3 * t - 2) * (table[at + STRIDE + 1] as number)) /
      step;
    this.pressure =
      v0 * (table[at + 2] as number) +
      v1 * (table[at + STRIDE + 2] as number) +
      d0 * (table[at + 3] as number) +
      d1 * (table[at + STRIDE + 3] as number);
    this.soundSpeed = s * (table[at + 4] as number) + t * (table[at + STRIDE + 4] as number);
  }
}

/** Values at the nodes, and slopes per step by central differences taken well inside a step. */
function sampled(air: (height: number) => Air, from: number, step: number, nodes: number): Float64Array {
  const table = new Float64Array((nodes + 1) * STRIDE);
  const near = step / 50;
  for (let node = 0; node <= nodes; node++) {
    const height = Math.min(from + node * step, TOP_OF_AIR);
    const top = Math.min(height + near, TOP_OF_AIR);
    const [here, below, above] = [air(height), air(height - near), air(top)];
    const slope = (low: number, high: number) => ((high - low) / (top - height + near)) * step;
    table.set(
      [
        here.density,
        slope(below.density, above.density),
        here.pressure,
        slope(below.pressure, above.pressure),
        here.soundSpeed,
        0,
      ],
      node * STRIDE,
    );
  }
  return table;
}
