import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { Ground } from '@eremite/shared/contracts/verdict';
import { mahalanobisSquared } from '@eremite/shared/science/counterpart/position-error';
import { numberRole } from '../tiles/role-table.ts';
import { isInPieces, type StarlightAssessment } from './assess.ts';
import { arcsec, kms, mag, percent, powerFigure, probability, probabilityUnder, ratio, signedKms } from './figures.ts';
import { rowName } from './prepared-catalogue.ts';
import type { WeighedObject } from './weighed-object.ts';

type Weight = Ground['weight'];
/** Objects less probable than this are not spoken of. */
const WORTH_SAYING = 0.02;

export const nameOf = ({ face }: WeighedObject): string =>
  `${rowName(face.catalogue, face.index)} (${face.catalogue.input.name})`;

/** Why the starlight verdict is what it is: the strongest contrary evidence first. */
export function starlightGrounds(assessment: StarlightAssessment, criteria: CriteriaSettings): Ground[] {
  const against: Ground[] = [];
  const support: Ground[] = [];
  const notes: Ground[] = [];
  const say = (weight: Weight, text: string, method: string | null = null) => {
    const list = weight === 'against' ? against : weight === 'for' ? support : notes;
    list.push({ about: 'starlight', weight, text, method });
  };
  const { starlight, accepted, best, dominating, probabilities, silence } = assessment;
  if (accepted) {
    const override = accepted.rows.find((row) => row.override === 'accept');
    say('for', `${nameOf(accepted)} was accepted as the counterpart by a person; the probabilities are set by that.`);
    if (override && accepted.discordant) say('against', discordance(assessment, accepted));
  }
  for (const object of assessment.objects) {
    if (object.override === 'reject') say('note', `${nameOf(object)} was rejected by a person and left out.`);
  }
  if (!accepted) discordantFirst(assessment, say);
  sayClaims(assessment, say);
  if (starlight === 'confused') sayConfused(assessment, say);
  if (starlight === 'contested') sayContested(assessment, say);
  if (dominating) sayDominating(assessment, dominating, criteria, say);
  if (starlight === 'dark') {
    sayOthers(assessment, say);
    say(
      'against',
      `A galaxy of stars may still have been missed with probability ${probability(probabilities.missed)}.`,
      'absence',
    );
    say('for', powerSentence(assessment), 'absence');
  }
  sayPieces(assessment, criteria, say);
  if (starlight === 'cannot tell') sayCannotTell(assessment, criteria, say);
  if (starlight !== 'dark' && starlight !== 'cannot tell') {
    if (silence.power === null) say('note', untested(assessment), 'absence');
    else say('note', powerSentence(assessment), 'absence');
  }
  if (!best && assessment.candidates.length === 0) {
    say('note', `No catalogue row lies within the search radius of ${arcsec(assessment.detection.searchArcsec)}.`);
  }
  const stars = assessment.objects.filter(({ isStar }) => isStar).length;
  if (stars > 0) say('note', `${stars} object${stars > 1 ? 's are stars' : ' is a star'} by the tables and left out.`);
  return [...against, ...support, ...notes];
}

type Say = (weight: Weight, text: string, method?: string | null) => void;

function discordance({ detection }: StarlightAssessment, object: WeighedObject): string {
  const row = object.rows.find(({ usableCzKms }) => !Number.isNaN(usableCzKms)) ?? object.head;
  const quality = numberRole(row.catalogue.input.roles, 'redshiftQuality')?.[row.index] ?? NaN;
  const says = Number.isNaN(quality)
    ? 'the quality of its redshift is not given'
    : `the quality of its redshift is ${quality}`;
  return (
    `${nameOf(object)} lies ${arcsec(object.head.separationArcsec)} away, but its velocity of ${kms(object.czKms)} differs by ` +
    `${signedKms(object.velocityDifferenceKms)} from that of the gas (${kms(detection.czKms)}); ${says}`
  );
}

/** An object that place and magnitude alone would have made the counterpart is told of first, with its redshift. */
function discordantFirst(assessment: StarlightAssessment, say: Say): void {
  const { objects, prior, silence, probabilities } = assessment;
  const rest = 1 - prior + prior * (1 - (silence.power ?? 0));
  objects.forEach((object, j) => {
    if (!object.discordant || object.weight === 0) return;
    const without = prior * object.positionFactor * object.magnitudeFactor;
    if (without < rest) return;
    say(
      'against',
      `${discordance(assessment, object)}. By place and magnitude it would be the counterpart; with a bad redshift allowed for, its probability is ${probability(probabilities.objects[j]!)}.`,
      'counterpart',
    );
  });
}

/** Whether faint objects crowd where no galaxy is seen. */
function sayPieces(assessment: StarlightAssessment, criteria: CriteriaSettings, say: Say): void {
  const { pieces } = assessment;
  if (!pieces) return;
  const { count, radiusArcsec, expected, chance, catalogue, band, magnitude } = pieces;
  const objects = `${catalogue} holds ${count} faint object${count === 1 ? '' : 's'} within ${arcsec(radiusArcsec)} where ${expected.toFixed(1)} are expected of the ring about it`;
  if (isInPieces(assessment, criteria))
    say(
      'for',
      `A galaxy may be there in pieces: ${objects} (chance ${probability(chance)}); together ${band} = ${mag(magnitude)}. Look at the image.`,
      'absence',
    );
  else say(assessment.starlight === 'dark' ? 'for' : 'note', `No crowd of faint pieces: ${objects}.`, 'absence');
}

/** Galaxies that other detections claim too, those lost first. */
function sayClaims({ claims, detection }: StarlightAssessment, say: Say): void {
  const ranked = [...claims].sort((a, b) => b.there - b.here - (a.there - a.here));
  for (const { object, by, separationArcsec, alone, here, there } of ranked.slice(0, 3)) {
    const differs = (by.czKms - detection.czKms) / (1 + detection.redshift);
    const velocity = Number.isFinite(differs) ? ` and ${signedKms(differs)}` : '';
    const tail = there > here ? ' This gas may be a tail or a cloud of it.' : '';
    say(
      there > here ? 'against' : 'note',
      `${nameOf(object)} is claimed by ${by.name} too, ${arcsec(separationArcsec)}${velocity} away. Solved together, one galaxy to one detection, its probability is ${probability(here)} here (${probability(alone)} by itself) and ${probability(there)} there.${tail}`,
      'counterpart',
    );
  }
}

function describe(assessment: StarlightAssessment, object: WeighedObject): string {
  const parts = [`${arcsec(object.head.separationArcsec)} from the HI position`];
  if (object.band) {
    const expected = assessment.expectations.in(object.band);
    const wanted =
      expected && Number.isFinite(assessment.detection.fluxJyKms)
        ? ` where ${mag(expected.magnitude)} +/- ${mag(expected.scatterMag)} is expected of this much gas`
        : '';
    parts.push(`${object.band.name} = ${mag(object.magnitude)}${wanted}`);
  }
  parts.push(
    Number.isNaN(object.velocityDifferenceKms)
      ? 'no usable velocity'
      : `at ${signedKms(object.velocityDifferenceKms)} from the gas`,
  );
  return `${nameOf(object)}: ${parts.join(', ')}`;
}

function sayOthers(assessment: StarlightAssessment, say: Say, except: WeighedObject | null = null): void {
  const ranked = assessment.objects
    .map((object, j) => ({ object, p: assessment.probabilities.objects[j]! }))
    .filter(({ object, p }) => p >= WORTH_SAYING && object !== except && !object.discordant)
    .sort((a, b) => b.p - a.p);
  for (const { object, p } of ranked.slice(0, 3)) {
    say('against', `${describe(assessment, object)}; probability ${probability(p)}.`, 'counterpart');
  }
}

function sayDominating(
  assessment: StarlightAssessment,
  object: WeighedObject,
  criteria: CriteriaSettings,
  say: Say,
): void {
  const { detection, probabilities, starlight, gasToLight, silence } = assessment;
  const p = probabilities.objects[assessment.objects.indexOf(object)]!;
  const offset = mahalanobisSquared(detection.covariance, object.head.eastArcsec, object.head.northArcsec);
  const beyond = Math.exp(-0.5 * offset);
  if (beyond < 0.05) {
    say(
      'against',
      `Only ${percent(beyond)} of true counterparts lie further from the HI position in units of its core error.`,
      'position',
    );
  }
  if (gasToLight > criteria.counterpart.nearlyDarkRatio) {
    const weight = starlight === 'starlit' ? 'against' : 'for';
    say(
      weight,
      `With ${ratio(gasToLight)} solar masses of HI per solar luminosity in r it is far richer in gas than ordinary dwarfs (limit ${criteria.counterpart.nearlyDarkRatio}).`,
      'gas-to-light',
    );
    if (starlight === 'cannot tell') {
      say(
        'against',
        `So much gas for so little light may mean that the true counterpart was not seen: the power is ${powerWords(silence.power)}, under the ${criteria.absence.minimumPower} asked for.`,
        'absence',
      );
    }
  }
  sayOthers(assessment, say, object);
  if (probabilities.none >= WORTH_SAYING)
    say('against', `P(none) is ${probability(probabilities.none)}.`, 'counterpart');
  say('for', `${describe(assessment, object)}; probability ${probability(p)}.`, 'counterpart');
}

function sayConfused({ inBeam, detection }: StarlightAssessment, say: Say): void {
  const list = inBeam.map(
    ({ object, share }) => `${nameOf(object)} at ${signedKms(object.velocityDifferenceKms)} with ${percent(share)}`,
  );
  say(
    'for',
    `${inBeam.length} galaxies at the velocity of the gas lie inside the beam of ${arcsec(detection.beam!.major)}, with these shares of the flux to be expected: ${list.join('; ')}. Higher resolution must say which has the gas.`,
    'confusion',
  );
}

function sayContested(assessment: StarlightAssessment, say: Say): void {
  const together = assessment.probabilities.objects.reduce((sum, p) => sum + p, 0);
  sayOthers(assessment, say);
  say(
    'for',
    `Objects together have a probability of ${probability(together)}, but none of them may be taken for the counterpart.`,
    'counterpart',
  );
}

const powerWords = (power: number | null): string => (power === null ? 'unknown' : powerFigure(power));

function powerSentence({ silence, detection }: StarlightAssessment): string {
  const { best } = silence;
  if (!best) return 'No band can be tested here.';
  const depth = best.band.depth5Sigma === null ? '' : `, which reaches ${mag(best.band.depth5Sigma)} for point sources`;
  const gas = Number.isNaN(detection.logHiMass)
    ? 'an ordinary galaxy'
    : `an ordinary galaxy with this much gas (log M_HI ${detection.logHiMass.toFixed(2)})`;
  const expected = best.expected
    ? `, expected at ${mag(best.expected.magnitude)} +/- ${mag(best.expected.scatterMag)}`
    : '';
  return `The chance that ${gas}${expected}, would have been seen in ${best.band.name} of ${best.catalogue.input.name}${depth}, is ${powerWords(best.completeness)}: the power of this silence.`;
}

function untested({ silence }: StarlightAssessment): string {
  const reasons = [...new Set(silence.bands.map(({ reason }) => reason).filter((reason) => reason !== ''))];
  return reasons.length === 0
    ? 'No catalogue with magnitudes can be tested here.'
    : `The silence of the catalogues cannot be tested: ${reasons.slice(0, 3).join('; ')}.`;
}

function sayCannotTell(assessment: StarlightAssessment, criteria: CriteriaSettings, say: Say): void {
  const { probabilities, silence, dominating } = assessment;
  const { none, missed, spurious } = probabilities;
  const { absence } = criteria;
  if (dominating) return;
  sayOthers(assessment, say);
  if (silence.power === null) say('for', untested(assessment), 'absence');
  else if (silence.power < absence.minimumPower) {
    const best = silence.best!;
    const why =
      best.reason ||
      (best.covered !== null && best.covered < 0.999
        ? `only ${percent(best.covered)} of the search circle is covered`
        : best.unmasked < 0.999
          ? `a bright star or a large galaxy hides ${percent(1 - best.unmasked)} of the place`
          : `such a galaxy would be detected with probability ${probability(best.detected ?? 0)} in ${best.band.name} of ${best.catalogue.input.name}`);
    say(
      'for',
      `The power is ${powerWords(silence.power)}, under the ${absence.minimumPower} that "dark" asks for: ${why}.`,
      'absence',
    );
    say('note', powerSentence(assessment), 'absence');
  } else say('note', powerSentence(assessment), 'absence');
  if (none < absence.darkProbability) {
    say(
      'for',
      `P(none) is ${probabilityUnder(none, absence.darkProbability)}, under ${absence.darkProbability}; P(missed) is ${probability(missed)}, P(spurious) ${probability(spurious)}.`,
      'absence',
    );
  } else if (none + missed < absence.noneOrMissedProbability) {
    say(
      'for',
      `P(none) + P(missed) is ${probabilityUnder(none + missed, absence.noneOrMissedProbability)}, under ${absence.noneOrMissedProbability}.`,
      'absence',
    );
  }
}
