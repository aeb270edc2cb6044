/** Handovers that may be under way at once: the next is made ready while the one before is being stored. */
const MOST = 2;

/** Keeps one side from running ahead of the other: counts what was handed over and not yet taken. */
export class Handovers {
  private open = 0;
  private waiting: (() => void)[] = [];

  /** Waits until another may be handed over, and counts it. */
  async begin(): Promise<void> {
    await this.until(MOST - 1);
    this.open++;
  }

  /** The other side has taken one. */
  taken(): void {
    this.open--;
    for (const wake of this.waiting.splice(0)) wake();
  }

  allTaken(): Promise<void> {
    return this.until(0);
  }

  private async until(most: number): Promise<void> {
    while (this.open > most) await new Promise<void>((resolve) => this.waiting.push(resolve));
  }
}
