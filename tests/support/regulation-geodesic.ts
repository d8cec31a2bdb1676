const RADIAN = Math.PI / 180;
/** As the regulation prints them, in nautical miles. */
const a = 3443.91846652;
const b = 3432.37165994;

/**
 * 14 CFR part 420, appendix A, equations A1 to A22: the place at a range and bearing from another, a series on the
 * ellipsoid by Sodano's method. Written from the regulation's own steps, beside the geodesic library that core uses.
 * Its printed arctangents are taken with their quadrants.
 * @returns latitude and longitude, degrees
 */
export function regulationPlace(
  latitudeDeg: number,
  longitudeDeg: number,
  bearingDeg: number,
  rangeNm: number,
): [latitudeDeg: number, longitudeDeg: number] {
  const [phi1, lambda1, alpha] = [latitudeDeg * RADIAN, longitudeDeg * RADIAN, bearingDeg * RADIAN];
  const f = 1 - b / a;
  const epsilon2 = (a * a - b * b) / (b * b);
  const theta = rangeNm / b;
  const [sinT, cosT] = [Math.sin(theta), Math.cos(theta)];
  const beta1 = Math.atan2(b * Math.sin(phi1), a * Math.cos(phi1));
  const [sinB, cosB] = [Math.sin(beta1), Math.cos(beta1)];
  const g = cosB * Math.cos(alpha);
  const h = cosB * Math.sin(alpha);
  const m = ((1 + (epsilon2 / 2) * sinB ** 2) * (1 - h ** 2)) / 2;
  const n = ((1 + (epsilon2 / 2) * sinB ** 2) * (sinB ** 2 * cosT + g * sinB * sinT)) / 2;
  const L = h * (-f * theta + 3 * f ** 2 * n * sinT + (3 * f ** 2 * m * (theta - sinT * cosT)) / 2);
  const M = m * epsilon2;
  const N = n * epsilon2;
  const A1 = N * sinT;
  const A2 = (M / 2) * (sinT * cosT - theta);
  const A3 = (5 / 2) * N ** 2 * sinT * cosT;
  const A4 = (M ** 2 / 16) * (11 * theta - 13 * sinT * cosT - 8 * theta * cosT ** 2 + 10 * sinT * cosT ** 3);
  const A5 = ((M * N) / 2) * (3 * sinT + 2 * theta * cosT - 5 * sinT * cosT ** 2);
  const delta = theta - A1 + A2 + A3 + A4 + A5;
  const sinB2 = sinB * Math.cos(delta) + g * Math.sin(delta);
  const cosB2 = Math.hypot(h, g * Math.cos(delta) - sinB * Math.sin(delta));
  const phi2 = Math.atan2(a * sinB2, b * cosB2);
  const turned = Math.atan2(
    Math.sin(delta) * Math.sin(alpha),
    cosB * Math.cos(delta) - sinB * Math.sin(delta) * Math.cos(alpha),
  );
  return [phi2 / RADIAN, (lambda1 + turned + L) / RADIAN];
}
