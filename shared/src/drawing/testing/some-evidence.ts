import { criteriaSettings } from '../../contracts/criteria.ts';
import type { BandLimit, Candidate, Neighbour } from '../../contracts/verdict.ts';
import type { DrawnDetail, DrawnEvidence } from '../drawn-evidence.ts';

const ARCSEC_PER_DEGREE = 3600;
const KPC_PER_ARCSEC_AT_20_MPC = (20_000 * Math.PI) / 648_000;

/** A row so many arcsec north of the detection, at its velocity. */
export const someCandidate = (row: number, change: Partial<Candidate> = {}): Candidate => {
  const separationArcsec = change.separationArcsec ?? 10;
  return {
    catalogueId: 'deep',
    catalogueName: 'Deep r',
    kind: 'optical',
    rowId: row,
    name: `D${row}`,
    raDeg: 40,
    decDeg: 10 + separationArcsec / ARCSEC_PER_DEGREE,
    separationArcsec,
    positionAngleDeg: 0,
    separationKpc: separationArcsec * KPC_PER_ARCSEC_AT_20_MPC,
    velocityKms: null,
    velocityDifferenceKms: null,
    band: 'r',
    magnitude: 19,
    chanceProbability: 0.1,
    likelihoodRatio: 3,
    probability: 0.4,
    object: row,
    isStar: false,
    override: null,
    ...change,
  };
};

export const someNeighbour = (row: number, change: Partial<Neighbour> = {}): Neighbour => ({
  catalogueId: 'redshifts',
  catalogueName: 'Redshifts',
  kind: 'optical',
  rowId: row,
  name: `Z${row}`,
  raDeg: 40,
  decDeg: 10.5,
  separationArcsec: 1800,
  positionAngleDeg: 0,
  separationKpc: 1800 * KPC_PER_ARCSEC_AT_20_MPC,
  velocityKms: 1500,
  velocityDifferenceKms: 100,
  band: 'r',
  magnitude: 14,
  absoluteMagnitude: -17.5,
  logHiMass: null,
  qualifies: true,
  ...change,
});

export const someLimit = (change: Partial<BandLimit> = {}): BandLimit => ({
  catalogueId: 'deep',
  catalogueName: 'Deep r',
  band: 'r',
  system: 'AB',
  testable: true,
  reason: '',
  depthPoint: 25,
  depthExtended: [
    { radiusArcsec: 2, magnitude: 23.5 },
    { radiusArcsec: 20, magnitude: 21.5 },
  ],
  extinctionMag: 0.1,
  covered: 1,
  unmasked: 1,
  expectedMagnitude: 18,
  expectedScatterMag: 1.2,
  completeness: 0.996,
  absoluteMagnitudeLimit: -9,
  luminosityLimitSolar: 1e5,
  gasToLightLowerLimit: 100,
  stellarMassLimits: [],
  starFormationLimit: null,
  ...change,
});

/** A detection at RA 40, Dec +10 and 20 +- 4 Mpc with a round beam of 3 arcmin. */
export function someEvidence(change: Partial<DrawnDetail> = {}, rest: Partial<DrawnEvidence> = {}): DrawnEvidence {
  return {
    detail: {
      verdict: {
        detectionId: 'd',
        name: 'EX J0240+1000',
        raDeg: 40,
        decDeg: 10,
        velocityKms: 1400,
        width50Kms: 80,
        fluxJyKms: 2,
        signalToNoise: 12,
        distanceMpc: 20,
        distanceErrorMpc: 4,
        logHiMass: 8.3,
        starlight: 'dark',
        pNone: 0.9,
        pMissed: 0.02,
        pSpurious: 0,
        power: 0.99,
        counterpart: null,
        surroundings: 'alone',
        pAlone: 0.9,
        nearest: null,
        count1Mpc500Kms: 0,
        gasToLight: 100,
        gasToLightIsLimit: true,
        doubts: [],
        grounds: [],
        headline: 'no starlight found',
        robustness: null,
        settled: null,
        reviews: 0,
        overrides: 0,
      },
      distance: { kind: 'hubble', luminosityMpc: 20, angularMpc: 20, errorMpc: 4, note: '', branches: [] },
      positionError: { majorArcsec: 8, minorArcsec: 8, angleDeg: 0, source: '' },
      beamArcsec: { major: 180, minor: 180, angleDeg: 0 },
      searchRadiusArcsec: 90,
      neighbourRadiusArcsec: 10_313,
      candidates: [],
      neighbours: [],
      limits: [],
      doubts: [],
      aloneFactors: null,
      measures: null,
      priors: [],
      masks: [],
      claims: [],
      ...change,
    },
    settings: criteriaSettings.parse({}),
    ...rest,
  };
}
