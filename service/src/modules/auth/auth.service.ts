import { randomUUID } from 'node:crypto';
import type { ChangePasswordRequest, Me, SignInRequest } from '@eremite/shared/contracts/auth';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { AccessTokens } from './access-token.ts';
import { AuthRepository, type UserRow } from './auth.repository.ts';
import type { SessionTokens } from './cookies.ts';
import { CsrfTokens } from './csrf.ts';
import { Passwords } from './passwords.ts';
import { randomToken, tokenHash } from './random-token.ts';
import { SignInThrottle } from './sign-in-throttle.ts';

const SESSION_MS = 30 * 24 * 3600_000;
/** Two tabs may renew at once; the slower one comes with a token that has just been replaced. */
const GRACE_MS = 30_000;

@Injectable()
export class AuthService {
  readonly #justReplaced = new Map<string, { hash: string; at: number }>();

  constructor(
    private readonly accounts: AuthRepository,
    private readonly passwords: Passwords,
    private readonly access: AccessTokens,
    private readonly csrf: CsrfTokens,
    private readonly throttle: SignInThrottle,
  ) {}

  async createAccount(account: {
    email: string;
    password: string;
    name: string;
    isAdministrator?: boolean;
  }): Promise<UserRow> {
    const { password, email, ...values } = account;
    const passwordHash = await this.passwords.hash(password);
    return this.accounts.insertUser({ ...values, email: email.toLowerCase(), passwordHash });
  }

  /** @param address network address of the caller, for the throttle */
  async signIn({ email, password }: SignInRequest, address: string): Promise<{ me: Me; tokens: SessionTokens }> {
    this.throttle.check(address, email);
    const user = await this.accounts.userByEmail(email);
    const fits = await this.passwords.fits(user?.passwordHash, password);
    if (!user || !fits || user.disabledAt) {
      this.throttle.failed(address, email);
      throw new AppError('SIGN_IN_FAILED');
    }
    this.throttle.succeeded(address, email);
    return { me: await this.me(user.id), tokens: await this.begin(user.id) };
  }

  /** A new browser session. */
  async begin(userId: string): Promise<SessionTokens> {
    const id = randomUUID();
    const secret = randomToken();
    const expiresAt = new Date(Date.now() + SESSION_MS);
    await this.accounts.insertSession({ id, userId, refreshHash: tokenHash(secret), expiresAt });
    return this.#tokens(userId, id, { token: `${id}.${secret}`, expiresAt });
  }

  /** Renews a session. A refresh token used a second time was stolen or copied: the session ends. */
  async refresh(token: string | undefined): Promise<SessionTokens> {
    const [id = '', secret = ''] = (token ?? '').split('.');
    if (!/^[0-9a-f-]{36}$/.test(id)) throw new AppError('NOT_SIGNED_IN');
    const session = await this.accounts.userOfSession(id);
    if (!session || session.user.disabledAt) throw new AppError('TOKEN_EXPIRED');
    const from = tokenHash(secret);
    const next = randomToken();
    const expiresAt = new Date(Date.now() + SESSION_MS);
    if (session.refreshHash === from && (await this.accounts.rotate(id, from, tokenHash(next), expiresAt))) {
      this.#remember(id, from);
      return this.#tokens(session.user.id, id, { token: `${id}.${next}`, expiresAt });
    }
    const replaced = this.#justReplaced.get(id);
    if (replaced?.hash === from && Date.now() - replaced.at < GRACE_MS) return this.#tokens(session.user.id, id);
    await this.accounts.endSession(id);
    throw new AppError('TOKEN_EXPIRED');
  }

  async signOut(refreshToken: string | undefined, accessToken: string | undefined): Promise<void> {
    const [id = '', secret = ''] = (refreshToken ?? '').split('.');
    if (/^[0-9a-f-]{36}$/.test(id)) {
      const session = await this.accounts.userOfSession(id);
      if (session?.refreshHash === tokenHash(secret)) return this.accounts.endSession(id);
    }
    if (!accessToken) return;
    try {
      await this.accounts.endSession(this.access.verify(accessToken).sessionId);
    } catch {
      // Signed out already: that is what was wanted.
    }
  }

  async me(userId: string): Promise<Me> {
    const user = await this.accounts.user(userId);
    if (!user) throw new AppError('NOT_SIGNED_IN');
    const teams = await this.accounts.teamsOf(userId);
    return {
      id: user.id,
      email: user.email,
      name: user.name,
      isAdministrator: user.isAdministrator,
      teams: teams.map((team) => ({ ...team, role: team.role as TeamRole })),
    };
  }

  async changePassword(user: SignedInUser, { current, next }: ChangePasswordRequest, address: string): Promise<void> {
    if (!user.sessionId) throw new AppError('NOT_ALLOWED', 'A personal token cannot change the password; sign in.');
    this.throttle.check(address, user.email);
    const row = await this.accounts.user(user.id);
    if (!(await this.passwords.fits(row?.passwordHash, current))) {
      this.throttle.failed(address, user.email);
      throw new AppError('VALIDATION_FAILED', 'The present password is wrong.', [
        { pointer: '/current', detail: 'is not the present password' },
      ]);
    }
    const hash = await this.passwords.hash(next);
    await this.accounts.db.transaction(async (tx) => {
      await this.accounts.setPassword(user.id, hash, tx);
      await this.accounts.endOtherSessions(user.id, user.sessionId, tx);
    });
  }

  #tokens(userId: string, sessionId: string, refresh?: SessionTokens['refresh']): SessionTokens {
    return {
      access: this.access.sign(userId, sessionId),
      accessSeconds: this.access.seconds,
      csrf: this.csrf.of(sessionId),
      ...(refresh && { refresh }),
    };
  }

  #remember(id: string, hash: string): void {
    const now = Date.now();
    for (const [key, { at }] of this.#justReplaced) if (now - at > GRACE_MS) this.#justReplaced.delete(key);
    this.#justReplaced.set(id, { hash, at: now });
  }
}
