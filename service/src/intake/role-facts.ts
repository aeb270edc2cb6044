import type { ColumnRole } from '@eremite/shared/contracts/intake-settings';
import { DISTANCE_MODULUS } from './name-parts.ts';
import type { Quantity } from './units.ts';

/** What is known of a role: how people name such columns, what they may hold, how it is called in a sentence. */
export interface RoleFacts {
  says: string;
  quantity: Quantity;
  /** Names after `nameParts` has taken the unit and punctuation off; the first group is the plainest. */
  names: readonly [RegExp, number][];
  ucds: readonly [RegExp, number][];
  /** Values outside are no measurement (a mark for "missing", a slip): inclusive, canonical unit. */
  range: readonly [number, number];
}

const ANY: readonly [number, number] = [-Infinity, Infinity];
/** A value that must be above zero to mean anything. */
const above = (limit: number): readonly [number, number] => [Number.MIN_VALUE, limit];
const facts = (
  says: string,
  quantity: Quantity,
  range: readonly [number, number],
  names: readonly [RegExp, number][] = [],
  ucds: readonly [RegExp, number][] = [],
): RoleFacts => ({ says, quantity, names, ucds, range });

/**
 * The roles. Names and UCDs are those in use in the trade; a sexagesimal part is never guessed from a lone name.
 * Ranges hold every real object with room to spare: cz from -990 km/s, for no galaxy approaches faster.
 */
export const ROLE_FACTS: Readonly<Record<ColumnRole, RoleFacts>> = {
  name: facts(
    'name',
    'number',
    ANY,
    [
      [/^(name|source_?name|object_?name|obj_?name|main_?id|designation)$/, 0.9],
      [/^(source|object|galaxy|detection|(src|hi|gal|cat)_?name)$/, 0.8],
      [/^(id|ident|identifier|source_?id|obj_?id|objid|gal_?id|hi_?id|agc|pgc|ugc|ngc|seq|key|recno)$/, 0.7],
    ],
    [
      [/^meta\.id;meta\.main$|^id_main$/, 0.97],
      [/^meta\.id(;|$)/, 0.75],
    ],
  ),
  ra: facts(
    'right ascension',
    'angle',
    [-180, 360],
    [
      [/^(ra|raj2000|ra_?j2000|ra_?icrs|right_?ascension|alpha|alpha_?j2000)$/, 0.95],
      [/^(_ra|_raj2000|_ra_?icrs|rade?g|ra_?hi|ra_?opt|ra_?cen|ra_?mean|ra_?2000|lon)$/, 0.75],
    ],
    [
      [/^pos\.eq\.ra;meta\.main$|^pos_eq_ra_main$/, 0.98],
      [/^pos\.eq\.ra(;|$)|^pos_eq_ra$/, 0.9],
    ],
  ),
  dec: facts(
    'declination',
    'angle',
    [-90, 90],
    [
      [/^(dec|dej2000|decj2000|de_?j2000|dec_?j2000|de_?icrs|dec_?icrs|declination|decl|delta|delta_?j2000)$/, 0.95],
      [/^(de|_de|_dej2000|_dec|_de_?icrs|dec?deg|dec_?hi|dec_?opt|dec_?cen|dec_?mean|dec_?2000|lat)$/, 0.75],
    ],
    [
      [/^pos\.eq\.dec;meta\.main$|^pos_eq_dec_main$/, 0.98],
      [/^pos\.eq\.dec(;|$)|^pos_eq_dec$/, 0.9],
    ],
  ),
  positionError: facts(
    'position error',
    'smallAngle',
    above(36_000),
    [
      [/^(e_?pos|pos_?err(or)?|err_?pos|position_?err(or)?|poserr|pos_?unc|astrom_?err|sigma_?pos|r_?err)$/, 0.85],
      [/^(err_?maj|e_?maj)$/, 0.65],
    ],
    [[/^stat\.error;pos(;|$)|^pos\.errorellipse/, 0.8]],
  ),
  velocity: facts(
    'velocity',
    'velocity',
    [-990, 6e6],
    [
      [
        /^(cz|v_?hel(io)?|cz_?hel(io)?|v50|v_?sys|hrv|v_?opt|vel(ocity)?|rv|rad_?vel|radial_?velocity|v_?bary|cz_?bary)$/,
        0.9,
      ],
      [/^(v_?rad|v_?lsr(k)?|v_?hi|v_?20|v_?lg|v_?cmb|v_?los|vlos_?systemic|vel_?hi|v_?sun)$/, 0.75],
    ],
    [[/^spect\.dopplerveloc|^velocity_|^veloc/, 0.93]],
  ),
  velocityError: facts('velocity error', 'velocity', above(1e5)),
  redshift: facts(
    'redshift',
    'number',
    [-0.0033, 20],
    [
      [/^(redshift|z_?spec|zsp|z_?sp|spec_?z|z_?hel(io)?|z_?best|zspec)$/, 0.9],
      [/^z$/, 0.7],
    ],
    [[/^src\.redshift(?!\.phot)|^redshift_hc/, 0.95]],
  ),
  redshiftError: facts('redshift error', 'number', above(10)),
  frequency: facts(
    'frequency',
    'frequency',
    [40, 1500],
    [[/^(freq|frequency|f_?obs|freq_?obs|nu_?obs|freq_?peak|freq_?cen)$/, 0.85]],
    [[/^em\.freq/, 0.9]],
  ),
  width50: facts(
    'W50',
    'velocity',
    above(3000),
    [
      [/^(w_?50|width_?50|w50_?(obs|max|raw))$/, 0.95],
      [/^(wid(th)?|line_?width|fwhm_?v(el)?)$/, 0.6],
    ],
    [[/^spect\.line\.width/, 0.75]],
  ),
  width20: facts('W20', 'velocity', above(3000), [[/^(w_?20|width_?20|w20_?(obs|max|raw))$/, 0.95]]),
  flux: facts(
    'HI flux',
    'lineFlux',
    above(1e6),
    [
      [
        /^(hi_?flux|flux_?hi|s_?int|f_?int|int_?flux|flux_?int|s_?hi|f_?hi|fhi|s21|f_?sum|hi_?int|total_?flux|hi_?flux_?int)$/,
        0.9,
      ],
      [/^(flux|sint|fint|int_?flux_?density)$/, 0.65],
    ],
    [[/^phot\.flux.*em\.(line\.hi|radio)/, 0.9]],
  ),
  fluxError: facts('HI flux error', 'lineFlux', above(1e6)),
  signalToNoise: facts(
    'signal-to-noise ratio',
    'number',
    above(1e6),
    [[/^(snr|sn|s_?n|s_?to_?n|signal_?to_?noise|peak_?snr|snr_?int|snr_?peak|s_?n_?ratio)$/, 0.9]],
    [[/^stat\.snr/, 0.95]],
  ),
  reliability: facts('reliability', 'number', [0, 1], [[/^(rel|reliability|reliab|p_?real|prob_?real)$/, 0.85]]),
  distance: facts(
    'distance',
    'distance',
    above(20_000),
    [
      [/^(dist|distance|d|d_?lum|dist_?best|distance_?best)$/, 0.8],
      // A modulus is taken where there is no distance with a unit: it says the same, less directly.
      [DISTANCE_MODULUS, 0.7],
    ],
    [
      [/^pos\.distance/, 0.9],
      [/^phot\.mag\.distmod/, 0.85],
    ],
  ),
  distanceError: facts('distance error', 'distance', above(20_000)),
  magnitude: facts('magnitude', 'magnitude', [-3, 40], [[/^(mag|magnitude|m)$/, 0.7]], [[/^phot\.mag(;|$)/, 0.7]]),
  effectiveRadius: facts(
    'effective radius',
    'smallAngle',
    above(7200),
    [
      [
        /^(re|r_?e|r_?eff|reff|shape_?r|r_?half|rhalf|half_?light_?radius|petro_?r50(_?[a-z])?|r50|flux_?radius|effective_?radius)$/,
        0.8,
      ],
    ],
    [[/^phys\.angsize(;|$)/, 0.6]],
  ),
  axisRatio: facts('axis ratio', 'number', [0, 1], [[/^(ba|b_?a|axis_?ratio|q|axratio)$/, 0.7]]),
  positionAngle: facts(
    'position angle',
    'angle',
    [-360, 360],
    [[/^(pa|pos_?ang|position_?angle|theta)$/, 0.7]],
    [[/^pos\.posang/, 0.85]],
  ),
  starGalaxy: facts(
    'star probability',
    'number',
    [0, 1],
    [[/^(class_?star|star_?prob(ability)?|p_?star|prob_?star|star_?galaxy|sg_?score|ps_?score)$/, 0.85]],
    [[/^src\.class\.stargalaxy/, 0.85]],
  ),
  redshiftQuality: facts(
    'redshift quality',
    'number',
    [-10, 1000],
    [[/^(z_?qual(ity)?|q_?z|zq|nq|z_?conf|redshift_?quality|zwarn(ing)?)$/, 0.75]],
  ),
  reddening: facts(
    'reddening E(B-V)',
    'magnitude',
    [-0.1, 100],
    [[/^(ebv|e_?b_?v|e_?bv|reddening|ebv_?sfd)$/, 0.85]],
    [[/^phot\.color\.excess/, 0.85]],
  ),
  properMotion: facts('proper motion', 'properMotion', [0, 20_000], [[/^(pm|proper_?motion|pm_?total)$/, 0.8]]),
  properMotionRa: facts(
    'proper motion in right ascension',
    'properMotion',
    [-20_000, 20_000],
    [[/^(pm_?ra|pmra_?cosdec|mu_?ra|mu_?alpha)$/, 0.85]],
    [[/^pos\.pm;pos\.eq\.ra/, 0.95]],
  ),
  properMotionDec: facts(
    'proper motion in declination',
    'properMotion',
    [-20_000, 20_000],
    [[/^(pm_?dec?|mu_?dec?|mu_?delta)$/, 0.85]],
    [[/^pos\.pm;pos\.eq\.dec/, 0.95]],
  ),
  continuumFlux: facts('continuum flux', 'fluxDensity', above(1e9), [
    [/^(s_?1_?4(_?ghz)?|s1400|f_?cont|cont_?flux|continuum_?flux|flux_?1_?4|f_?peak|total_?flux_?density)$/, 0.75],
  ]),
  beamMajor: facts('beam major axis', 'smallAngle', above(36_000), [[/^(b_?maj|beam_?maj(or)?)$/, 0.8]]),
  beamMinor: facts('beam minor axis', 'smallAngle', above(36_000), [[/^(b_?min|beam_?min(or)?)$/, 0.8]]),
  raHours: facts('hours of right ascension', 'number', [0, 24], [[/^(rah|ra_?h|ra_?hours?|ra_?hr|rahour)$/, 0.85]]),
  raMinutes: facts('minutes of right ascension', 'number', [0, 60], [[/^(ram|ra_?m|ra_?min(utes?)?)$/, 0.85]]),
  raSeconds: facts('seconds of right ascension', 'number', [0, 60], [[/^(ras|ra_?s|ra_?sec(onds?)?)$/, 0.85]]),
  decSign: facts('sign of declination', 'number', ANY, [[/^(de-|de_?sign|dec_?sign|dec-|ds)$/, 0.85]]),
  decDegrees: facts('degrees of declination', 'number', [-90, 90], [[/^(ded|dec_?d|de_?d|decd|dec_?degrees?)$/, 0.8]]),
  decMinutes: facts('minutes of declination', 'number', [0, 60], [[/^(dem|dec_?m|de_?m|decm|dec_?min(utes?)?)$/, 0.8]]),
  decSeconds: facts('seconds of declination', 'number', [0, 60], [[/^(des|dec_?s|de_?s|decs|dec_?sec(onds?)?)$/, 0.8]]),
  memberCount: facts(
    'number of members',
    'number',
    [0, 1e6],
    [[/^(n_?mem(bers?)?|members?|ngal|n_?gal|richness)$/, 0.75]],
  ),
  velocityDispersion: facts('velocity dispersion', 'velocity', above(5000), [
    [/^(sigma_?v|v_?disp|veldisp|velocity_?dispersion|sig_?v)$/, 0.8],
  ]),
  groupRadius: facts('group radius', 'distance', above(100), [[/^(r_?200|r_?vir|r200c?|r500c?|r_?group)$/, 0.75]]),
  groupMass: facts('group mass', 'mass', above(1e18), [[/^(m_?200|m_?vir|m_?halo|log_?m_?200|group_?mass)$/, 0.75]]),
};
