import { SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { fromBarycentric } from '../velocity/frames.ts';
import { type Cosmology, luminosityDistance } from './cosmology.ts';
import { flowVelocity } from './flow-model.ts';

/** One way from a velocity to a distance. */
export interface DistanceBranch {
  /** What it is, in words. */
  readonly name: string;
  readonly kind: 'hubble' | 'flow';
  /** Frame of the Hubble law, where it is one. */
  readonly frame: 'km96' | 'yts77' | 'cmb' | null;
  /** Velocity taken for cosmic, km/s. */
  readonly velocityKms: number;
  /** NaN where the velocity gives none. */
  readonly luminosityMpc: number;
  /** What the flow model adds for each attractor, in words; empty for the Hubble law. */
  readonly note: string;
}

/**
 * Every distance that a velocity may stand for: the Hubble law in three frames, the flow model with its infalls, and the
 * cluster whose cone holds the source. Which is used is decided elsewhere; a reader sees how far they lie apart.
 *
 * @param czKms optical cz, barycentric, km/s
 * @param raRad ICRS, radians
 * @param decRad ICRS, radians
 * @param cosmology flat cosmology
 * @returns the branches, Hubble first; empty without a velocity
 * Source: Mould et al. (2000), ApJ 529, 786, for the flow; frames as in `velocity/frames`.
 *
 * Method: distance.
 */
export function distanceBranches(czKms: number, raRad: number, decRad: number, cosmology: Cosmology): DistanceBranch[] {
  if (!(Math.abs(czKms) < SPEED_OF_LIGHT_KMS)) return [];
  const branch = (
    name: string,
    kind: DistanceBranch['kind'],
    frame: DistanceBranch['frame'],
    velocityKms: number,
    note = '',
  ): DistanceBranch => ({
    name,
    kind,
    frame,
    velocityKms,
    luminosityMpc:
      velocityKms > 0
        ? luminosityDistance(velocityKms / SPEED_OF_LIGHT_KMS, cosmology, czKms / SPEED_OF_LIGHT_KMS)
        : NaN,
    note,
  });
  const hubble = (name: string, frame: 'km96' | 'yts77' | 'cmb') =>
    branch(`Hubble law, ${name}`, 'hubble', frame, fromBarycentric(frame, czKms, raRad, decRad));
  const flow = flowVelocity(czKms, raRad, decRad);
  const infalls = flow.infalls.map(
    ({ attractor, infallKms }) => `${attractor} ${infallKms < 0 ? '\u2212' : '+'}${Math.abs(infallKms).toFixed(0)}`,
  );
  const branches = [
    hubble('Local Group (Karachentsev & Makarov 1996)', 'km96'),
    hubble('Local Group (Yahil et al. 1977)', 'yts77'),
    hubble('microwave background', 'cmb'),
    branch('Flow model, smooth infall', 'flow', null, flow.smoothKms, `${infalls.join(', ')} km/s`),
  ];
  if (flow.collapsedOn) {
    branches.push(
      branch(`Flow model, at ${flow.collapsedOn}`, 'flow', null, flow.cosmicKms, 'inside the cone of the cluster'),
    );
  }
  return branches;
}
