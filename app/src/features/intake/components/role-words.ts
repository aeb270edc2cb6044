/** How a column's role is called on the screen. */
export const ROLE_WORDS: Record<string, string> = {
  name: 'name',
  ra: 'right ascension',
  dec: 'declination',
  positionError: 'position error',
  velocity: 'velocity',
  velocityError: 'velocity error',
  redshift: 'redshift',
  redshiftError: 'redshift error',
  frequency: 'frequency',
  width50: 'line width W50',
  width20: 'line width W20',
  flux: 'HI flux',
  fluxError: 'HI flux error',
  signalToNoise: 'signal to noise',
  reliability: 'reliability',
  distance: 'distance',
  distanceError: 'distance error',
  effectiveRadius: 'effective radius',
  axisRatio: 'axis ratio',
  positionAngle: 'position angle',
  starGalaxy: 'star or galaxy',
  redshiftQuality: 'redshift quality',
  reddening: 'reddening E(B−V)',
  properMotion: 'proper motion',
  properMotionRa: 'proper motion, RA',
  properMotionDec: 'proper motion, Dec',
  continuumFlux: 'continuum flux',
  beamMajor: 'beam, major axis',
  beamMinor: 'beam, minor axis',
  raHours: 'RA, hours',
  raMinutes: 'RA, minutes',
  raSeconds: 'RA, seconds',
  decSign: 'Dec, sign',
  decDegrees: 'Dec, degrees',
  decMinutes: 'Dec, minutes',
  decSeconds: 'Dec, seconds',
  memberCount: 'number of members',
  velocityDispersion: 'velocity dispersion',
  groupRadius: 'group radius',
  groupMass: 'group mass',
};

export const MAGNITUDE_ROLES: Record<string, string> = {
  magnitude: 'magnitude in band',
  magnitudeError: 'magnitude error in band',
  magnitudeLimit: 'upper-limit flag in band',
};

export const KIND_WORDS = {
  hi: 'HI detections',
  optical: 'optical',
  infrared: 'infrared',
  ultraviolet: 'ultraviolet',
  continuum: 'radio continuum',
  stars: 'bright stars (masks)',
  groups: 'groups and clusters',
} as const;

/** What a kind of table is for, where its name does not say it. */
export const KIND_HELP: Partial<Record<keyof typeof KIND_WORDS, string>> = {
  stars: 'Each star hides a patch of sky that grows with its brightness: what lies there counts as not seen.',
  groups: 'Positions and velocities of groups and clusters, for the surroundings.',
  continuum: 'Radio sources, for hydroxyl and continuum doubts.',
};
