import { DEGREE, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { separation } from '../sky/separation.ts';
import { fromBarycentric } from '../velocity/frames.ts';
import { angularDiameterDistance, type Cosmology, luminosityDistance } from './cosmology.ts';
import { redshiftDistanceError } from './distance-error.ts';
import { ATTRACTORS, type FlowVelocity, flowVelocity } from './flow-model.ts';

/** What is known of one source. Missing numbers are undefined or NaN. */
export interface DistanceInput {
  /** Optical cz, barycentric, km/s; NaN if there is no velocity. */
  readonly czKms: number;
  readonly czErrorKms?: number;
  /** ICRS, radians. */
  readonly raRad: number;
  readonly decRad: number;
  readonly measuredMpc?: number;
  readonly measuredErrorMpc?: number;
  /** Kind of the measured distance; if not stated it serves for luminosities and for projections alike. */
  readonly measuredKind?: 'angular' | 'luminosity';
}

/** The part of the criteria that decides a distance. */
export interface DistanceRule {
  readonly flowModel: 'none' | 'mould2000';
  readonly hubbleFrame: 'km96' | 'yts77' | 'cmb';
  /** Local Group velocity below which a redshift gives no distance, km/s. */
  readonly minimumVelocityKms: number;
  /** Local Group velocity below which a redshift distance is warned of, km/s. */
  readonly warnVelocityKms: number;
  /** One-dimensional peculiar velocity in the field and near a rich cluster, km/s. */
  readonly peculiarVelocityKms: number;
  readonly clusterPeculiarVelocityKms: number;
}

/** A distance with where it came from, or the reason there is none. */
export type Distance =
  | {
      readonly kind: 'measured' | 'flow' | 'hubble';
      /** Distance for masses and luminosities, Mpc. */
      readonly luminosityMpc: number;
      /** Distance for projected lengths, Mpc. */
      readonly angularMpc: number;
      /** Standard error without that of H₀, which is common to all sources, Mpc. */
      readonly errorMpc: number;
      /** Velocity the distance was made from, km/s; NaN for a measured distance. */
      readonly velocityUsedKms: number;
      readonly cautions: readonly string[];
      /** Every branch of the flow model, where it was asked for and there is a velocity. */
      readonly flow?: FlowVelocity;
    }
  | { readonly kind: 'none'; readonly reason: string; readonly flow?: FlowVelocity };

/** Fraction assumed for a measured distance without an error. Common practice, said in a caution. */
const UNSTATED_ERROR_FRACTION = 0.1;
/** A redshift distance this small or smaller is noise, Mpc. */
const LEAST_DISTANCE_MPC = 0.1;
/** Redshift beyond which a cz cannot belong to a catalogued object; above 1 no survey has found the HI line. */
const HIGHEST_REDSHIFT = 1000;
const SUSPECT_REDSHIFT = 1;
/** The zone about Virgo in which one velocity belongs to three distances. */
const TRIPLE_VALUED = { radius: 25 * DEGREE, belowKms: 2500 };

const known = (value: number | undefined): value is number => value !== undefined && !Number.isNaN(value);
const kms = (value: number) => `${Math.round(value)} km/s`;

function measuredDistance(input: DistanceInput, measuredMpc: number): Distance {
  if (!(measuredMpc > 0 && measuredMpc < Infinity)) {
    throw new DomainError(`chooseDistance: a measured distance must be positive, got ${measuredMpc} Mpc`);
  }
  const cautions: string[] = [];
  let errorMpc = UNSTATED_ERROR_FRACTION * measuredMpc;
  if (known(input.measuredErrorMpc)) {
    if (!(input.measuredErrorMpc >= 0 && input.measuredErrorMpc < Infinity)) {
      throw new DomainError(`chooseDistance: expected a distance error >= 0, got ${input.measuredErrorMpc} Mpc`);
    }
    errorMpc = input.measuredErrorMpc;
  } else {
    cautions.push('the measured distance has no error; 10 per cent is assumed');
  }
  let luminosityMpc = measuredMpc;
  let angularMpc = measuredMpc;
  if (input.measuredKind && known(input.czKms)) {
    const stretch = (1 + input.czKms / SPEED_OF_LIGHT_KMS) ** 2;
    if (input.measuredKind === 'angular') luminosityMpc *= stretch;
    else angularMpc /= stretch;
  }
  return { kind: 'measured', luminosityMpc, angularMpc, errorMpc, velocityUsedKms: Number.NaN, cautions };
}

function isNearVirgo({ czKms, raRad, decRad }: DistanceInput): boolean {
  const virgo = ATTRACTORS[0]!;
  return czKms < TRIPLE_VALUED.belowKms && separation(raRad, decRad, virgo.ra, virgo.dec) < TRIPLE_VALUED.radius;
}

function redshiftCautions(
  input: DistanceInput,
  rule: DistanceRule,
  localGroupKms: number,
  flow: FlowVelocity,
): string[] {
  const cautions: string[] = [];
  if (input.czKms > SUSPECT_REDSHIFT * SPEED_OF_LIGHT_KMS) {
    cautions.push(`a velocity of ${kms(input.czKms)} is beyond any HI survey; is the column in m/s?`);
  }
  if (localGroupKms < rule.warnVelocityKms) {
    cautions.push(
      `the Local Group velocity of ${kms(localGroupKms)} is below ${kms(rule.warnVelocityKms)}: peculiar motion is a ` +
        'large part of it',
    );
  }
  const cone = flow.collapsedOn;
  if (cone) {
    cautions.push(
      rule.flowModel === 'mould2000'
        ? `inside the ${cone} cone: the distance is that of the cluster`
        : `inside the ${cone} cone: the velocity says little about the distance`,
    );
  } else if (isNearVirgo(input)) {
    cautions.push('within 25 degrees of Virgo below 2500 km/s one velocity may belong to three distances');
  }
  return cautions;
}

/**
 * The distance of a source by the stated rule: measured, else flow model, else Hubble law, else none.
 *
 * @param input what is known of the source
 * @param rule part of the criteria
 * @param cosmology flat ΛCDM for redshift distances
 * @returns Mpc for luminosities, D_L = (1+z) D_C(v/c), and for projections, D_A = D_C(v/c)/(1+z), with z the observed
 *   barycentric redshift and v the velocity in the frame or by the model; the error and every caution
 * @throws {DomainError} for a position, an error or a measured distance out of range; an impossible velocity gives none
 *
 * A redshift gives no distance where the Local Group velocity is below the least one: there peculiar motion is as
 * large as the Hubble flow. The Local Group velocity for this test is that of `hubbleFrame`, and for the CMB frame
 * that of Karachentsev & Makarov (1996).
 * Source: common practice; form of D_L from Davis et al. (2011), ApJ 741, 67 (from memory).
 *
 * Method: distance.
 */
export function chooseDistance(input: DistanceInput, rule: DistanceRule, cosmology: Cosmology): Distance {
  const { czKms, raRad, decRad } = input;
  if (known(input.measuredMpc)) return measuredDistance(input, input.measuredMpc);
  if (!known(czKms)) return { kind: 'none', reason: 'there is neither a measured distance nor a velocity' };
  if (!(Math.abs(czKms) < SPEED_OF_LIGHT_KMS || (czKms > 0 && czKms < HIGHEST_REDSHIFT * SPEED_OF_LIGHT_KMS))) {
    return { kind: 'none', reason: `${czKms} km/s is not a possible velocity; check its unit and its missing values` };
  }

  const branches = flowVelocity(czKms, raRad, decRad);
  const flow = rule.flowModel === 'mould2000' ? branches : undefined;
  const shown = flow ? { flow } : {};
  const none = (reason: string): Distance => ({ kind: 'none', reason, ...shown });

  const localGroupKms = fromBarycentric(rule.hubbleFrame === 'yts77' ? 'yts77' : 'km96', czKms, raRad, decRad);
  if (localGroupKms < rule.minimumVelocityKms) {
    return none(
      `the Local Group velocity of ${kms(localGroupKms)} is below ${kms(rule.minimumVelocityKms)}, where a redshift ` +
        'gives no distance',
    );
  }
  const cautions = redshiftCautions(input, rule, localGroupKms, branches);
  // The smooth solution diverges beside an attractor and may turn negative there; the Hubble law then stands in.
  const byFlow = branches.cosmicKms > 0 && flow !== undefined;
  if (flow && !byFlow) cautions.push(`the flow model leaves ${kms(flow.cosmicKms)}; the Hubble law is used instead`);
  const velocityUsedKms = byFlow ? branches.cosmicKms : fromBarycentric(rule.hubbleFrame, czKms, raRad, decRad);
  if (velocityUsedKms <= 0) return none(`the velocity in the frame of the Hubble law is ${kms(velocityUsedKms)}`);
  const z = velocityUsedKms / SPEED_OF_LIGHT_KMS;
  const observedZ = czKms / SPEED_OF_LIGHT_KMS;
  const luminosityMpc = luminosityDistance(z, cosmology, observedZ);
  if (luminosityMpc <= LEAST_DISTANCE_MPC) return none(`the velocity gives ${luminosityMpc.toFixed(2)} Mpc only`);

  const peculiarKms = branches.collapsedOn ? rule.clusterPeculiarVelocityKms : rule.peculiarVelocityKms;
  return {
    kind: byFlow ? 'flow' : 'hubble',
    luminosityMpc,
    angularMpc: angularDiameterDistance(z, cosmology, observedZ),
    errorMpc: redshiftDistanceError(peculiarKms, known(input.czErrorKms) ? input.czErrorKms : 0, cosmology.h0),
    velocityUsedKms,
    cautions,
    ...shown,
  };
}
