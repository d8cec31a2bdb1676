/** What a flight is to end with, as conditions on its last state. */
export interface Goal {
  /** What each condition may be off by, in its own unit. */
  readonly tolerances: readonly number[];
  /**
   * Fills in what is left of each condition.
   * @param state inertial, at the end of the last burn
   * @param inclination the one to be flown, rad
   */
  readonly measure: (state: Float64Array, inclination: number, left: Float64Array) => void;
}

/** r × v of a state, and its size. */
function momentumOf(state: Float64Array): readonly [number, number, number, number] {
  const [x, y, z] = [state[0] as number, state[1] as number, state[2] as number];
  const [vx, vy, vz] = [state[3] as number, state[4] as number, state[5] as number];
  const hx = y * vz - z * vy;
  const hy = z * vx - x * vz;
  const hz = x * vy - y * vx;
  return [hx, hy, hz, Math.sqrt(hx * hx + hy * hy + hz * hz)];
}

/** Inclination of the plane a state flies in, 0…π. */
export function inclinationFlownBy(state: Float64Array): number {
  const [hx, hy, hz] = momentumOf(state);
  return Math.atan2(Math.sqrt(hx * hx + hy * hy), hz);
}

const norm = (state: Float64Array, from: number): number =>
  Math.sqrt(
    (state[from] as number) ** 2 + (state[from + 1] as number) ** 2 + (state[from + 2] as number) ** 2,
  );

const climbOf = (state: Float64Array): number =>
  (state[0] as number) * (state[3] as number) +
  (state[1] as number) * (state[4] as number) +
  (state[2] as number) * (state[5] as number);

/**
 * Injection into a circle or at an apse: radius, no climb, speed, inclination; the node is left free.
 * @param radius in m and `speed` in m/s
 */
export function injectionGoal(radius: number, speed: number): Goal {
  return {
    tolerances: [1, 0.01, 0.001, 1e-7],
    measure: (state, inclination, left) => {
      left[0] = norm(state, 0) - radius;
      left[1] = climbOf(state) / norm(state, 0);
      left[2] = norm(state, 3) - speed;
      left[3] = inclinationFlownBy(state) - inclination;
    },
  };
}

/** An orbit by its elements; node and argument of perigee are left free where they are not given. In m and rad. */
export interface OrbitElements {
  readonly semiMajorAxis: number;
  readonly eccentricity: number;
  readonly node?: number;
  readonly argumentOfPerigee?: number;
}

const turned = (angle: number): number => angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI));

/**
 * Injection anywhere on an ellipse: its energy, its momentum and inclination, and the node and argument of perigee
 * where they are given. The true anomaly is left free.
 * @param mu μ in m³/s²
 */
export function orbitGoal(mu: number, elements: OrbitElements): Goal {
  const { semiMajorAxis, eccentricity, node, argumentOfPerigee } = elements;
  const momentum = Math.sqrt(mu * semiMajorAxis * (1 - eccentricity * eccentricity));
  const tolerances = [0.001, 0.001, 1e-7];
  if (node !== undefined) tolerances.push(1e-7);
  if (argumentOfPerigee !== undefined) tolerances.push(1e-7);
  return {
    tolerances,
    measure: (state, inclination, left) => {
      const [hx, hy, hz, h] = momentumOf(state);
      const [r, v] = [norm(state, 0), norm(state, 3)];
      // Energy and momentum as speeds: what the speed, and its level part, would have to change by.
      left[0] = (v * v - mu * (2 / r - 1 / semiMajorAxis)) / (2 * v);
      left[1] = (h - momentum) / r;
      left[2] = Math.atan2(Math.sqrt(hx * hx + hy * hy), hz) - inclination;
      const ascending = Math.atan2(hx, -hy);
      let place = 3;
      if (node !== undefined) left[place++] = turned(ascending - node);
      if (argumentOfPerigee === undefined) return;
      // The eccentricity vector, along the node's line and across it in the plane.
      const scale = v * v - mu / r;
      const climb = climbOf(state);
      const e = [0, 1, 2].map(
        (k) => (scale * (state[k] as number) - climb * (state[k + 3] as number)) / mu,
      ) as [number, number, number];
      const [c, s] = [Math.cos(ascending), Math.sin(ascending)];
      const along = e[0] * c + e[1] * s;
      const across = ((hx * s - hy * c) * e[2] + hz * (c * e[1] - s * e[0])) / h;
      left[place] = turned(Math.atan2(across, along) - argumentOfPerigee);
    },
  };
}
