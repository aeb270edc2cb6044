/** Hands things from one side to the other one at a time: `put` waits until the other side has come for the next. */
export class Handover<T> implements AsyncIterable<T> {
  private waiting: { item: T; taken: () => void }[] = [];
  private wake: (() => void) | undefined;
  private ended = false;

  put(item: T): Promise<void> {
    return new Promise((taken) => {
      this.waiting.push({ item, taken });
      this.wake?.();
    });
  }

  end(): void {
    this.ended = true;
    this.wake?.();
  }

  async *[Symbol.asyncIterator](): AsyncIterator<T> {
    for (;;) {
      const next = this.waiting.shift();
      if (next) {
        yield next.item;
        next.taken();
      } else if (this.ended) return;
      else await new Promise<void>((resolve) => (this.wake = resolve));
    }
  }
}
