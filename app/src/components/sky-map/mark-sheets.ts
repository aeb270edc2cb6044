import type { PanelView } from './frame.tsx';

/** Two canvases over each other that fill the panel: the marks, and what is lit among them. */
export class MarkSheets {
  readonly element = document.createElement('div');
  private readonly sheets = { marks: document.createElement('canvas'), lit: document.createElement('canvas') };

  constructor(private readonly density: number) {
    this.element.style.cssText = 'position: absolute; inset: 0; pointer-events: none';
    for (const sheet of Object.values(this.sheets)) {
      sheet.style.position = 'absolute';
      this.element.append(sheet);
    }
  }

  /** An empty sheet of the size of the view, to be drawn on in CSS pixels. */
  clear(name: 'marks' | 'lit', { width, height }: PanelView): CanvasRenderingContext2D {
    const sheet = this.sheets[name];
    const [across, down] = [Math.round(width * this.density), Math.round(height * this.density)];
    if (sheet.width !== across || sheet.height !== down) {
      [sheet.width, sheet.height] = [across, down];
      [sheet.style.width, sheet.style.height] = [`${width}px`, `${height}px`];
    }
    const context = sheet.getContext('2d')!;
    context.setTransform(this.density, 0, 0, this.density, 0, 0);
    context.clearRect(0, 0, width, height);
    return context;
  }

  /** Gives the memory of the pictures back at once. */
  release(): void {
    for (const sheet of Object.values(this.sheets)) sheet.width = sheet.height = 0;
  }
}
