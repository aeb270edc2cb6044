import { type CanActivate, type ExecutionContext, Injectable } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { AppError } from '../../common/app-error.ts';
import { IS_PUBLIC, type SignedInRequest } from '../../common/signed-in-user.ts';
import { CSRF_HEADER } from './cookies.ts';
import { CsrfTokens } from './csrf.ts';
import { bearerOf, RequestUser } from './request-user.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Signs every request in, by cookie or bearer token, before anything else looks at it. */
@Injectable()
export class AuthGuard implements CanActivate {
  constructor(
    private readonly reflector: Reflector,
    private readonly users: RequestUser,
    private readonly csrf: CsrfTokens,
  ) {}

  async canActivate(context: ExecutionContext): Promise<boolean> {
    if (this.reflector.getAllAndOverride<boolean>(IS_PUBLIC, [context.getHandler(), context.getClass()])) return true;
    const request = context.switchToHttp().getRequest<SignedInRequest>();
    const user = await this.users.of(request);
    if (!SAFE.has(request.method)) {
      // A bearer token is never sent by itself, so only cookies need the echo.
      if (bearerOf(request) === undefined && !this.csrf.fits(user.sessionId ?? '', request.get(CSRF_HEADER))) {
        throw new AppError('CSRF_MISMATCH', 'Echo the cookie csrf in the header X-CSRF-Token.');
      }
      if (user.scope === 'read') throw new AppError('NOT_ALLOWED', 'This token may only read.');
    }
    request.user = user;
    return true;
  }
}
