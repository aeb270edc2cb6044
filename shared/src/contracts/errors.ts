/** Every error the service answers with on purpose: one stable code, one status, one title (RFC 9457). */
export const ERROR_CATALOGUE = {
  VALIDATION_FAILED: { status: 400, title: 'The request does not have the expected shape' },
  TABLE_UNREADABLE: { status: 422, title: 'The file could not be read as a table' },
  OBSERVATION_UNREADABLE: { status: 422, title: 'The file could not be read as an image or a spectrum' },
  OBSERVATION_ELSEWHERE: { status: 422, title: 'The file shows no detection it could go with' },
  SETTINGS_INCOMPLETE: { status: 422, title: 'The settings do not fit the table' },
  NOTHING_TO_PUBLISH: { status: 422, title: 'No row of the table can be used' },
  SELECTS_EVERYTHING: { status: 422, title: 'The criteria select too much of the sky' },
  NO_DETECTIONS: { status: 422, title: 'The survey has no published HI detections' },
  SIGN_IN_FAILED: { status: 401, title: 'E-mail or password is wrong' },
  NOT_SIGNED_IN: { status: 401, title: 'Sign in first' },
  TOKEN_EXPIRED: { status: 401, title: 'The session has ended; sign in again' },
  CSRF_MISMATCH: { status: 403, title: 'The request did not come from this application' },
  NOT_ALLOWED: { status: 403, title: 'Your role does not allow this' },
  NOT_FOUND: { status: 404, title: 'There is no such thing here' },
  CONFLICT: { status: 409, title: 'Something else already has this place' },
  IN_USE: { status: 409, title: 'It is in use and cannot be removed' },
  NOT_READY: { status: 409, title: 'It is not ready for this yet' },
  CHANGED_MEANWHILE: { status: 412, title: 'It was changed by someone else meanwhile' },
  TOO_LARGE: { status: 413, title: 'The file is larger than this installation accepts' },
  TOO_MANY_REQUESTS: { status: 429, title: 'Too many requests; wait a moment' },
  RUN_FAILED: { status: 500, title: 'The scoring could not be finished' },
  ARCHIVE_CHANGED: { status: 422, title: 'The archive is not what was frozen' },
  LINK_EXPIRED: { status: 410, title: 'The link has expired or was revoked' },
  STARTING: { status: 503, title: 'Eremite is still starting; try again in a moment' },
  INTERNAL: { status: 500, title: 'Something went wrong here' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ErrorCode = keyof typeof ERROR_CATALOGUE;

/** The stable URN of an error, as sent in `type`. */
export function errorType(code: ErrorCode): string {
  return `urn:eremite:error:${code.toLowerCase().replaceAll('_', '-')}`;
}
