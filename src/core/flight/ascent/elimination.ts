/**
 * The linear algebra of a constrained step: rows of [J | −c | I] reduced until the solved columns are unit vectors.
 * Then each solved variable is told by the free ones: d_s = rest − Σ slope_j d_j.
 */
export class Elimination {
  readonly width: number;
  /** Row by row: n columns of J, what is left of the conditions, then the inverse of the solved part. */
  readonly table: Float64Array;
  /** Columns solved for, in the order picked; empty until `pick`. */
  readonly solved: number[] = [];
  free: number[] = [];
  private readonly rowOf: Int32Array;
  private readonly used: Uint8Array;

  constructor(
    readonly n: number,
    readonly m: number,
    private readonly leanings: Float64Array,
  ) {
    this.width = n + 1 + m;
    this.table = new Float64Array(m * this.width);
    this.rowOf = new Int32Array(n);
    this.used = new Uint8Array(m);
  }

  /** Sets the rows anew. */
  fill(
    jacobian: Float64Array,
    conditions: Float64Array,
    scales: Float64Array,
    tolerances: Float64Array,
  ): void {
    const { n, m, width, table } = this;
    table.fill(0);
    for (let i = 0; i < m; i++) {
      const tolerance = tolerances[i] as number;
      for (let j = 0; j < n; j++) {
        table[i * width + j] = ((jacobian[i * n + j] as number) * (scales[j] as number)) / tolerance;
      }
      table[i * width + n] = -(conditions[i] as number) / tolerance;
      table[i * width + n + 1 + i] = 1;
    }
  }

  at(row: number, column: number): number {
    return this.table[row * this.width + column] as number;
  }

  /** The row that tells a solved column. */
  row(column: number): number {
    return this.rowOf[column] as number;
  }

  private reduce(row: number, column: number): void {
    const { m, width, table } = this;
    const pivot = this.at(row, column);
    for (let j = 0; j < width; j++) table[row * width + j] = (table[row * width + j] as number) / pivot;
    for (let other = 0; other < m; other++) {
      const factor = this.at(other, column);
      if (other === row || factor === 0) continue;
      for (let j = 0; j < width; j++) {
        table[other * width + j] = (table[other * width + j] as number) - factor * this.at(row, j);
      }
    }
    this.rowOf[column] = row;
    this.used[row] = 1;
  }

  /**
   * Picks the columns to solve for: of the rows left the one with the largest entry, by the variables' leanings, until
   * none is left.
   * @returns false where the conditions do not depend on the variables independently
   */
  pick(): boolean {
    const { n, m } = this;
    this.used.fill(0);
    this.solved.length = 0;
    while (this.solved.length < m) {
      let [row, column, most] = [0, 0, 0];
      for (let i = 0; i < m; i++) {
        if (this.used[i] === 1) continue;
        for (let j = 0; j < n; j++) {
          const size = Math.abs(this.at(i, j)) * (this.leanings[j] as number);
          if (size > most) [row, column, most] = [i, j, size];
        }
      }
      if (!(most > 0)) return false;
      this.reduce(row, column);
      this.solved.push(column);
    }
    this.free = Array.from({ length: n }, (_, j) => j).filter((j) => !this.solved.includes(j));
    return true;
  }

  /** Solves for the columns picked before. @returns false where they no longer tell the conditions apart */
  again(): boolean {
    this.used.fill(0);
    for (const column of this.solved) {
      let [row, most] = [-1, 0];
      for (let i = 0; i < this.m; i++) {
        const size = this.used[i] === 1 ? 0 : Math.abs(this.at(i, column));
        if (size > most) [row, most] = [i, size];
      }
      if (row < 0 || !(most > 1e-6)) return false;
      this.reduce(row, column);
    }
    return true;
  }
}
