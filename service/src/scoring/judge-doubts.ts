import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Doubt as ContractDoubt } from '@eremite/shared/contracts/verdict';
import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { rayleighRadius } from '@eremite/shared/science/counterpart/position-error';
import { blend } from '@eremite/shared/science/doubts/blend';
import { cloud, CLOUD_SETTINGS } from '@eremite/shared/science/doubts/cloud';
import { continuum } from '@eremite/shared/science/doubts/continuum';
import { debris } from '@eremite/shared/science/doubts/debris';
import { distanceDoubt } from '@eremite/shared/science/doubts/distance';
import type { Doubt } from '@eremite/shared/science/doubts/doubt';
import { edge } from '@eremite/shared/science/doubts/edge';
import { EXTINCTION_SETTINGS, extinctionDoubt } from '@eremite/shared/science/doubts/extinction';
import { hydroxyl } from '@eremite/shared/science/doubts/hydroxyl';
import { interference } from '@eremite/shared/science/doubts/interference';
import { recombinationLine } from '@eremite/shared/science/doubts/recombination-line';
import { sidelobe } from '@eremite/shared/science/doubts/sidelobe';
import { SPURIOUS_LINE_SETTINGS, spuriousLine } from '@eremite/shared/science/doubts/spurious-line';
import { meanHiMass } from '@eremite/shared/science/hydrogen/gas-relation';
import { hiMass } from '@eremite/shared/science/hydrogen/hi-mass';
import { BANDS } from '@eremite/shared/science/photometry/bands';
import { toGalactic } from '@eremite/shared/science/sky/galactic';
import { fromBarycentric } from '@eremite/shared/science/velocity/frames';
import { numberRole } from '../tiles/role-table.ts';
import type { PreparedCatalogue } from './prepared-catalogue.ts';
import { rowName } from './prepared-catalogue.ts';
import type { StarlightAssessment } from './assess.ts';
import { signedKms } from './figures.ts';
import type { NeighbourRow, SurroundingsResult } from './surroundings.ts';
import { velocityScatterOf } from './weigh-objects.ts';

/** Everything that could fake the result, each with its number and grade, the worst first. */
export function judgeDoubts(
  assessment: StarlightAssessment,
  surroundings: SurroundingsResult,
  catalogues: readonly PreparedCatalogue[],
  criteria: CriteriaSettings,
): ContractDoubt[] {
  const { detection } = assessment;
  const ra = (((detection.raDeg % 360) + 360) % 360) * DEGREE;
  const dec = detection.decDeg * DEGREE;
  const galactic = toGalactic(ra, dec);
  const moving = Number.isFinite(detection.czKms);
  const frame = (name: 'lsrk' | 'km96') => (moving ? fromBarycentric(name, detection.czKms, ra, dec) : NaN);
  const known = detection.distance.kind !== 'none';
  const beamArcmin = detection.beam ? Math.sqrt(detection.beam.major * detection.beam.minor) / 60 : NaN;
  const continuumMjy = strongestContinuum(assessment, catalogues);
  const { doubts } = criteria;
  const all: Doubt[] = [
    spuriousLine(
      { reliability: assessment.reliability, signalToNoise: detection.signalToNoise },
      { ...SPURIOUS_LINE_SETTINGS, seriousReliability: doubts.minimumReliability },
    ),
    withStarsAtVelocity(
      cloud(
        {
          galacticLonRad: galactic.lon,
          galacticLatRad: galactic.lat,
          lsrKms: frame('lsrk'),
          localGroupKms: frame('km96'),
          width50Kms: detection.width50Kms,
        },
        {
          ...CLOUD_SETTINGS,
          cloudVelocityKms: doubts.cloudVelocityKms,
          deviationVelocityKms: doubts.deviationVelocityKms,
        },
      ),
      assessment,
      criteria,
    ),
    withStarsOfItsOwn(debrisDoubt(assessment, surroundings, criteria), assessment, criteria),
    hydroxyl({
      redshift: moving ? detection.redshift : NaN,
      sources: infraredSources(assessment),
      radiusArcsec: rayleighRadius(0.95) * detection.error.majorArcsec,
      covered: catalogues.some(({ input, bands, moc }) =>
        input.kind === 'infrared' && bands.some(({ id }) => id === 'W1') ? moc?.contains(ra, dec) : false,
      ),
    }),
    recombinationLine({
      czKms: detection.czKms,
      width50Kms: detection.width50Kms,
      galacticLatRad: galactic.lat,
      continuumMjy: continuumMjy.flux,
    }),
    interference({
      czKms: detection.czKms,
      topocentric: false,
      width50Kms: detection.width50Kms,
      channelKms: NaN,
      bands: doubts.interference,
    }),
    blend({
      beamArcmin,
      distanceMpc: known ? detection.luminosityMpc : NaN,
      galaxiesAtVelocity: assessment.inBeam.length,
    }),
    sidelobe({
      sources: surroundings.pool.filter(({ catalogue }) => catalogue.input.kind === 'hi').map(sidelobeSource),
      beamArcmin,
      fluxJyKms: detection.fluxJyKms,
      width50Kms: detection.width50Kms,
    }),
    continuum({ strongestMjy: continuumMjy.flux, covered: continuumMjy.covered }),
    extinctionDoubt(
      { ebvMag: detection.ebvMag >= 0 ? detection.ebvMag : NaN, galacticLatRad: galactic.lat },
      {
        ...EXTINCTION_SETTINGS,
        maximumReddeningMag: criteria.absence.maximumReddeningMag,
        minimumLatitudeDeg: criteria.absence.minimumLatitudeDeg,
      },
    ),
    edge({
      neighbourCovered: surroundings.covered ?? NaN,
      counterpartCovered: bestCovered(assessment),
    }),
    distanceDoubt({
      kind: detection.distance.kind,
      distanceMpc: detection.luminosityMpc,
      errorMpc: detection.distanceErrorMpc,
      localGroupKms: frame('km96'),
      cautions: detection.distance.kind === 'none' ? [] : detection.distance.cautions,
    }),
  ];
  return all.map(toContract).sort((a, b) => RANK[b.grade] - RANK[a.grade]);
}

/**
 * A galaxy that moves as the gas does speaks against a cloud of the Galaxy before it: the doubt stays, but does not qualify
 * the headline.
 */
function withStarsAtVelocity(doubt: Doubt, { detection, dominating }: StarlightAssessment, criteria: CriteriaSettings) {
  const reach = 3 * velocityScatterOf(detection, criteria);
  if (doubt.grade !== 'serious' || !dominating || !(Math.abs(dominating.velocityDifferenceKms) <= reach)) return doubt;
  const name = rowName(dominating.face.catalogue, dominating.face.index);
  const off = signedKms(dominating.velocityDifferenceKms);
  return {
    ...doubt,
    grade: 'watch' as const,
    sentence: `${doubt.sentence.slice(0, -1)}, but its counterpart ${name} moves with it (${off}).`,
    rule: `${doubt.rule}; watch at most where the counterpart has the velocity of the gas`,
  };
}

/**
 * Debris is asked after where gas has no galaxy of its own. Beside a plain counterpart the neighbour is worth a look at
 * most, and none where the counterpart moves with the gas.
 */
function withStarsOfItsOwn(
  doubt: Doubt,
  { detection, starlight, dominating }: StarlightAssessment,
  criteria: CriteriaSettings,
): Doubt {
  if (starlight !== 'starlit' || !dominating || (doubt.grade !== 'serious' && doubt.grade !== 'watch')) return doubt;
  const reach = 3 * velocityScatterOf(detection, criteria);
  const moves = Math.abs(dominating.velocityDifferenceKms) <= reach;
  const name = rowName(dominating.face.catalogue, dominating.face.index);
  const own = moves
    ? `, but the gas has a galaxy of its own, ${name}, at its velocity (${signedKms(dominating.velocityDifferenceKms)})`
    : `, but the gas has a galaxy of its own, ${name}`;
  return {
    ...doubt,
    grade: moves ? 'clear' : 'watch',
    sentence: `${doubt.sentence.slice(0, -1)}${own}.`,
    rule: `${doubt.rule}; watch at most where the detection is starlit, clear where the counterpart has the velocity of the gas`,
  };
}

const RANK = { serious: 3, watch: 2, 'not testable here': 1, clear: 0 } as const;

function toContract(doubt: Doubt): ContractDoubt {
  const { name, grade, sentence, rule, source } = doubt;
  return { name, grade, value: doubt.value ?? null, unit: doubt.unit ?? '', sentence, rule, source };
}

function bestCovered({ silence }: StarlightAssessment): number {
  const known = silence.bands.map(({ covered }) => covered).filter((covered) => covered !== null);
  return known.length === 0 ? NaN : Math.max(...known);
}

const sidelobeSource = (row: NeighbourRow) => ({
  // Decoded only where the source is named.
  get name() {
    return rowName(row.catalogue, row.index);
  },
  separationArcmin: row.separationArcsec / 60,
  velocityDifferenceKms: row.velocityDifferenceKms,
  fluxJyKms: row.fluxJyKms,
  width50Kms: numberRole(row.catalogue.input.roles, 'width50Kms')?.[row.index] ?? NaN,
});

function strongestContinuum(
  { detection, candidates }: StarlightAssessment,
  catalogues: readonly PreparedCatalogue[],
): { flux: number; covered: boolean } {
  let flux = detection.continuumMjy;
  for (const { catalogue, index } of candidates) {
    const value = catalogue.continuum ? catalogue.continuum[index]! : NaN;
    if (value > 0 && !(flux >= value)) flux = value;
  }
  const ra = (((detection.raDeg % 360) + 360) % 360) * DEGREE;
  const covered = catalogues.some(
    (c) => c.input.kind === 'continuum' && c.moc?.contains(ra, detection.decDeg * DEGREE),
  );
  return { flux, covered };
}

function infraredSources({ candidates }: StarlightAssessment) {
  return candidates.flatMap(({ catalogue, index, separationArcsec, object, usableCzKms }) => {
    const w1 = catalogue.bands.find(({ id }) => id === 'W1');
    const w2 = catalogue.bands.find(({ id }) => id === 'W2');
    if (!w1 || !w2 || w1.isLimit?.[index] || w2.isLimit?.[index]) return [];
    const vega = (band: typeof w1, id: 'W1' | 'W2') => band.magnitude[index]! + band.toAb - BANDS[id].abMinusVega;
    const cz =
      candidates.find((other) => other.object === object && Number.isFinite(other.czKms))?.czKms ?? usableCzKms;
    return [
      {
        name: rowName(catalogue, index),
        separationArcsec,
        w1MinusW2: vega(w1, 'W1') - vega(w2, 'W2'),
        redshift: cz / 299_792.458,
        redshiftError: NaN,
      },
    ];
  });
}

function debrisDoubt(
  { detection }: StarlightAssessment,
  { pool, reach }: SurroundingsResult,
  { doubts, counterpart }: CriteriaSettings,
): Doubt {
  const { possibleDebrisKpc, possibleDebrisKms } = doubts;
  const distanceOf = (row: NeighbourRow) => numberRole(row.catalogue.input.roles, 'distanceMpc')?.[row.index] ?? NaN;
  // Rows beyond the wider zone cannot matter, and there are many of them.
  const near = pool.filter((row) => {
    if (!(Math.abs(row.velocityDifferenceKms) <= possibleDebrisKms)) return false;
    const stated = distanceOf(row);
    const kpc = (stated > 0 ? stated : detection.angularMpc) * 1000 * row.separationArcsec * ARCSECOND;
    return kpc <= possibleDebrisKpc * (1 + 1e-9);
  });
  return debris(
    {
      neighbours: near.map((row) => {
        const stated = distanceOf(row);
        // A neighbour without a distance of its own is taken at that of the detection: they share a velocity.
        const distanceMpc = stated > 0 ? stated : detection.angularMpc;
        const modulus = 5 * Math.log10(distanceMpc) + 25;
        const logStellarMass =
          Math.log10(counterpart.massToLightR) + (BANDS.r.solarAb - (row.magnitudeR - modulus)) / 2.5;
        // Gas nobody measured is taken from the stars by the mean relation, so that a dwarf is not "of unknown mass".
        const expectedGas = Number.isNaN(logStellarMass) ? NaN : meanHiMass(logStellarMass);
        return {
          name: rowName(row.catalogue, row.index),
          separationRad: row.separationArcsec * ARCSECOND,
          distanceMpc,
          distanceTaken: !(stated > 0),
          velocityDifferenceKms: row.velocityDifferenceKms,
          logHiMass:
            row.fluxJyKms > 0 && distanceMpc > 0 ? Math.log10(hiMass(row.fluxJyKms, distanceMpc)) : expectedGas,
          logStellarMass: row.catalogue.input.kind === 'hi' && Number.isNaN(logStellarMass) ? -99 : logStellarMass,
        };
      }),
      covered: pool.length > 0 || reach !== null,
      hasVelocity: Number.isFinite(detection.czKms),
    },
    {
      strong: { radiusKpc: doubts.strongDebrisKpc, windowKms: doubts.strongDebrisKms },
      possible: { radiusKpc: possibleDebrisKpc, windowKms: possibleDebrisKms },
      minLogHiMass: Math.log10(doubts.debrisGasMass),
      minLogStellarMass: Math.log10(doubts.debrisStellarMass),
    },
  );
}
