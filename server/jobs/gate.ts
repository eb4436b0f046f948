/** Lets work go on side by side, except work that must be alone: that waits for all the other, and all other waits for it. In turn. */
export class Gate {
  #running = 0;
  #alone = false;
  readonly #waiting: { readonly alone: boolean; readonly enter: () => void }[] = [];

  async pass<T>(alone: boolean, work: () => Promise<T>): Promise<T> {
    await new Promise<void>((enter) => {
      this.#waiting.push({ alone, enter });
      this.#admit();
    });
    try {
      return await work();
    } finally {
      this.#running--;
      this.#alone = false;
      this.#admit();
    }
  }

  #admit(): void {
    for (let next = this.#waiting[0]; next !== undefined; next = this.#waiting[0]) {
      if (this.#alone || (next.alone && this.#running > 0)) return;
      this.#waiting.shift();
      this.#running++;
      this.#alone = next.alone;
      next.enter();
    }
  }
}
