/** Air at one height. */
export interface Air {
  /** kg/m³ */
  readonly density: number;
  /** Pa */
  readonly pressure: number;
  /** m/s */
  readonly soundSpeed: number;
  /** K; molecular-scale up to 86 km, kinetic above */
  readonly temperature: number;
}

const R0 = 6_356_766;
const G0 = 9.80665;
const GAS = 8314.32 / 28.9644;
const GAMMA = 1.4;

/** Layers of the standard: geopotential base in m, temperature there in K, lapse in K/m. */
const LAYERS = [
  [0, 288.15, -0.0065],
  [11_000, 216.65, 0],
  [20_000, 216.65, 0.001],
  [32_000, 228.65, 0.0028],
  [47_000, 270.65, 0],
  [51_000, 270.65, -0.0028],
  [71_000, 214.65, -0.002],
] as const;

/** Published rows above 86 km: height in km, kinetic temperature in K, pressure in Pa, density in kg/m³. */
const ROWS = [
  [86, 186.87, 3.7338e-1, 6.958e-6],
  [90, 186.87, 1.8359e-1, 3.416e-6],
  [95, 188.42, 7.5966e-2, 1.393e-6],
  [100, 195.08, 3.2011e-2, 5.604e-7],
  [110, 240, 7.1042e-3, 9.708e-8],
  [115, 300, 4.0096e-3, 4.289e-8],
  [120, 360, 2.5382e-3, 2.222e-8],
  [130, 469.27, 1.2505e-3, 8.152e-9],
  [140, 559.63, 7.2028e-4, 3.831e-9],
  [150, 634.39, 4.5422e-4, 2.076e-9],
  [160, 696.29, 3.0395e-4, 1.233e-9],
  [180, 790.07, 1.5271e-4, 5.194e-10],
  [200, 854.56, 8.4736e-5, 2.541e-10],
  [250, 941.33, 2.4767e-5, 6.073e-11],
  [300, 976.01, 8.7704e-6, 1.916e-11],
  [400, 995.83, 1.4518e-6, 2.803e-12],
  [500, 999.24, 3.0236e-7, 5.215e-13],
  [600, 999.85, 8.213e-8, 1.137e-13],
  [700, 999.97, 3.1908e-8, 3.07e-14],
  [800, 999.99, 1.7036e-8, 1.136e-14],
  [900, 1000, 1.0873e-8, 5.759e-15],
  [1000, 1000, 7.5138e-9, 3.561e-15],
] as const;

type Row = (typeof ROWS)[number];

const TOP_OF_LAYERS = 86_000;
export const TOP_OF_AIR = 1_000_000;
/** The standard gives no speed of sound above 86 km; the value there is kept. */
const SOUND_ABOVE = 274.1;

function pressureRatio(base: number, lapse: number, rise: number): number {
  return lapse === 0
    ? Math.exp((-G0 * rise) / (GAS * base))
    : (base / (base + lapse * rise)) ** (G0 / (GAS * lapse));
}

/** Pressure at each layer's base, carried up from 101,325 Pa. */
const BASE_PRESSURES = LAYERS.reduce<number[]>(
  (pressures, [base, temperature, lapse], k) => {
    const next = LAYERS[k + 1];
    if (next === undefined) return pressures;
    return [...pressures, (pressures[k] as number) * pressureRatio(temperature, lapse, next[0] - base)];
  },
  [101_325],
);

function inLayers(height: number): Air {
  const geopotential = (R0 * height) / (R0 + height);
  const above = LAYERS.findIndex(([base]) => base > geopotential);
  const k = above < 0 ? LAYERS.length - 1 : Math.max(above - 1, 0);
  const [base, baseTemperature, lapse] = LAYERS[k] as (typeof LAYERS)[number];
  const rise = geopotential - base;
  const temperature = baseTemperature + lapse * rise;
  const pressure = (BASE_PRESSURES[k] as number) * pressureRatio(baseTemperature, lapse, rise);
  return {
    temperature,
    pressure,
    density: pressure / (GAS * temperature),
    soundSpeed: Math.sqrt(GAMMA * GAS * temperature),
  };
}

/** Between two published rows the logarithms of pressure and density run straight, as the temperature does. */
function betweenRows(height: number): Air {
  const km = height / 1000;
  const above = Math.max(
    ROWS.findIndex(([z]) => z >= km),
    1,
  );
  const low = ROWS[above - 1] as Row;
  const high = ROWS[above] as Row;
  const share = (km - low[0]) / (high[0] - low[0]);
  const straight = (a: number, b: number) => a + share * (b - a);
  const logarithmic = (a: number, b: number) => a * (b / a) ** share;
  return {
    temperature: straight(low[1], high[1]),
    pressure: logarithmic(low[2], high[2]),
    density: logarithmic(low[3], high[3]),
    soundSpeed: SOUND_ABOVE,
  };
}

/**
 * U.S. Standard Atmosphere 1976: its layers to 86 km, its published rows to 1,000 km, no air beyond.
 * @param height geometric, above the ellipsoid, in m; below −5 km as at −5 km
 * @see ascentReferences.standardAtmosphere, tests/reference/atmosphere.csv
 */
export function standardAir(height: number): Air {
  if (height < TOP_OF_LAYERS) return inLayers(Math.max(height, -5000));
  if (height <= TOP_OF_AIR) return betweenRows(height);
  return { temperature: 1000, pressure: 0, density: 0, soundSpeed: SOUND_ABOVE };
}

/**
 * Air whose density falls by e every scale height, without pressure on the nozzle: that of published benchmarks.
 * @param surfaceDensity in kg/m³ and `scaleHeight` in m
 */
export function exponentialAir(surfaceDensity: number, scaleHeight: number): (height: number) => Air {
  return (height) => ({
    temperature: 288.15,
    pressure: 0,
    density: surfaceDensity * Math.exp(-height / scaleHeight),
    soundSpeed: 340.294,
  });
}
