import type { CreateTokenRequest } from '@eremite/shared/contracts/auth';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { AuthRepository } from './auth.repository.ts';
import { randomToken, tokenHash } from './random-token.ts';

/** Tells a personal token from a signed one at a glance, also in a leaked file. */
export const TOKEN_PREFIX = 'eremite_';

/** Personal tokens for scripts. */
@Injectable()
export class TokensService {
  constructor(private readonly accounts: AuthRepository) {}

  async list(user: SignedInUser) {
    return (await this.accounts.tokensOf(user.id)).map(toToken);
  }

  /** The only answer that ever holds the token itself. */
  async create(user: SignedInUser, request: CreateTokenRequest) {
    if (!user.sessionId) throw new AppError('NOT_ALLOWED', 'A personal token cannot make another; sign in.');
    const token = TOKEN_PREFIX + randomToken();
    const row = await this.accounts.insertToken({
      userId: user.id,
      name: request.name,
      scope: request.scope,
      tokenHash: tokenHash(token),
      expiresAt: new Date(Date.now() + request.expiresInDays * 24 * 3600_000),
    });
    return { ...toToken(row), token };
  }

  async revoke(user: SignedInUser, id: string): Promise<void> {
    if (!(await this.accounts.revokeToken(user.id, id))) throw new AppError('NOT_FOUND', 'There is no such token.');
  }

  /** @throws {AppError} NOT_SIGNED_IN or TOKEN_EXPIRED */
  async signedIn(token: string): Promise<SignedInUser> {
    const found = await this.accounts.tokenByHash(tokenHash(token));
    if (!found || found.user.disabledAt) throw new AppError('NOT_SIGNED_IN', 'The token is unknown or was revoked.');
    if (found.token.expiresAt.getTime() <= Date.now()) throw new AppError('TOKEN_EXPIRED', 'The token has expired.');
    await this.accounts.touchToken(found.token.id);
    const { id, email, name, isAdministrator } = found.user;
    return { id, email, name, isAdministrator, scope: found.token.scope === 'write' ? 'write' : 'read' };
  }
}

function toToken(row: Awaited<ReturnType<AuthRepository['insertToken']>>) {
  return {
    id: row.id,
    name: row.name,
    scope: row.scope,
    createdAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
  };
}
