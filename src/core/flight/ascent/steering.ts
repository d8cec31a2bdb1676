import { KICK, LINEAR_TANGENT, NODES, VERTICAL } from './modes.ts';

/** Where thrust is directed, by a mode of modes.ts and its figures; it answers in `direction`, and makes nothing. */
export class Steering {
  mode: number = VERTICAL;
  /** Unit vector of thrust, set by `aim`. */
  readonly direction = new Float64Array(3);
  /** Vertical of the site at lift-off and the horizontal direction of the kick; both turn with the Earth. */
  readonly up = new Float64Array(3);
  readonly along = new Float64Array(3);
  /** Kick: when it starts, and how fast the tilt grows in rad/s. */
  kickStart = 0;
  tiltRate = 0;
  /** Nodes: times, pitch over the horizontal and yaw to the north in rad; east is `along`. */
  nodeTimes: Float64Array = new Float64Array(0);
  nodePitch: Float64Array = new Float64Array(0);
  nodeYaw: Float64Array = new Float64Array(0);
  /** Linear tangent: tan θ = first − rate (t − start), parallel to the plane of a normal. */
  private start = 0;
  private first = 0;
  private rate = 0;
  private readonly normal = new Float64Array(3);

  /**
   * Starts the linear tangent: the plane of the thrust is that of the inertial flight turned by `yaw` about the
   * vertical, northward positive for an eastward flight.
   * @param first tan θ now and `last` tan θ after `duration` seconds
   * @see ascentReferences.linearTangent, tests/core/flight/ascent/integration.test.ts
   */
  beginTangent(
    time: number,
    state: Float64Array,
    first: number,
    last: number,
    yaw: number,
    duration: number,
  ): void {
    const { normal } = this;
    const [x, y, z] = [state[0] as number, state[1] as number, state[2] as number];
    const [vx, vy, vz] = [state[3] as number, state[4] as number, state[5] as number];
    const r = Math.sqrt(x * x + y * y + z * z);
    // The plane's normal r × v, and the horizontal along the flight: normal × r.
    const nx = y * vz - z * vy;
    const ny = z * vx - x * vz;
    const nz = x * vy - y * vx;
    const cos = Math.cos(yaw);
    const sin = Math.sin(yaw) / r;
    normal[0] = cos * nx - sin * (ny * z - nz * y);
    normal[1] = cos * ny - sin * (nz * x - nx * z);
    normal[2] = cos * nz - sin * (nx * y - ny * x);
    this.start = time;
    this.first = first;
    this.rate = (first - last) / duration;
    this.mode = LINEAR_TANGENT;
  }

  /**
   * Sets the direction for all modes but the gravity turn, which the air-relative velocity tells.
   * @param r distance of x, y, z from the centre
   * @param omega the Earth's rotation, rad/s
   */
  aim(time: number, x: number, y: number, z: number, r: number, omega: number): void {
    if (this.mode === LINEAR_TANGENT) this.aimByTangent(time, x, y, z, r);
    else if (this.mode === NODES) this.aimByNodes(time);
    else this.aimFromPad(time, omega);
  }

  private aimByTangent(time: number, x: number, y: number, z: number, r: number): void {
    const { normal, direction } = this;
    const nx = normal[0] as number;
    const ny = normal[1] as number;
    const nz = normal[2] as number;
    // Horizontal and parallel to the plane: normal × r.
    const hx = ny * z - nz * y;
    const hy = nz * x - nx * z;
    const hz = nx * y - ny * x;
    const tangent = this.first - this.rate * (time - this.start);
    const cos = 1 / Math.sqrt(1 + tangent * tangent);
    const level = cos / Math.sqrt(hx * hx + hy * hy + hz * hz);
    const radial = (tangent * cos) / r;
    direction[0] = hx * level + x * radial;
    direction[1] = hy * level + y * radial;
    direction[2] = hz * level + z * radial;
  }

  private aimFromPad(time: number, omega: number): void {
    const { up, along, direction } = this;
    const tilt = this.mode === KICK ? this.tiltRate * (time - this.kickStart) : 0;
    const cos = Math.cos(tilt);
    const sin = Math.sin(tilt);
    const ux = cos * (up[0] as number) + sin * (along[0] as number);
    const uy = cos * (up[1] as number) + sin * (along[1] as number);
    const c = Math.cos(omega * time);
    const s = Math.sin(omega * time);
    direction[0] = c * ux - s * uy;
    direction[1] = s * ux + c * uy;
    direction[2] = cos * (up[2] as number) + sin * (along[2] as number);
  }

  private aimByNodes(time: number): void {
    const { nodeTimes: times, direction, up, along } = this;
    let k = 1;
    while (k < times.length - 1 && (times[k] as number) < time) k++;
    const low = times[k - 1] as number;
    const share = (time - low) / ((times[k] as number) - low);
    const pitch = (1 - share) * (this.nodePitch[k - 1] as number) + share * (this.nodePitch[k] as number);
    const yaw = (1 - share) * (this.nodeYaw[k - 1] as number) + share * (this.nodeYaw[k] as number);
    const vertical = Math.cos(yaw) * Math.sin(pitch);
    const east = Math.cos(yaw) * Math.cos(pitch);
    const north = Math.sin(yaw);
    const [ux, uy, uz] = [up[0] as number, up[1] as number, up[2] as number];
    const [ex, ey, ez] = [along[0] as number, along[1] as number, along[2] as number];
    // North is up × east.
    direction[0] = vertical * ux + east * ex + north * (uy * ez - uz * ey);
    direction[1] = vertical * uy + east * ey + north * (uz * ex - ux * ez);
    direction[2] = vertical * uz + east * ez + north * (ux * ey - uy * ex);
  }
}
