import { ERROR_CATALOGUE, errorType, type ErrorCode } from '@eremite/shared/contracts/errors';
import { problem, type Problem } from '@eremite/shared/contracts/problem';

/** An answer that was refused on purpose (RFC 9457), or a request that never reached the service. */
export class ApiError extends Error {
  constructor(
    readonly status: number,
    readonly code: ErrorCode | 'UNREACHABLE',
    readonly problem: Problem,
  ) {
    super(problem.detail ?? problem.title);
    this.name = 'ApiError';
  }

  /** Fault of one field by its JSON pointer, for showing beside the field. */
  fault(pointer: string): string | undefined {
    return this.problem.errors?.find((entry) => entry.pointer === pointer)?.detail;
  }
}

const CODES = Object.keys(ERROR_CATALOGUE) as ErrorCode[];

/** Reads an error answer; one that is no problem document becomes INTERNAL with its status. */
export async function toApiError(answer: Response): Promise<ApiError> {
  const body: unknown = await answer.json().catch(() => undefined);
  const read = problem.safeParse(body);
  const facts: Problem = read.success
    ? read.data
    : { type: errorType('INTERNAL'), title: `The service answered ${answer.status}`, status: answer.status };
  const code = CODES.find((known) => errorType(known) === facts.type) ?? 'INTERNAL';
  return new ApiError(answer.status, code, facts);
}

export function unreachable(): ApiError {
  const title = 'The service cannot be reached';
  const detail = 'The service cannot be reached. Check the connection; nothing was changed.';
  return new ApiError(0, 'UNREACHABLE', { type: 'about:blank', title, status: 0, detail });
}

/** Whether the session has ended or never began. */
export const isSignedOut = (error: unknown): boolean => error instanceof ApiError && error.status === 401;
