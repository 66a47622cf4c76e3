/** Tasks with the same key one after another, in the order in which they came. */
export class Turns {
  readonly #last = new Map<string, Promise<unknown>>();

  take<T>(key: string, task: () => Promise<T>): Promise<T> {
    const result = (this.#last.get(key) ?? Promise.resolve()).then(task);
    const done = result
      .catch(() => undefined)
      .then(() => {
        if (this.#last.get(key) === done) this.#last.delete(key);
      });
    this.#last.set(key, done);
    return result;
  }
}
