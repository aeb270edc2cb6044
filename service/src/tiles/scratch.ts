/** Memory used again and again: fresh pages for each batch of a large table take longer than the sorting in them. */
export class Scratch {
  private readonly blocks: ArrayBuffer[] = [];
  private next = 0;

  /** At least so many bytes, with anything in them, until the next {@link reset}. */
  take(bytes: number): ArrayBuffer {
    const at = this.next++;
    const block = this.blocks[at];
    if (block && block.byteLength >= bytes) return block;
    return (this.blocks[at] = new ArrayBuffer(Math.ceil(bytes / 65_536) * 65_536));
  }

  /** All that was taken may be taken again. */
  reset(): void {
    this.next = 0;
  }
}
