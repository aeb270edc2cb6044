/** The product's own words, exactly as shown and exported. */
export const STARLIGHT_VERDICTS = ['dark', 'nearly dark', 'starlit', 'contested', 'confused', 'cannot tell'] as const;
export type StarlightVerdict = (typeof STARLIGHT_VERDICTS)[number];

export const SURROUNDINGS_VERDICTS = ['alone', 'accompanied', 'in a group', 'in a cluster', 'cannot tell'] as const;
export type SurroundingsVerdict = (typeof SURROUNDINGS_VERDICTS)[number];

export const DOUBT_GRADES = ['clear', 'watch', 'serious', 'not testable here'] as const;
export type DoubtGrade = (typeof DOUBT_GRADES)[number];

export const CATALOGUE_KINDS = ['hi', 'optical', 'infrared', 'ultraviolet', 'continuum', 'stars', 'groups'] as const;
export type CatalogueKind = (typeof CATALOGUE_KINDS)[number];

export const TEAM_ROLES = ['lead', 'reviewer', 'observer'] as const;
export type TeamRole = (typeof TEAM_ROLES)[number];

/** Said on every screen and in every export that carries a verdict. */
export const SCREENING_CAUTION =
  'A verdict is a screening result, not a discovery: confirm with deep imaging and spectroscopy.';
