/**
 * A flight as its solver sees it: figures that may be chosen, and conditions that a choice leaves unmet. Both are
 * scaled by `scales` and `tolerances`: a condition is met when it lies within 1 of zero.
 */
export interface Shooting {
  /** What one unit of a scaled variable is worth. */
  readonly scales: Float64Array;
  /** What each condition may be off by. */
  readonly tolerances: Float64Array;
  /** Index of the variable that is to be as large as can be. */
  readonly objective: number;
  /** How much rather a variable is solved for than left free; 1 where it does not matter. */
  readonly leanings: Float64Array;
  /** Bounds of the variables. */
  readonly lowest: Float64Array;
  readonly highest: Float64Array;
  /**
   * Flies a choice.
   * @param conditions filled with what is left of each condition, in its own unit
   * @returns false where the flight cannot be flown to its end
   */
  evaluate(variables: Float64Array, conditions: Float64Array): boolean;
  /**
   * Derivatives at the choice evaluated last, by forward differences.
   * @param jacobian filled row by row, a row a condition
   */
  differentiate(variables: Float64Array, conditions: Float64Array, jacobian: Float64Array): boolean;
}
