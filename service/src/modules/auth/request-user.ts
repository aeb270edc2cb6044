import { Injectable } from '@nestjs/common';
import type { Request } from 'express';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { AccessTokens } from './access-token.ts';
import { AuthRepository } from './auth.repository.ts';
import { ACCESS_COOKIE, cookieOf } from './cookies.ts';
import { TOKEN_PREFIX, TokensService } from './tokens.service.ts';

/** The bearer token of a request, if it brings one. */
export function bearerOf(request: Request): string | undefined {
  return /^Bearer +(\S+)$/i.exec(request.headers.authorization ?? '')?.[1];
}

/** Finds out who makes a request. */
@Injectable()
export class RequestUser {
  constructor(
    private readonly access: AccessTokens,
    private readonly accounts: AuthRepository,
    private readonly tokens: TokensService,
  ) {}

  /** @throws {AppError} NOT_SIGNED_IN or TOKEN_EXPIRED */
  async of(request: Request): Promise<SignedInUser> {
    const token = bearerOf(request) ?? cookieOf(request, ACCESS_COOKIE);
    if (!token) throw new AppError('NOT_SIGNED_IN');
    return token.startsWith(TOKEN_PREFIX) ? this.tokens.signedIn(token) : this.#bySession(token);
  }

  async #bySession(token: string): Promise<SignedInUser> {
    const { userId, sessionId } = this.access.verify(token);
    const session = await this.accounts.userOfSession(sessionId);
    if (!session || session.user.id !== userId || session.user.disabledAt) throw new AppError('TOKEN_EXPIRED');
    const { id, email, name, isAdministrator } = session.user;
    return { id, email, name, isAdministrator, scope: 'write', sessionId };
  }
}
