/** A solver that did not reach its tolerance: a fault of the method, never an answer. */
export class ConvergenceError extends Error {
  constructor(
    readonly solver: string,
    readonly iterations: number,
    readonly residual: number,
  ) {
    super(`${solver}: residual ${residual} after ${iterations} steps`);
    this.name = 'ConvergenceError';
  }
}
