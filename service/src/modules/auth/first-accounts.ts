import { Inject, Injectable } from '@nestjs/common';
import { ENV, type Env } from '../../config/env.ts';
import { AuthRepository } from './auth.repository.ts';
import { AuthService } from './auth.service.ts';

/** Who is there on an installation that no one has used yet. */
@Injectable()
export class FirstAccounts {
  constructor(
    private readonly accounts: AuthRepository,
    private readonly auth: AuthService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async isEmpty(): Promise<boolean> {
    return (await this.accounts.countUsers()) === 0;
  }

  /** Which of these have an account. */
  async present<T extends { readonly email: string }>(wanted: readonly T[]): Promise<T[]> {
    const found = await Promise.all(wanted.map((one) => this.accounts.userByEmail(one.email)));
    return wanted.filter((_, i) => found[i]);
  }

  /** Makes the administrator the environment names; answers whether it did. */
  async makeAdministrator(): Promise<boolean> {
    const { adminEmail: email, adminPassword: password } = this.env;
    if (!email || !password || (await this.accounts.userByEmail(email))) return false;
    await this.auth.createAccount({ email, password, name: 'Administrator', isAdministrator: true });
    return true;
  }
}
