/** Adds to all of a run of whole degrees at once; sums are taken when every run is known. */
class Runs {
  readonly #steps: Float64Array;

  constructor(readonly count: number) {
    this.#steps = new Float64Array(count + 1);
  }

  /** From one whole degree to another, both included; they may run past north. */
  add(from: number, to: number, value: number): void {
    if (to < from) return;
    if (to - from >= this.count - 1) return this.#span(0, this.count - 1, value);
    const first = ((from % this.count) + this.count) % this.count;
    const last = first + to - from;
    this.#span(first, Math.min(last, this.count - 1), value);
    if (last >= this.count) this.#span(0, last - this.count, value);
  }

  #span(from: number, to: number, value: number): void {
    this.#steps[from] = (this.#steps[from] as number) + value;
    this.#steps[to + 1] = (this.#steps[to + 1] as number) - value;
  }

  sums(): Float64Array {
    const sums = new Float64Array(this.count);
    let sum = 0;
    for (let at = 0; at < this.count; at += 1) {
      sum += this.#steps[at] as number;
      sums[at] = sum;
    }
    return sums;
  }
}

/** People and settlements of every azimuth while a fan is counted. */
export class Tally {
  readonly people: Runs;
  readonly settlements: Runs;
  readonly withoutFigure: Runs;

  constructor(count: number) {
    this.people = new Runs(count);
    this.settlements = new Runs(count);
    this.withoutFigure = new Runs(count);
  }

  add(from: number, to: number, people: number): void {
    this.people.add(from, to, people);
    this.settlements.add(from, to, 1);
    if (people === 0) this.withoutFigure.add(from, to, 1);
  }
}
