import type { BandLimit, Candidate, Doubt, Ground, Neighbour } from '@eremite/shared/contracts/verdict';
import { number, probability, type TableColumn, text, whole } from './table-column.ts';

/** Something found about one detection; `detection` is its name. */
export interface EvidenceLine<Entry> {
  detection: string;
  entry: Entry;
}
type Column<Entry> = TableColumn<EvidenceLine<Entry>>;
type Placed = Omit<Candidate, 'override'> | Neighbour;

const DETECTION: Column<unknown> = text('detection', 'Name in the HI list', ({ detection }) => detection, {
  ucd: 'meta.id.parent',
});

const PLACE: Column<Placed>[] = [
  DETECTION,
  text('catalogue', 'Table of the row', ({ entry }) => entry.catalogueName, { ucd: 'meta.id;meta.dataset' }),
  text('row', 'Name of the row, or its number in the file', ({ entry }) => entry.name, { ucd: 'meta.id' }),
  whole('row_number', 'Number of the row in its file', ({ entry }) => entry.rowId, { ucd: 'meta.record' }),
  number('ra_deg', 'deg', 'Right ascension, ICRS', ({ entry }) => entry.raDeg, { decimals: 6, ucd: 'pos.eq.ra' }),
  number('dec_deg', 'deg', 'Declination, ICRS', ({ entry }) => entry.decDeg, { decimals: 6, ucd: 'pos.eq.dec' }),
  number('separation_arcsec', 'arcsec', 'From the HI centroid', ({ entry }) => entry.separationArcsec, {
    decimals: 2,
    ucd: 'pos.angDistance',
    label: 'sep_arcsec',
  }),
  number(
    'position_angle_deg',
    'deg',
    'Of the row seen from the centroid, north through east',
    ({ entry }) => entry.positionAngleDeg,
    { decimals: 1, ucd: 'pos.posAng', label: 'pa_deg' },
  ),
  number('separation_kpc', 'kpc', 'Projected at the distance of the gas', ({ entry }) => entry.separationKpc, {
    decimals: 2,
    ucd: 'pos.distance',
    label: 'sep_kpc',
  }),
  number('cz_kms', 'km/s', 'Velocity, optical convention, barycentric', ({ entry }) => entry.velocityKms, {
    decimals: 1,
    ucd: 'spect.dopplerVeloc.opt',
  }),
  number('dv_kms', 'km/s', 'Difference of cz over 1 + z of the detection', ({ entry }) => entry.velocityDifferenceKms, {
    decimals: 1,
    ucd: 'spect.dopplerVeloc;arith.diff',
  }),
  text('band', 'Band of the magnitude', ({ entry }) => entry.band, { ucd: 'instr.bandpass' }),
  number('magnitude', 'mag', 'As in the catalogue', ({ entry }) => entry.magnitude, { decimals: 3, ucd: 'phot.mag' }),
];

export const CANDIDATE_COLUMNS: Column<Omit<Candidate, 'override'>>[] = [
  ...PLACE,
  number(
    'p_chance',
    '',
    'Chance that an unrelated object as bright lies this near (Downes et al. 1986)',
    ({ entry }) => entry.chanceProbability,
    { significant: 4, ucd: 'stat.probability' },
  ),
  number('likelihood_ratio', '', 'Sutherland & Saunders (1992)', ({ entry }) => entry.likelihoodRatio, {
    significant: 4,
    ucd: 'stat.likelihood',
  }),
  probability(
    'probability',
    'Exclusive probability of the object the row belongs to',
    ({ entry }) => entry.probability,
  ),
  whole('object', 'Rows of a detection with the same number are one object', ({ entry }) => entry.object),
  { name: 'is_star', datatype: 'boolean', description: 'Taken for a star', cell: ({ entry }) => entry.isStar },
];

export const NEIGHBOUR_COLUMNS: Column<Neighbour>[] = [
  ...PLACE,
  number('absolute_magnitude', 'mag', 'At the distance of the gas', ({ entry }) => entry.absoluteMagnitude, {
    decimals: 2,
    ucd: 'phys.magAbs',
    label: 'abs_mag',
  }),
  number('log_mhi', 'log(solMass)', 'HI mass where the row is an HI detection', ({ entry }) => entry.logHiMass, {
    decimals: 2,
    ucd: 'phys.mass',
  }),
  {
    name: 'qualifies',
    datatype: 'boolean',
    description: 'Bright or gas-rich enough to decide the verdict',
    cell: ({ entry }) => entry.qualifies,
  },
];

export const DOUBT_COLUMNS: Column<Doubt>[] = [
  DETECTION,
  text('doubt', 'What could fake the result', ({ entry }) => entry.name),
  text('grade', 'clear, watch, serious or not testable here', ({ entry }) => entry.grade, { ucd: 'meta.code.qual' }),
  number('value', '', 'Its number, in the unit beside it', ({ entry }) => entry.value, { significant: 4 }),
  text('unit', 'Unit of the number', ({ entry }) => entry.unit || null, { ucd: 'meta.unit' }),
  text('sentence', 'What it says', ({ entry }) => entry.sentence, { ucd: 'meta.note' }),
  text('rule', 'How it is graded', ({ entry }) => entry.rule, { ucd: 'meta.note' }),
  text('source', 'Published source', ({ entry }) => entry.source, { ucd: 'meta.bib' }),
];

export const GROUND_COLUMNS: Column<Ground>[] = [
  DETECTION,
  text('about', 'starlight, surroundings, distance or data', ({ entry }) => entry.about),
  text('weight', 'Speaks for or against the verdict, or is a note', ({ entry }) => entry.weight),
  text('ground', 'The sentence', ({ entry }) => entry.text, { ucd: 'meta.note' }),
];

const faintest = ({ depthExtended }: BandLimit) => depthExtended.at(-1) ?? null;
const limit = (name: string, of: string, sign: '<' | '>', isThere: (entry: BandLimit) => boolean): Column<BandLimit> =>
  text(name, `Limit flag of ${of}`, ({ entry }) => (isThere(entry) ? sign : null), {
    ucd: 'meta.code.error',
    limitFlagOf: of,
  });

/** What the silence of each band is worth; every limit carries its flag. */
export const LIMIT_COLUMNS: Column<BandLimit>[] = [
  DETECTION,
  text('catalogue', 'Table of the band', ({ entry }) => entry.catalogueName, { ucd: 'meta.id;meta.dataset' }),
  text('band', 'Band', ({ entry }) => entry.band, { ucd: 'instr.bandpass' }),
  text('system', 'Magnitude system', ({ entry }) => entry.system),
  {
    name: 'testable',
    datatype: 'boolean',
    description: 'Silence says something here',
    cell: ({ entry }) => entry.testable,
  },
  text('why', 'Why it does, or does not', ({ entry }) => entry.reason, { ucd: 'meta.note' }),
  number('depth_point', 'mag', '5-sigma depth for point sources', ({ entry }) => entry.depthPoint, {
    decimals: 2,
    ucd: 'phot.mag;stat.max',
  }),
  number(
    'depth_extended',
    'mag',
    'Total magnitude reached at the radius beside it',
    ({ entry }) => faintest(entry)?.magnitude ?? null,
    {
      decimals: 2,
      ucd: 'phot.mag;stat.max',
    },
  ),
  number(
    'depth_radius',
    'arcsec',
    'Effective radius of that depth',
    ({ entry }) => faintest(entry)?.radiusArcsec ?? null,
    {
      decimals: 1,
      ucd: 'phys.angSize',
    },
  ),
  probability('covered', 'Share of the search area that was observed', ({ entry }) => entry.covered),
  probability('unmasked', 'Share of it not hidden by stars', ({ entry }) => entry.unmasked),
  number(
    'expected_mag',
    'mag',
    'Of the ordinary counterpart with this much gas',
    ({ entry }) => entry.expectedMagnitude,
    {
      decimals: 2,
      ucd: 'phot.mag',
    },
  ),
  number('e_expected_mag', 'mag', 'Scatter of the relation', ({ entry }) => entry.expectedScatterMag, {
    decimals: 2,
    ucd: 'stat.error;phot.mag',
    errorOf: 'expected_mag',
  }),
  probability('completeness', 'Chance that it would have been seen', ({ entry }) => entry.completeness),
  limit('l_abs_mag', 'abs_mag', '>', ({ absoluteMagnitudeLimit }) => absoluteMagnitudeLimit !== null),
  number('abs_mag', 'mag', 'Absolute magnitude', ({ entry }) => entry.absoluteMagnitudeLimit, {
    decimals: 2,
    ucd: 'phys.magAbs',
  }),
  limit('l_luminosity', 'luminosity', '<', ({ luminosityLimitSolar }) => luminosityLimitSolar !== null),
  number('luminosity', 'solLum', 'Luminosity in the band', ({ entry }) => entry.luminosityLimitSolar, {
    significant: 3,
    ucd: 'phys.luminosity',
  }),
  limit('l_gas_to_light', 'gas_to_light', '>', ({ gasToLightLowerLimit }) => gasToLightLowerLimit !== null),
  number('gas_to_light', 'solMass/solLum', 'HI mass over luminosity', ({ entry }) => entry.gasToLightLowerLimit, {
    significant: 3,
    ucd: 'phys.mass;arith.ratio',
  }),
  limit('l_sfr', 'sfr', '<', ({ starFormationLimit }) => starFormationLimit !== null),
  number('sfr', 'solMass/yr', 'Star-formation rate', ({ entry }) => entry.starFormationLimit, {
    significant: 3,
    ucd: 'phys.SFR',
  }),
];
