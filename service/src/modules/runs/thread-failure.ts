import { DomainError } from '@eremite/shared/science/domain-error';
import { AppError } from '../../common/app-error.ts';
import { HitLimitError } from '../../matching/hit-limit.ts';
import { DamagedTableError } from './packed-input.ts';
import type { ThreadFailure } from './run-messages.ts';

/** An error of a thread as it can be sent out of it. */
export function failureOf(error: unknown): ThreadFailure {
  const { message, stack } = error instanceof Error ? error : new Error(String(error));
  return { message, cause: causeOf(error), ...(stack !== undefined && { stack }) };
}

function causeOf(error: unknown): ThreadFailure['cause'] {
  if (error instanceof HitLimitError) return 'too much';
  return error instanceof DamagedTableError || error instanceof DomainError ? 'told' : 'inside';
}

/** The error that a failed thread stands for; the inside goes to the log only, as its cause. */
export function errorOf({ message, stack, cause }: ThreadFailure): AppError {
  const inside =
    'Scoring stopped with a fault of its own, which is in the log of the service. The tables and earlier runs are as they were.';
  const error =
    cause === 'too much'
      ? new AppError('SELECTS_EVERYTHING', message)
      : new AppError('RUN_FAILED', cause === 'told' ? message : inside);
  return Object.assign(error, { cause: Object.assign(new Error(message), { stack }) });
}
