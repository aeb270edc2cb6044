import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Doubt, Ground } from '@eremite/shared/contracts/verdict';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import type { StarlightAssessment } from './assess.ts';
import { arcsec, kms, kpc, mag, mpc, mpcWithError, percent, probability, signedKms } from './figures.ts';
import { rowName } from './prepared-catalogue.ts';
import { numberRole } from '../tiles/role-table.ts';
import { isElsewhereAlong, type NeighbourRow, type SurroundingsResult } from './surroundings.ts';

const neighbourName = (row: NeighbourRow): string =>
  `${rowName(row.catalogue, row.index)} (${row.catalogue.input.name})`;

const ownDistance = ({ catalogue, index }: NeighbourRow): number =>
  numberRole(catalogue.input.roles, 'distanceMpc')?.[index] ?? NaN;

const galaxies = (count: number): string => `${count} known galax${count === 1 ? 'y lies' : 'ies lie'}`;

/** Why the surroundings verdict is what it is. */
export function surroundingsGrounds(
  { detection }: StarlightAssessment,
  result: SurroundingsResult,
  criteria: CriteriaSettings,
): Ground[] {
  const grounds: Ground[] = [];
  const say = (weight: Ground['weight'], text: string) =>
    grounds.push({ about: 'surroundings', weight, text, method: 'surroundings' });
  const { radiusMpc, velocityWindowKms, faintestNeighbourMag } = criteria.surroundings;
  const scope = `brighter than M_r ${faintestNeighbourMag} within ${radiusMpc} Mpc and ${velocityWindowKms} km/s`;
  const { membership, deciding, factors, verdict } = result;
  if (membership) {
    const { group } = membership;
    say(
      'for',
      `It lies ${kpc(membership.separationKpc)} and ${signedKms(membership.differenceKms)} from ${group.name} at that structure's distance of ${mpc(group.angularMpc)} (R200 ${kpc(group.r200Kpc)}, velocity dispersion ${kms(group.dispersionKms)}).`,
    );
  }
  if (deciding) {
    const at = detection.angularMpc > 0 ? detection.angularMpc : result.decidingAtMpc;
    const far = kpc(projectedKpc(deciding.separationArcsec, at));
    const where =
      detection.angularMpc > 0
        ? ' in projection at the distance of the gas'
        : ` in projection at its own distance of ${mpc(at)}`;
    const bright = Number.isNaN(deciding.magnitudeR)
      ? deciding.catalogue.input.kind === 'hi'
        ? 'an HI detection'
        : 'of unknown brightness'
      : `M_r about ${mag(deciding.magnitudeR - 5 * Math.log10(at) - 25)} there`;
    say(
      'for',
      `${neighbourName(deciding)}, ${bright}, lies ${far} away${where}, ${signedKms(deciding.velocityDifferenceKms)} from the gas.`,
    );
    // What approaches is no part of the Hubble flow.
    const recedes = (deciding.catalogue.czKms?.[deciding.index] ?? NaN) > 0;
    if (recedes && detection.angularMpc < result.windowMpc && Number.isNaN(ownDistance(deciding))) {
      say(
        'against',
        `No distance of ${neighbourName(deciding)} is known. The window of ${velocityWindowKms} km/s is ${mpc(result.windowMpc)} of Hubble flow, more than the ${mpc(detection.angularMpc)} to the gas: it may lie far behind.`,
      );
    }
  }
  if (verdict === 'alone' || verdict === 'cannot tell') {
    const elsewhere = result.neighbours.filter(isElsewhereAlong).length;
    const faint = result.neighbours.length - elsewhere;
    if (faint > 0) say('against', `${galaxies(faint)} in the window, too faint to count.`);
    if (elsewhere > 0) say('note', `${galaxies(elsewhere)} in the window, but elsewhere by distances of their own.`);
    const nearest = result.nearest;
    if (nearest) {
      say(
        'note',
        `The nearest row within ${velocityWindowKms} km/s is ${neighbourName(nearest)}, ${kpc(projectedKpc(nearest.separationArcsec, detection.angularMpc))} and ${signedKms(nearest.velocityDifferenceKms)} away${isElsewhereAlong(nearest) ? `; its own distance is ${mpc(ownDistance(nearest))}` : ''}.`,
      );
    }
  }
  if (verdict === 'cannot tell')
    for (const obstacle of result.obstacles) say('for', `It cannot be called alone: ${obstacle}.`);
  if (factors && result.reach) {
    const { reach } = result;
    const how = reach.measured ? ' (measured from its rows)' : '';
    say(
      verdict === 'alone' ? 'for' : 'note',
      `P(no neighbour ${scope}) is ${probability(factors.probability)}: none known in ${percent(factors.noneKnown)} of the distance draws, none unseen ${probability(factors.noneUnseen)}, covered ${percent(factors.covered)}. ` +
        `Redshifts of ${reach.catalogue.input.name} reach ${reach.band} ${mag(reach.magnitude)}${how}, so that ${result.missed.toFixed(2)} neighbours are missed in the mean field and ${result.missedClustered.toFixed(2)} with clustering.`,
    );
  }
  const flip = nearestFlip(detection.angularMpc, result);
  if (flip) say('against', flip);
  return grounds;
}

/** The distance at which the verdict on neighbours would change, as a sentence. */
export function nearestFlip(angularMpc: number, { verdict, pool }: SurroundingsResult): string | undefined {
  if (!(angularMpc > 0) || verdict !== 'alone') return undefined;
  const reach = pool.filter(
    ({ insideBelowMpc, countsAboveMpc }) => insideBelowMpc < angularMpc && countsAboveMpc < insideBelowMpc,
  );
  const best = reach.reduce<NeighbourRow | undefined>(
    (most, row) => (most && most.insideBelowMpc >= row.insideBelowMpc ? most : row),
    undefined,
  );
  return best && `It would be accompanied by ${neighbourName(best)} were it nearer than ${mpc(best.insideBelowMpc)}.`;
}

/** Share of the redshifts at the velocity of the gas by clustering from which a place is said to be dense. Our choice. */
const DENSE_PLACE = 0.5;

/** What the numbers rest on: distance, position, data that are missing. */
export function dataGrounds({
  detection,
  prior,
  priorSource,
  reliability,
  candidates,
  velocity,
}: StarlightAssessment): Ground[] {
  const grounds: Ground[] = [];
  const say = (about: Ground['about'], text: string, method: string | null = null) =>
    grounds.push({ about, weight: 'note', text, method });
  const { distance } = detection;
  if (distance.kind === 'none')
    say(
      'distance',
      `No distance is used: ${distance.reason}. Quantities in kpc and solar masses are withheld.`,
      'distance',
    );
  else {
    const how = {
      measured: detection.distanceSource
        ? `given by a person (${detection.distanceSource})`
        : 'measured, from the table',
      flow: `from the flow model at ${kms(distance.velocityUsedKms)}`,
      hubble: `from the Hubble law at ${kms(distance.velocityUsedKms)}`,
    }[distance.kind];
    say('distance', `Distance ${mpcWithError(distance.luminosityMpc, distance.errorMpc)}, ${how}.`, 'distance');
    for (const caution of distance.cautions) say('distance', `Caution: ${caution}.`, 'distance');
  }
  say(
    'data',
    `Position error ${arcsec(detection.error.majorArcsec)} (one-dimensional), ${detection.errorSource}; search radius ${arcsec(detection.searchArcsec)}, ${detection.searchSource}.`,
    'position',
  );
  say('data', `Prior share with a galaxy of stars: ${probability(prior)}, ${priorSource}.`, 'prior');
  if (Number.isNaN(reliability))
    say('data', 'No reliability of the line is given: it is taken as real.', 'reliability');
  if (!(detection.fluxJyKms > 0))
    say(
      'data',
      'No HI flux above zero is given: the expected counterpart is known only roughly, and no mass is stated.',
      'expected',
    );
  if (!(detection.width50Kms > 0) && Number.isFinite(detection.czKms))
    say(
      'data',
      'No line width is given: galaxies within 150 km/s count as inside the line, and interference is tested at the line centre only.',
      'confusion',
    );
  if (Number.isNaN(detection.signalToNoise) && Number.isNaN(reliability))
    say('data', 'No signal-to-noise ratio is given: a spurious line cannot be tested.', 'reliability');
  if (Number.isNaN(detection.ebvMag)) say('data', 'No reddening is given: extinction is taken as zero.', 'extinction');
  else if (detection.ebvSource !== '')
    say(
      'data',
      `The detection gives no reddening: E(B-V) ${detection.ebvMag.toFixed(2)} mag is the median of the rows of ${detection.ebvSource} within 10 arcmin.`,
      'extinction',
    );
  if (velocity.clusteredFraction >= DENSE_PLACE)
    say(
      'data',
      `A dense place: ${percent(velocity.clusteredFraction)} of the redshifts about it share the velocity of the gas, so that one that does says less.`,
      'velocity',
    );
  const absurd = candidates.filter(
    ({ czKms, usableCzKms }) => Number.isNaN(usableCzKms) && Number.isFinite(czKms),
  ).length;
  if (absurd > 0)
    say(
      'data',
      `${absurd} redshift${absurd > 1 ? 's' : ''} above 0.3 or below -0.01 ${absurd > 1 ? 'are' : 'is'} ignored as nonsense for so near a detection.`,
      'velocity',
    );
  return grounds;
}

const SERIOUS_WORDS: Record<string, string> = {
  'spurious line': 'the line is to be confirmed',
  cloud: 'a cloud of the Galaxy is not excluded',
  debris: 'debris likely',
  hydroxyl: 'a hydroxyl line is not excluded',
  'recombination line': 'a recombination line is not excluded',
  interference: 'interference is not excluded',
  blend: 'a blend is likely',
  sidelobe: 'a sidelobe is likely',
  continuum: 'a continuum ripple is not excluded',
  edge: 'at the edge of coverage',
  distance: 'no reliable distance',
};

function contestedWords({ best, claims }: StarlightAssessment): string {
  if (best?.discordant) return 'the likeliest host has another velocity';
  if (claims.some(({ here, there, alone }) => there > here && alone >= 0.5)) {
    return 'the likeliest host is claimed by another detection';
  }
  return 'several possible hosts, none dominating';
}

/** The headline with its qualification. */
export function headlineOf(assessment: StarlightAssessment, doubts: readonly Doubt[]): string {
  const name = assessment.dominating
    ? rowName(assessment.dominating.face.catalogue, assessment.dominating.face.index)
    : '';
  const said = {
    dark: 'no starlight found',
    'nearly dark': `very little starlight for so much gas: ${name}`,
    starlit: `starlight found: ${name}`,
    contested: contestedWords(assessment),
    confused: `${assessment.inBeam.length} galaxies at this velocity in the beam`,
    'cannot tell': 'starlight cannot be told here',
  }[assessment.starlight];
  const serious = doubts.filter(({ grade }) => grade === 'serious').map(({ name: doubt }) => SERIOUS_WORDS[doubt]);
  return [said, ...serious.filter((word) => word !== undefined)].join('; ');
}
