import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { roundByError, roundError } from './round-by-error.ts';
import { number, probability, type TableColumn, text, whole } from './table-column.ts';

export interface VerdictLine {
  item: VerdictItem;
  rank?: number;
  reason?: string;
  nullResult?: string;
  /** Product the list is ranked by, see `rankOf`. */
  priority?: number | null;
}
type Column = TableColumn<VerdictLine>;

/** What is measured, with its errors. */
const MEASURED: Column[] = [
  text('detection', 'Name in the HI list', ({ item }) => item.name, { ucd: 'meta.id;meta.main' }),
  number('ra_deg', 'deg', 'Right ascension of the HI centroid, ICRS', ({ item }) => item.raDeg, {
    decimals: 5,
    ucd: 'pos.eq.ra;meta.main',
  }),
  number('dec_deg', 'deg', 'Declination of the HI centroid, ICRS', ({ item }) => item.decDeg, {
    decimals: 5,
    ucd: 'pos.eq.dec;meta.main',
  }),
  number('cz_kms', 'km/s', 'Velocity, optical convention, barycentric', ({ item }) => item.velocityKms, {
    decimals: 1,
    ucd: 'spect.dopplerVeloc.opt',
  }),
  number('w50_kms', 'km/s', 'Line width at half the peak', ({ item }) => item.width50Kms, {
    decimals: 1,
    ucd: 'spect.line.width',
  }),
  number('flux_jykms', 'Jy.km/s', 'Integrated HI flux', ({ item }) => item.fluxJyKms, {
    decimals: 3,
    ucd: 'phot.flux;spect.line',
  }),
  number('snr', '', 'Signal-to-noise ratio', ({ item }) => item.signalToNoise, { decimals: 1, ucd: 'stat.snr' }),
  number(
    'distance_mpc',
    'Mpc',
    'Luminosity distance used',
    ({ item }) => roundByError(item.distanceMpc, item.distanceErrorMpc),
    { ucd: 'pos.distance' },
  ),
  number('e_distance_mpc', 'Mpc', 'Its error, 1 sigma', ({ item }) => roundError(item.distanceErrorMpc), {
    ucd: 'stat.error;pos.distance',
    errorOf: 'distance_mpc',
  }),
  number('log_mhi', 'log(solMass)', 'HI mass, M = 2.356e5 D^2 S/(1+z)^2', ({ item }) => item.logHiMass, {
    decimals: 2,
    ucd: 'phys.mass',
  }),
  number('e_log_mhi', '', 'Its error in dex from that of the distance alone', logMassError, {
    decimals: 2,
    ucd: 'stat.error;phys.mass',
    errorOf: 'log_mhi',
  }),
];

const STARLIGHT: Column[] = [
  text('starlight', 'Starlight verdict: a screening result', ({ item }) => item.starlight, { ucd: 'meta.code.class' }),
  probability('p_none', 'Probability that there are no stars above the limit', ({ item }) => item.pNone),
  probability(
    'p_missed',
    'Probability that a counterpart exists which these catalogues could not show',
    ({ item }) => item.pMissed,
  ),
  probability('p_spurious', 'Probability that the line is not real', ({ item }) => item.pSpurious),
  probability(
    'power',
    'Chance that an ordinary galaxy with this much gas would have been seen here',
    ({ item }) => item.power,
  ),
  text('counterpart', 'Best object, whatever the verdict', ({ item }) => item.counterpart?.name ?? null, {
    ucd: 'meta.id.assoc',
  }),
  probability(
    'counterpart_probability',
    'Its exclusive probability',
    ({ item }) => item.counterpart?.probability ?? null,
    { label: 'p_counterpart' },
  ),
  number(
    'counterpart_arcsec',
    'arcsec',
    'Its separation from the centroid',
    ({ item }) => item.counterpart?.separationArcsec ?? null,
    { decimals: 1, ucd: 'pos.angDistance', label: 'sep_counterpart' },
  ),
  text(
    'l_gas_to_light',
    'Limit flag: > where the gas-to-light ratio is a lower limit',
    ({ item }) => (item.gasToLight !== null && item.gasToLightIsLimit ? '>' : null),
    { ucd: 'meta.code.error', limitFlagOf: 'gas_to_light' },
  ),
  number('gas_to_light', 'solMass/solLum', 'HI mass over luminosity, solar units', ({ item }) => item.gasToLight, {
    significant: 3,
    ucd: 'phys.mass;arith.ratio',
  }),
];

const SURROUNDINGS: Column[] = [
  text('surroundings', 'Surroundings verdict: a screening result', ({ item }) => item.surroundings, {
    ucd: 'meta.code.class',
  }),
  probability('p_alone', 'P(no neighbour)', ({ item }) => item.pAlone),
  text('nearest_name', 'Nearest neighbour with a velocity', ({ item }) => item.nearest?.name ?? null, {
    ucd: 'meta.id.assoc',
  }),
  number(
    'nearest_kpc',
    'kpc',
    'Its projected separation at the distance of the gas',
    ({ item }) => item.nearest?.separationKpc ?? null,
    { decimals: 1, ucd: 'pos.distance' },
  ),
  number(
    'nearest_dv_kms',
    'km/s',
    'Its velocity difference',
    ({ item }) => item.nearest?.velocityDifferenceKms ?? null,
    { decimals: 1, ucd: 'spect.dopplerVeloc;arith.diff' },
  ),
  whole('count_1mpc_500kms', 'Catalogue rows within 1 Mpc and 500 km/s', ({ item }) => item.count1Mpc500Kms, {
    label: 'n_1mpc_500kms',
  }),
];

const STANDING: Column[] = [
  probability(
    'starlight_stability',
    'Share of draws from the errors in which the starlight verdict stands',
    ({ item }) => item.robustness?.starlightStability ?? null,
    { label: 'stab_starlight' },
  ),
  probability(
    'surroundings_stability',
    'The same of the surroundings verdict',
    ({ item }) => item.robustness?.surroundingsStability ?? null,
    { label: 'stab_surround' },
  ),
  text(
    'doubts',
    'Doubts graded watch or serious',
    ({ item }) => item.doubts.map((doubt) => `${doubt.name} (${doubt.grade})`).join('; ') || null,
  ),
  text('settled_starlight', 'Settled by the lead', ({ item }) => item.settled?.starlight ?? null, {
    label: 'set_starlight',
  }),
  text('settled_surroundings', 'Settled by the lead', ({ item }) => item.settled?.surroundings ?? null, {
    label: 'set_surroundings',
  }),
  text('headline', 'The verdict in words', ({ item }) => item.headline),
];

/** Verdicts of a run. */
export const VERDICT_COLUMNS: Column[] = [...MEASURED, ...STARLIGHT, ...SURROUNDINGS, ...STANDING];

/** Verdicts of a ranked list, with why each is on it. */
export const SHORTLIST_COLUMNS: Column[] = [
  whole('rank', 'Place on the shortlist', ({ rank }) => rank ?? null, { ucd: 'meta.number' }),
  ...VERDICT_COLUMNS,
  number(
    'priority',
    '',
    'P(none) x P(no neighbour) x the smaller stability of the two verdicts; what is not known counts as zero',
    ({ priority }) => priority ?? null,
    { decimals: 4 },
  ),
  text('reason', 'Why it is on the list', ({ reason }) => reason || null, { ucd: 'meta.note' }),
  text('null_result', 'What finding nothing would prove', ({ nullResult }) => nullResult || null, {
    ucd: 'meta.note',
  }),
];

/** First order: the mass goes with the square of the distance. */
function logMassError({ item }: VerdictLine): number | null {
  const { logHiMass, distanceMpc, distanceErrorMpc } = item;
  if (logHiMass === null || !distanceMpc || distanceErrorMpc === null) return null;
  return (2 * distanceErrorMpc) / (distanceMpc * Math.LN10);
}
