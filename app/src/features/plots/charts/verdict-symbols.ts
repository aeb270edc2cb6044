import type { StarlightVerdict } from '@eremite/shared/contracts/words';
import type { DrawingTheme } from '@eremite/shared/drawing/drawing-theme';

export interface VerdictSymbol {
  symbol: 'circle' | 'diamond' | 'times' | 'plus' | 'square';
  filled: boolean;
  colour: 'amber' | 'concordant' | 'none';
  radius: number;
}

/** How a starlight verdict stands on a plot: by form and filling as well as by colour. Drawn in this order, the rare last. */
export const VERDICT_SYMBOLS: readonly (readonly [StarlightVerdict, VerdictSymbol])[] = [
  ['starlit', { symbol: 'circle', filled: true, colour: 'concordant', radius: 1.8 }],
  ['cannot tell', { symbol: 'square', filled: false, colour: 'none', radius: 3 }],
  ['confused', { symbol: 'plus', filled: false, colour: 'concordant', radius: 3.4 }],
  ['contested', { symbol: 'times', filled: false, colour: 'concordant', radius: 3.4 }],
  ['nearly dark', { symbol: 'diamond', filled: false, colour: 'amber', radius: 4 }],
  ['dark', { symbol: 'circle', filled: false, colour: 'amber', radius: 4.4 }],
];

export const colourOf = ({ colour }: VerdictSymbol, theme: DrawingTheme): string => theme[colour];
