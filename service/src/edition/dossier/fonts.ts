import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

export type Face = 'sans' | 'sans-bold' | 'mono' | 'mono-bold';

/** Subsets in the order they are tried: what a face lacks the next has. */
const SUBSETS = ['latin', 'latin-ext', 'greek', 'cyrillic'] as const;
const FILES: Record<Face, { family: string; weight: number }> = {
  sans: { family: 'source-sans-3', weight: 400 },
  'sans-bold': { family: 'source-sans-3', weight: 600 },
  mono: { family: 'roboto-mono', weight: 400 },
  'mono-bold': { family: 'roboto-mono', weight: 500 },
};

/** Signs that no subset has, and words for them. */
const SPELLED: Record<string, string> = {
  '→': 'to',
  '☉': 'sun',
  '⊙': 'sun',
  '≤': '<=',
  '≥': '>=',
  '≈': '~',
  '√': 'sqrt',
};

export interface Run {
  font: string;
  text: string;
}

interface Glyphs {
  hasGlyphForCodePoint(point: number): boolean;
}

/** The faces of the application, embedded as far as they are used; text that one subset cannot print is set from the next. */
export class DossierFonts {
  readonly #glyphs = new Map<string, Glyphs>();

  constructor(document: PDFKit.PDFDocument) {
    for (const [face, { family, weight }] of Object.entries(FILES)) {
      for (const subset of SUBSETS) {
        const name = `${face}/${subset}`;
        const file = import.meta.resolve(`@fontsource/${family}/files/${family}-${subset}-${weight}-normal.woff`);
        document.registerFont(name, readFileSync(fileURLToPath(file)));
        document.font(name);
        this.#glyphs.set(name, (document as unknown as { _font: { font: Glyphs } })._font.font);
      }
    }
  }

  /** Name of the face's first font, for layouts that know no runs. */
  first(face: Face): string {
    return `${face}/${SUBSETS[0]}`;
  }

  /** Text as runs, each of one font. What no font has becomes a word for it, or "?". */
  runs(face: Face, text: string): Run[] {
    const runs: Run[] = [];
    for (const letter of text.normalize('NFC')) {
      const { font, text: shown } = this.#place(face, letter);
      const last = runs.at(-1);
      if (last?.font === font) last.text += shown;
      else runs.push({ font, text: shown });
    }
    return runs;
  }

  #place(face: Face, letter: string): Run {
    const point = letter.codePointAt(0)!;
    const subset = SUBSETS.find((name) => this.#glyphs.get(`${face}/${name}`)!.hasGlyphForCodePoint(point));
    if (subset) return { font: `${face}/${subset}`, text: letter };
    return { font: this.first(face), text: point < 32 ? ' ' : (SPELLED[letter] ?? '?') };
  }
}
