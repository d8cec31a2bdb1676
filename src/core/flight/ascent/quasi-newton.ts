/** Inverse Hessian of a function to be made large, learnt from its slopes by BFGS. */
export class QuasiNewton {
  private inverse: Float64Array;
  private readonly product: Float64Array;
  /** Whether a curvature has been met yet. */
  learnt = false;

  constructor(readonly n: number) {
    this.inverse = new Float64Array(n * n);
    this.product = new Float64Array(n);
  }

  private scaled(value: number): void {
    this.inverse.fill(0);
    for (let k = 0; k < this.n; k++) this.inverse[k * this.n + k] = value;
    this.learnt = true;
  }

  /** step = inverse × slope. */
  apply(slope: Float64Array, step: Float64Array): void {
    const { n, inverse } = this;
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let j = 0; j < n; j++) sum += (inverse[i * n + j] as number) * (slope[j] as number);
      step[i] = sum;
    }
  }

  /**
   * Learns from a step `s` over which the slope fell by `y`; steps along which it rose teach nothing.
   * @see ascentReferences.reducedHessian, equation 6.17
   */
  learn(s: Float64Array, y: Float64Array): void {
    const { n, product } = this;
    let [sy, yy, ss] = [0, 0, 0];
    for (let k = 0; k < n; k++) {
      sy += (s[k] as number) * (y[k] as number);
      yy += (y[k] as number) ** 2;
      ss += (s[k] as number) ** 2;
    }
    if (!(sy > 1e-8 * Math.sqrt(ss * yy))) return;
    if (!this.learnt) this.scaled(sy / yy);
    this.apply(y, product);
    let yHy = 0;
    for (let k = 0; k < n; k++) yHy += (y[k] as number) * (product[k] as number);
    const { inverse } = this;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const si = s[i] as number;
        const sj = s[j] as number;
        inverse[i * n + j] =
          (inverse[i * n + j] as number) +
          ((1 + yHy / sy) * si * sj - (product[i] as number) * sj - si * (product[j] as number)) / sy;
      }
    }
  }
}
