/** Lets one at a time in, in the order of asking. */
export class Mutex {
  #last: Promise<unknown> = Promise.resolve();

  run<T>(work: () => Promise<T>): Promise<T> {
    const turn = this.#last.then(work, work);
    this.#last = turn.catch(() => undefined);
    return turn;
  }
}
