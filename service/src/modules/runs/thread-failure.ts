import { AppError } from '../../common/app-error.ts';
import { DomainError } from '@eremite/shared/science/domain-error';
import { DamagedTableError } from './packed-input.ts';
import type { ThreadFailure } from './run-messages.ts';

/** An error of a thread as it can be sent out of it. */
export function failureOf(error: unknown): ThreadFailure {
  const { message, stack } = error instanceof Error ? error : new Error(String(error));
  const told = error instanceof DamagedTableError || error instanceof DomainError;
  return { message, told, ...(stack !== undefined && { stack }) };
}

/** The error that a failed thread stands for; the inside goes to the log only, as its cause. */
export function errorOf({ message, stack, told }: ThreadFailure): AppError {
  const detail = told
    ? message
    : 'Scoring stopped with a fault of its own, which is in the log of the service. The tables and earlier runs are as they were.';
  return Object.assign(new AppError('RUN_FAILED', detail), { cause: Object.assign(new Error(message), { stack }) });
}
