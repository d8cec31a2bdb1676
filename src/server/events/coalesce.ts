/**
 * Gathers keys and hands them on together: the first at once, the rest at most every `everyMs`. The timer keeps no
 * process alive.
 */
export class Coalescer {
  readonly #gathered = new Set<string>();
  #timer: NodeJS.Timeout | undefined;

  constructor(
    readonly everyMs: number,
    readonly handOn: (keys: string[]) => void,
  ) {}

  add(...keys: string[]): void {
    for (const key of keys) this.#gathered.add(key);
    if (this.#timer === undefined) this.flush();
  }

  /** Hands on what is gathered, now. */
  flush(): void {
    clearTimeout(this.#timer);
    this.#timer = undefined;
    if (this.#gathered.size === 0) return;
    const keys = [...this.#gathered];
    this.#gathered.clear();
    this.#timer = setTimeout(() => this.flush(), this.everyMs);
    this.#timer.unref();
    this.handOn(keys);
  }
}
