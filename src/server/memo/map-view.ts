/** Which part of the Earth a flat map shows, and how large. */
export interface MapView {
  midLonDeg: number;
  midLatDeg: number;
  /** The parallel drawn in its true length. */
  trueLatDeg: number;
  lonSpanDeg: number;
  /** Along meridians, and along the true parallel. */
  pointsPerDeg: number;
  /** Points. */
  height: number;
  stepDeg: number;
  /** Graticule lines inside the view; longitudes run on past 180. */
  meridiansDeg: number[];
  parallelsDeg: number[];
}

interface Place {
  latitudeDeg: number;
  longitudeDeg: number;
}

const LEAST_SPAN_DEG = 3;
const MARGIN = 1.25;
const STEPS_DEG = [0.5, 1, 2, 5, 10, 15, 30, 45, 60];
/** Points from one printed meridian to the next, so that their degrees stand clear of each other. */
const LEAST_STEP = 36;

/** The shortest arc of longitude that holds every place: the circle without its widest gap. */
export function longitudeArc(longitudesDeg: readonly number[]): { midDeg: number; spanDeg: number } {
  const sorted = [...longitudesDeg].sort((a, b) => a - b);
  let widest = { gap: -1, after: 0 };
  sorted.forEach((lon, index) => {
    const next = sorted[index + 1] ?? (sorted[0] ?? lon) + 360;
    if (next - lon > widest.gap) widest = { gap: next - lon, after: next };
  });
  const spanDeg = 360 - widest.gap;
  const mid = widest.after + spanDeg / 2;
  return { midDeg: ((mid + 540) % 360) - 180, spanDeg };
}

function multiples(step: number, from: number, to: number): number[] {
  const first = Math.ceil(from / step);
  return Array.from({ length: Math.max(0, Math.floor(to / step) - first + 1) }, (_, i) => (first + i) * step);
}

interface Frame {
  midLonDeg: number;
  midLatDeg: number;
  trueLatDeg: number;
  pointsPerDeg: number;
  width: number;
  height: number;
}

function view({ width, ...frame }: Frame): MapView {
  const { midLonDeg, midLatDeg, trueLatDeg, pointsPerDeg, height } = frame;
  const lonSpanDeg = Math.min(360, width / (pointsPerDeg * Math.cos((trueLatDeg * Math.PI) / 180)));
  const half = height / pointsPerDeg / 2;
  const stepDeg = STEPS_DEG.find((step) => (width * step) / lonSpanDeg >= LEAST_STEP) ?? 90;
  return {
    ...frame,
    lonSpanDeg,
    stepDeg,
    meridiansDeg: multiples(stepDeg, midLonDeg - lonSpanDeg / 2, midLonDeg + lonSpanDeg / 2),
    parallelsDeg: multiples(stepDeg, Math.max(-90, midLatDeg - half), Math.min(90, midLatDeg + half)),
  };
}

/**
 * The view that holds all places with a margin: cut to them, or the whole Earth where they lie all round it.
 * @param places may be none: the whole Earth.
 * @param width of the frame, points.
 */
export function mapView(places: readonly Place[], width: number): MapView {
  const { midDeg, spanDeg } = longitudeArc(places.map((place) => place.longitudeDeg));
  const latitudes = places.map((place) => place.latitudeDeg);
  const south = Math.min(...latitudes);
  const north = Math.max(...latitudes);
  if (places.length === 0 || spanDeg > 130 || north - south > 90) {
    const top = Math.max(78, Math.min(90, north + 8));
    const bottom = Math.min(-60, Math.max(-90, south - 8));
    const pointsPerDeg = width / 360;
    const height = (top - bottom) * pointsPerDeg;
    return view({ midLonDeg: 0, midLatDeg: (top + bottom) / 2, trueLatDeg: 0, pointsPerDeg, width, height });
  }
  const height = width * 0.46;
  const midLatDeg = (south + north) / 2;
  // Towards a pole the true parallel shrinks to nothing: it stays where it still has a length.
  const trueLatDeg = Math.max(-75, Math.min(75, midLatDeg));
  const latDeg = Math.max((north - south) * MARGIN, LEAST_SPAN_DEG);
  const lonDeg = Math.max(spanDeg * MARGIN * Math.cos((trueLatDeg * Math.PI) / 180), LEAST_SPAN_DEG);
  const pointsPerDeg = Math.min(height / latDeg, width / lonDeg);
  return view({ midLonDeg: midDeg, midLatDeg, trueLatDeg, pointsPerDeg, width, height });
}
