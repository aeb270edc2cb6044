import { type ExecutionContext, Injectable } from '@nestjs/common';
import { ThrottlerGuard } from '@nestjs/throttler';
import { AppError } from './app-error.ts';
import type { SignedInRequest } from './signed-in-user.ts';

/** Requests a minute: for an account, and for an address that is not signed in. */
export const SIGNED_IN_PER_MINUTE = 3000;
export const ANONYMOUS_PER_MINUTE = 600;

/** Counts by account where there is one, else by address. Runs after the request is signed in. */
@Injectable()
export class ThrottleGuard extends ThrottlerGuard {
  protected override getTracker(request: Record<string, unknown>): Promise<string> {
    const { user, ip } = request as unknown as SignedInRequest;
    return Promise.resolve(user ? `account ${user.id}` : `address ${ip}`);
  }

  /** One count over all routes. */
  protected override generateKey(_context: ExecutionContext, tracker: string, name: string): string {
    return `${name} ${tracker}`;
  }

  protected override throwThrottlingException(): Promise<void> {
    throw new AppError('TOO_MANY_REQUESTS');
  }
}

/** Limit for `@nestjs/throttler`, which asks with the context of the request. */
export function requestLimit(context: ExecutionContext): number {
  return context.switchToHttp().getRequest<SignedInRequest>().user ? SIGNED_IN_PER_MINUTE : ANONYMOUS_PER_MINUTE;
}
