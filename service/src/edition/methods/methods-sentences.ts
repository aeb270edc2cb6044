import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import { DEFAULT_GAS_STAR_RELATION } from '@eremite/shared/science/hydrogen/gas-relation';
import type { EditionHead } from '../edition-head.ts';
import type { ReferenceKey } from './references.ts';

/** A sentence of the methods paragraph and the works it cites. */
export interface Sentence {
  text: string;
  cites: readonly ReferenceKey[];
}

const say = (text: string, ...cites: ReferenceKey[]): Sentence => ({ text, cites });
const perCent = (share: number): string => `${Number((share * 100).toPrecision(4))} per cent`;

/**
 * The methods paragraph of an edition: what was done to its tables, with the figures it was done with. Units stand as in
 * running text; every remaining setting is in `allParameters`.
 */
export function methodsSentences(head: EditionHead, entries: number): Sentence[] {
  const { criteria, run } = head;
  const { counterpart, absence, robustness, control } = criteria.settings;
  const { settings } = criteria;
  return [
    ...inputSentences(head),
    ...distanceSentences(head),
    ...positionSentences(settings),
    say(
      'Every object inside the search was given an exclusive probability of being the counterpart from its offset, magnitude and velocity, with the hypothesis of none among them',
      'sutherland1992',
      'budavari2008',
    ),
    say('Separations are by the formula of Vincenty on the sphere', 'vincenty1975'),
    say('The chance that an unrelated object as bright lies as near is corrected Poisson', 'downes1986'),
    say(
      counterpart.learnPrior
        ? `The prior share of detections with a counterpart, ${counterpart.priorFraction}, was refined on the run itself in bins of HI mass`
        : `The prior share of detections with a counterpart was ${counterpart.priorFraction}`,
    ),
    say(
      `The ordinary counterpart of a detection was expected from its gas: log M* = ${counterpart.relationIntercept} + ${counterpart.relationSlope} (log M_HI - ${DEFAULT_GAS_STAR_RELATION.pivotLogHi}), with a scatter of ${counterpart.relationScatterMag} mag, unless the run had enough secure counterparts to fit it anew`,
    ),
    say(
      `A detection is called dark where P(none) is at least ${absence.darkProbability}, P(none) and P(missed) together at least ${absence.noneOrMissedProbability}, and an ordinary counterpart would have been seen with a power of at least ${absence.minimumPower}`,
    ),
    say(
      `Depths for extended sources follow from the point-source depths for effective radii of ${absence.effectiveRadiiArcsec.join(', ')} arcsec, with a penalty of ${absence.depthPenaltyMag} mag`,
      'graham2005',
    ),
    say('Luminosities are in solar units of each band', 'willmer2018'),
    say(
      `Galactic extinction was taken from the reddening of the tables; silence behind E(B-V) above ${absence.maximumReddeningMag} mag or within ${absence.minimumLatitudeDeg} deg of the Galactic plane says nothing`,
      'schlafly2011',
    ),
    ...surroundingsSentences(settings),
    ...doubtSentences(settings),
    ...(robustness.draws > 0
      ? [
          say(
            `Distances, depths, flux scale, error model and prior were drawn ${robustness.draws} times from their errors (seed ${robustness.seed}); the stability of a verdict is the share of draws in which it stands, with its Wilson interval`,
            'wilson1927',
          ),
        ]
      : []),
    ...controlSentences(control.offsetsPerSource, run.control),
    say(
      `Every source of this list of ${entries} was looked at and settled by the lead of the team, whose word stands beside the computed verdict`,
    ),
    say(SCREENING_CAUTION.replace(/\.$/, '')),
  ];
}

function inputSentences({ survey, number, run, criteria, inputs, software }: EditionHead): Sentence[] {
  const named = (input: EditionHead['inputs'][number]): string => {
    const reference = input.reference ? `; ${input.reference.trim().replace(/\.$/, '')}` : '';
    return `${input.name} (${input.kind}, ${input.rows} rows, sha256 ${input.sha256.slice(0, 12)}${reference})`;
  };
  const lists = inputs.filter(({ kind }) => kind === 'hi').map(named);
  const others = inputs.filter(({ kind }) => kind !== 'hi').map(named);
  return [
    say(
      `We screened the ${run.detections} HI detections of ${survey.name}, from ${lists.join(' and ')}, for stellar counterparts and neighbours with Eremite ${software.version} (${run.scoringVersion}; edition ${number}, run ${run.number}, criteria ${criteria.number}, input hash ${run.inputHash.slice(0, 12)})`,
    ),
    others.length > 0 ? say(`The comparison tables were ${others.join(', ')}`) : say('No comparison table was used'),
  ];
}

function distanceSentences({ survey, criteria }: EditionHead): Sentence[] {
  const { distance } = criteria.settings;
  const { h0, omegaM } = survey.cosmology;
  const frames = {
    km96: ['the Local Group frame', 'karachentsev1996'],
    yts77: ['the Local Group frame', 'yahil1977'],
    cmb: ['the frame of the microwave background'],
  } as const;
  const [frame, ...cites] = frames[distance.hubbleFrame];
  const flow =
    distance.flowModel === 'mould2000' ? [say('They were corrected for infall to three attractors', 'mould2000')] : [];
  return [
    say(
      `Distances are the measured ones where they are given, else those of the Hubble law in ${frame} (H0 = ${h0} km/s/Mpc, Omega_m = ${omegaM}, flat); below ${distance.minimumVelocityKms} km/s a redshift gives none, and a scatter of ${distance.peculiarVelocityKms} km/s about the flow sets the floor of the error`,
      ...cites,
    ),
    ...flow,
    say('HI masses are M_HI = 2.356e5 D^2 S / (1+z)^2 solar masses', 'meyer2017'),
  ];
}

function positionSentences({ position }: EditionHead['criteria']['settings']): Sentence[] {
  const systematic =
    position.systematicArcsec === null
      ? 'a systematic term that goes by the beam'
      : `a systematic term of ${position.systematicArcsec} arcsec`;
  const search =
    position.searchRadiusArcsec === null
      ? `The search holds ${perCent(position.searchProbability)} of true offsets`
      : `The search has a fixed radius of ${position.searchRadiusArcsec} arcsec`;
  return [
    say(
      `The one-dimensional position error of a detection, where the list gives none, is ${position.centroidFactor} FWHM/(S/N) on each axis of the beam with ${systematic} in quadrature; for beams over 1 arcmin ${perCent(position.tailFraction)} of offsets are taken from a wider component of ${position.tailArcsec} arcsec`,
      'condon1997',
      'ivison2007',
    ),
    say(`${search}${position.halfBeamFloor ? ', and for a single dish never falls below half a beam' : ''}`),
  ];
}

function surroundingsSentences({ surroundings }: EditionHead['criteria']['settings']): Sentence[] {
  return [
    say(
      `Neighbours are galaxies brighter than M_r = ${surroundings.faintestNeighbourMag} within ${surroundings.radiusMpc} Mpc projected and ${surroundings.velocityWindowKms} km/s; a detection is called alone where P(no neighbour) is at least ${surroundings.aloneProbability}`,
    ),
    say(
      `Neighbours that the redshift tables could not show are counted by a Schechter function (phi* = ${surroundings.schechterPhiStarH3} h^3 Mpc^-3, M* - 5 log h = ${surroundings.schechterMStarH}, alpha = ${surroundings.schechterAlpha})`,
      'blanton2003',
    ),
  ];
}

function doubtSentences({ doubts }: EditionHead['criteria']['settings']): Sentence[] {
  return [
    say(
      `Debris is a strong doubt within ${doubts.strongDebrisKpc} kpc and ${doubts.strongDebrisKms} km/s of a galaxy that could give this much gas, and a possible one within ${doubts.possibleDebrisKpc} kpc and ${doubts.possibleDebrisKms} km/s`,
    ),
    say(
      `Detections within ${doubts.cloudVelocityKms} km/s of the local standard of rest that deviate by more than ${doubts.deviationVelocityKms} km/s from Galactic rotation may be high-velocity clouds`,
      'wakker1991',
    ),
  ];
}

function controlSentences(offsets: number, control: EditionHead['run']['control']): Sentence[] {
  if (offsets === 0 || control === null) return [];
  const [low, high] = control.chanceInterval;
  return [
    say(
      `At ${control.positionsKept} shifted positions an object would have been accepted in ${control.chanceMatches} cases, ${perCent(control.chanceFraction)} (${perCent(low)} to ${perCent(high)}, 68 per cent Poisson interval)`,
      'gehrels1986',
    ),
  ];
}
