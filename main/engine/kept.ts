import { Fault } from "../../core/model/errors";

/**
 * Keeps the newest few results by key. Callers who ask for the same key while it is being made share the work; a failed or
 * cancelled making is forgotten, and those who shared it make it again for themselves unless they were cancelled too.
 */
export class Kept<T> {
  readonly #made = new Map<string, Promise<T>>();

  constructor(private readonly most: number) {}

  async get(key: string, make: () => Promise<T>, stillWanted: () => boolean): Promise<T> {
    for (;;) {
      const known = this.#made.get(key);
      if (!known) return this.#start(key, make);
      try {
        return await known;
      } catch (error) {
        const cancelledByAnother = error instanceof Fault && error.tag === "cancelled" && stillWanted();
        if (!cancelledByAnother) throw error;
        if (this.#made.get(key) === known) this.#made.delete(key);
      }
    }
  }

  #start(key: string, make: () => Promise<T>): Promise<T> {
    const making = make();
    this.#made.set(key, making);
    while (this.#made.size > this.most) this.#made.delete(this.#made.keys().next().value as string);
    making.catch(() => {
      if (this.#made.get(key) === making) this.#made.delete(key);
    });
    return making;
  }
}
