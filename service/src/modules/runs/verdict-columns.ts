import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import type { OutputCell, OutputColumn } from '../../tables/writers/output-column.ts';
import type { TableAnswer } from './send-table.ts';

export interface VerdictLine {
  item: VerdictItem;
  rank?: number;
  reason?: string;
  nullResult?: string;
}

type Column = OutputColumn & { cell: (line: VerdictLine) => OutputCell };
const text = (name: string, description: string, cell: Column['cell'], ucd?: string): Column => ({
  name,
  datatype: 'text',
  description,
  ucd,
  cell,
});
const number = (
  name: string,
  unit: string,
  decimals: number,
  description: string,
  cell: Column['cell'],
  ucd?: string,
): Column => ({
  name,
  datatype: 'double',
  unit: unit || undefined,
  decimals,
  description,
  ucd,
  cell,
});

/** Significant digits a probability is good for: four decimals, since priors are no better. */
const probability = (name: string, description: string, cell: Column['cell']): Column =>
  number(name, '', 4, description, cell, 'stat.probability');

const COLUMNS: Column[] = [
  text('detection', 'Name in the HI list', ({ item }) => item.name, 'meta.id;meta.main'),
  number(
    'ra_deg',
    'deg',
    5,
    'Right ascension of the HI centroid, ICRS',
    ({ item }) => item.raDeg,
    'pos.eq.ra;meta.main',
  ),
  number(
    'dec_deg',
    'deg',
    5,
    'Declination of the HI centroid, ICRS',
    ({ item }) => item.decDeg,
    'pos.eq.dec;meta.main',
  ),
  number(
    'cz_kms',
    'km/s',
    1,
    'Velocity, optical convention, barycentric',
    ({ item }) => item.velocityKms,
    'spect.dopplerVeloc.opt',
  ),
  number('w50_kms', 'km/s', 1, 'Line width at half the peak', ({ item }) => item.width50Kms, 'spect.line.width'),
  number('flux_jykms', 'Jy.km/s', 3, 'Integrated HI flux', ({ item }) => item.fluxJyKms, 'phot.flux;spect.line'),
  number('snr', '', 1, 'Signal-to-noise ratio', ({ item }) => item.signalToNoise, 'stat.snr'),
  number('distance_mpc', 'Mpc', 2, 'Luminosity distance used', ({ item }) => item.distanceMpc, 'pos.distance'),
  number(
    'e_distance_mpc',
    'Mpc',
    2,
    'Its error, 1 sigma',
    ({ item }) => item.distanceErrorMpc,
    'stat.error;pos.distance',
  ),
  number('log_mhi', 'log(solMass)', 2, 'HI mass, M = 2.356e5 D^2 S/(1+z)^2', ({ item }) => item.logHiMass, 'phys.mass'),
  text('starlight', 'Starlight verdict: a screening result', ({ item }) => item.starlight, 'meta.code.class'),
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
  text(
    'counterpart',
    'Best object, whatever the verdict',
    ({ item }) => item.counterpart?.name ?? null,
    'meta.id.assoc',
  ),
  probability(
    'counterpart_probability',
    'Its exclusive probability',
    ({ item }) => item.counterpart?.probability ?? null,
  ),
  number(
    'counterpart_arcsec',
    'arcsec',
    1,
    'Its separation from the centroid',
    ({ item }) => item.counterpart?.separationArcsec ?? null,
    'pos.angDistance',
  ),
  text(
    'gas_to_light_limit_flag',
    '> where the gas-to-light ratio is a lower limit',
    ({ item }) => (item.gasToLight !== null && item.gasToLightIsLimit ? '>' : null),
    'meta.code.error',
  ),
  number(
    'gas_to_light',
    'solMass/solLum',
    2,
    'M_HI / L, solar units',
    ({ item }) => item.gasToLight,
    'phys.mass;arith.ratio',
  ),
  text('surroundings', 'Surroundings verdict: a screening result', ({ item }) => item.surroundings, 'meta.code.class'),
  probability('p_alone', 'P(no neighbour)', ({ item }) => item.pAlone),
  text('nearest_name', 'Nearest neighbour with a velocity', ({ item }) => item.nearest?.name ?? null, 'meta.id.assoc'),
  number(
    'nearest_kpc',
    'kpc',
    1,
    'Its projected separation at the distance of the gas',
    ({ item }) => item.nearest?.separationKpc ?? null,
    'phys.distance',
  ),
  number(
    'nearest_dv_kms',
    'km/s',
    1,
    'Its velocity difference',
    ({ item }) => item.nearest?.velocityDifferenceKms ?? null,
    'spect.dopplerVeloc;arith.diff',
  ),
  {
    name: 'count_1mpc_500kms',
    datatype: 'integer',
    description: 'Catalogue rows within 1 Mpc and 500 km/s',
    cell: ({ item }) => item.count1Mpc500Kms,
  },
  text(
    'doubts',
    'Doubts graded watch or serious',
    ({ item }) => item.doubts.map((doubt) => `${doubt.name} (${doubt.grade})`).join('; ') || null,
  ),
  text('settled_starlight', 'Settled by the lead', ({ item }) => item.settled?.starlight ?? null),
  text('settled_surroundings', 'Settled by the lead', ({ item }) => item.settled?.surroundings ?? null),
  text('headline', 'The verdict in words', ({ item }) => item.headline),
];
const SHORTLIST: Column[] = [
  {
    name: 'rank',
    datatype: 'integer',
    description: 'Place on the shortlist',
    ucd: 'meta.number',
    cell: ({ rank }) => rank ?? null,
  },
];
const REASONS: Column[] = [
  text('reason', 'Why it is on the list', ({ reason }) => reason || null, 'meta.note'),
  text('null_result', 'What finding nothing would prove', ({ nullResult }) => nullResult || null, 'meta.note'),
];

/** Verdicts as a table for people and programs: the same numbers, rounding and words as on the screen. */
export function verdictTable(
  lines: Iterable<VerdictLine> | AsyncIterable<VerdictLine>,
  description: string,
  ranked = false,
): TableAnswer {
  const columns = ranked ? [...SHORTLIST, ...COLUMNS, ...REASONS] : COLUMNS;
  async function* rows() {
    for await (const line of lines) yield columns.map((column) => column.cell(line));
  }
  return { columns: columns.map(({ cell: _, ...column }) => column), rows: rows(), description };
}
