/** Counts how often values occur, for files in which long stretches hold the same one. */
export class Frequencies {
  readonly #counts = new Map<number, { times: number }>();
  #last = Number.NaN;
  #lastCount = { times: 0 };

  add(value: number): void {
    if (value !== this.#last) {
      this.#last = value;
      this.#lastCount = this.#counts.get(value) ?? { times: 0 };
      this.#counts.set(value, this.#lastCount);
    }
    this.#lastCount.times++;
  }

  /** How often a value occurs. */
  of(value: number): number {
    return this.#counts.get(value)?.times ?? 0;
  }

  /** The value that occurs most often, the first of equals; `none` without any. */
  mostFrequent(none: number): number {
    let most = none;
    let times = 0;
    for (const [value, count] of this.#counts) {
      if (count.times <= times) continue;
      most = value;
      times = count.times;
    }
    return most;
  }
}
