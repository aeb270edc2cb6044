/** Identifier of a photometric band. Plain letters are the SDSS, Johnson-Cousins and 2MASS bands. */
export type BandId =
  | 'FUV'
  | 'NUV' // prettier-ignore
  | 'u'
  | 'g'
  | 'r'
  | 'i'
  | 'z'
  | 'B'
  | 'V'
  | 'R'
  | 'I'
  | 'G'
  | 'PS1 g'
  | 'PS1 r'
  | 'PS1 i'
  | 'PS1 z'
  | 'PS1 y'
  | 'DES g'
  | 'DES r'
  | 'DES i'
  | 'DES z'
  | 'LSST g'
  | 'LSST r'
  | 'LSST i'
  | 'J'
  | 'H'
  | 'Ks'
  | 'W1'
  | 'W2'
  | 'W3'
  | 'W4';

export type Regime = 'ultraviolet' | 'optical' | 'infrared';
export type MagnitudeSystem = 'AB' | 'Vega';

/** What is known of one band. */
export interface Band {
  id: BandId;
  name: string;
  regime: Regime;
  /** System in which catalogues of this band are usually given; a table may say otherwise. */
  usualSystem: MagnitudeSystem;
  /** Absolute magnitude of the Sun, AB and Vega. */
  solarAb: number;
  solarVega: number;
  /** m_AB - m_Vega, mag. */
  abMinusVega: number;
  /** A_b / E(B-V), where E(B-V) is the original SFD98 value: the recalibration is inside. */
  extinctionCoefficient: number;
  pivotMicron: number;
  source: string;
}

const SUN = 'Sun and AB-Vega: Willmer (2018), ApJS 236, 47';
const SF11 = 'extinction: Schlafly & Finkbeiner (2011), ApJ 737, 103';
const SF11_MEMORY = `${SF11} (Table 6, from memory)`;
const UV = 'extinction: Bianchi et al. (2017)';

/** [id, name, regime, usual system, Sun AB, Sun Vega, AB-Vega, A/E(B-V), pivot micron, source of the extinction] */
type Row = readonly [BandId, string, Regime, MagnitudeSystem, number, number, number, number, number, string];

const ROWS: readonly Row[] = [
  ['FUV', 'GALEX FUV', 'ultraviolet', 'AB', 17.3021, 15.2167, 2.0854, 8.06, 0.1535, UV],
  ['NUV', 'GALEX NUV', 'ultraviolet', 'AB', 10.1621, 8.5328, 1.6293, 7.95, 0.2301, UV],
  ['u', 'SDSS u', 'optical', 'AB', 6.3921, 5.4917, 0.9004, 4.239, 0.3556, SF11],
  ['g', 'SDSS g', 'optical', 'AB', 5.1021, 5.2272, -0.1251, 3.303, 0.4702, SF11],
  ['r', 'SDSS r', 'optical', 'AB', 4.6421, 4.5236, 0.1185, 2.285, 0.6176, SF11],
  ['i', 'SDSS i', 'optical', 'AB', 4.5221, 4.1901, 0.332, 1.698, 0.749, SF11],
  ['z', 'SDSS z', 'optical', 'AB', 4.5021, 4.008, 0.4941, 1.263, 0.8947, SF11],
  ['B', 'Johnson B', 'optical', 'Vega', 5.3121, 5.4402, -0.1281, 3.626, 0.4396, SF11_MEMORY],
  ['V', 'Johnson V', 'optical', 'Vega', 4.8021, 4.8151, -0.013, 2.742, 0.5511, SF11_MEMORY],
  ['R', 'Cousins R', 'optical', 'Vega', 4.6, 4.43, 0.17, 2.169, 0.6469, `Sun from memory; ${SF11_MEMORY}`],
  ['I', 'Cousins I', 'optical', 'Vega', 4.51, 4.1, 0.41, 1.505, 0.7886, `Sun from memory; ${SF11_MEMORY}`],
  ['G', 'Gaia G', 'optical', 'Vega', 4.64, 4.53, 0.11, 2.36, 0.6218, 'Sun and extinction from memory'],
  ['PS1 g', 'Pan-STARRS1 g', 'optical', 'AB', 5.0321, 5.1442, -0.1121, 3.172, 0.4849, SF11_MEMORY],
  ['PS1 r', 'Pan-STARRS1 r', 'optical', 'AB', 4.6421, 4.5223, 0.1198, 2.271, 0.6201, SF11_MEMORY],
  ['PS1 i', 'Pan-STARRS1 i', 'optical', 'AB', 4.5221, 4.1827, 0.3394, 1.682, 0.7535, SF11_MEMORY],
  ['PS1 z', 'Pan-STARRS1 z', 'optical', 'AB', 4.5021, 4.0187, 0.4834, 1.322, 0.8674, SF11_MEMORY],
  ['PS1 y', 'Pan-STARRS1 y', 'optical', 'AB', 4.5021, 3.987, 0.5151, 1.087, 0.9628, SF11_MEMORY],
  ['DES g', 'DECam g', 'optical', 'AB', 5.0521, 5.1661, -0.114, 3.237, 0.482, SF11_MEMORY],
  ['DES r', 'DECam r', 'optical', 'AB', 4.6121, 4.4535, 0.1586, 2.176, 0.6423, SF11_MEMORY],
  ['DES i', 'DECam i', 'optical', 'AB', 4.5221, 4.1402, 0.3819, 1.595, 0.7807, SF11_MEMORY],
  ['DES z', 'DECam z', 'optical', 'AB', 4.5021, 4.0087, 0.4934, 1.217, 0.9158, SF11_MEMORY],
  ['LSST g', 'LSST g', 'optical', 'AB', 5.0521, 5.1685, -0.1164, 3.237, 0.4808, `${SF11_MEMORY}, DECam value`],
  ['LSST r', 'LSST r', 'optical', 'AB', 4.6421, 4.5209, 0.1212, 2.273, 0.621, SF11_MEMORY],
  ['LSST i', 'LSST i', 'optical', 'AB', 4.5221, 4.1824, 0.3397, 1.684, 0.7537, SF11_MEMORY],
  ['J', '2MASS J', 'infrared', 'Vega', 4.5421, 3.6718, 0.8703, 0.723, 1.2393, SF11],
  ['H', '2MASS H', 'infrared', 'Vega', 4.6621, 3.3183, 1.3438, 0.46, 1.6495, SF11],
  ['Ks', '2MASS Ks', 'infrared', 'Vega', 5.0821, 3.2682, 1.8139, 0.31, 2.1638, SF11],
  ['W1', 'WISE W1', 'infrared', 'Vega', 5.9121, 3.2568, 2.6553, 0.189, 3.3897, SF11],
  ['W2', 'WISE W2', 'infrared', 'Vega', 6.5721, 3.2807, 3.2914, 0.146, 4.6406, SF11],
  ['W3', 'WISE W3', 'infrared', 'Vega', 8.4821, 3.2674, 5.2147, 0, 12.5705, 'extinction negligible'],
  ['W4', 'WISE W4', 'infrared', 'Vega', 9.8721, 3.2704, 6.6017, 0, 22.3142, 'extinction negligible'],
];

/** Every band by its identifier. */
export const BANDS: Readonly<Record<BandId, Band>> = Object.fromEntries(
  ROWS.map(
    ([id, name, regime, usualSystem, solarAb, solarVega, abMinusVega, extinctionCoefficient, pivotMicron, ext]) => [
      id,
      {
        id,
        name,
        regime,
        usualSystem,
        solarAb,
        solarVega,
        abMinusVega,
        extinctionCoefficient,
        pivotMicron,
        source: ext.startsWith('Sun') ? ext : `${SUN}; ${ext}`,
      },
    ],
  ),
) as Record<BandId, Band>;

/** Identifiers in the order of wavelength regimes, for menus. */
export const BAND_IDS: readonly BandId[] = ROWS.map(([id]) => id);
