import { ERROR_CATALOGUE, type ErrorCode } from '@eremite/shared/contracts/errors';

export interface FaultyInput {
  /** JSON pointer into the request. */
  pointer: string;
  detail: string;
}

/** The one error services throw on purpose: its code fixes status and title, `detail` says what is wrong and how to mend it. */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly status: number;
  readonly title: string;

  constructor(
    readonly code: ErrorCode,
    readonly detail?: string,
    readonly errors?: readonly FaultyInput[],
    /** The present state, for 412 and 409 answers. */
    readonly current?: unknown,
  ) {
    super(detail ?? ERROR_CATALOGUE[code].title);
    this.status = ERROR_CATALOGUE[code].status;
    this.title = ERROR_CATALOGUE[code].title;
  }
}
