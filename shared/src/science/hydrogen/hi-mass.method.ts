import type { MethodEntry } from '../method-entry.ts';

export const hiMassEntry: MethodEntry = {
  id: 'hi-mass',
  title: 'Gas mass and size',
  summary:
    'The mass of neutral hydrogen from its line flux, and the size of an ordinary disc of that mass. Optically thin, without helium.',
  formulas: [
    String.raw`M_{\mathrm{HI}} = 2.356 \times 10^5\,\frac{D_L^2\,S}{(1+z)^2}`,
    String.raw`\log D_{\mathrm{HI}} = 0.506\,\log M_{\mathrm{HI}} - 3.293`,
    String.raw`M_{\mathrm{gas}} = 1.33\,M_{\mathrm{HI}}`,
  ],
  symbols: [
    [String.raw`D_L`, 'luminosity distance', 'Mpc'],
    [String.raw`S`, 'line flux, integrated over optical velocity', 'Jy km/s'],
    [String.raw`z`, 'redshift', ''],
    [String.raw`D_{\mathrm{HI}}`, 'diameter of the disc at one solar mass per square parsec; scatter 0.06 dex', 'kpc'],
  ],
  criteria: [],
  columns: ['logHiMass'],
  functions: ['hydrogen/hi-mass#hiMass', 'hydrogen/hi-size#hiDiameterKpc', 'hydrogen/baryonic-mass#baryonicMass'],
  validity:
    'The error is that of the flux and twice that of the distance. A cloud much larger than a disc of its mass is no ordinary disc. Interferometers lose the flux of extended clouds; self-absorption is left out.',
  sources: ['Meyer et al. (2017), PASA 34, e052', 'Wang et al. (2016), MNRAS 460, 2143'],
};
