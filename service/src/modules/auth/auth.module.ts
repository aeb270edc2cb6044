import { Global, Module } from '@nestjs/common';
import { AccessTokens } from './access-token.ts';
import { AuthController } from './auth.controller.ts';
import { AuthGuard } from './auth.guard.ts';
import { AuthRepository } from './auth.repository.ts';
import { AuthService } from './auth.service.ts';
import { CsrfTokens } from './csrf.ts';
import { FirstAccounts } from './first-accounts.ts';
import { Passwords } from './passwords.ts';
import { RequestUser } from './request-user.ts';
import { SignInThrottle } from './sign-in-throttle.ts';
import { TokensController } from './tokens.controller.ts';
import { TokensService } from './tokens.service.ts';

/** All of it is shared: other modules sign people in and ask who they are. */
const PROVIDERS = [
  AccessTokens,
  AuthGuard,
  AuthRepository,
  AuthService,
  CsrfTokens,
  FirstAccounts,
  Passwords,
  RequestUser,
  SignInThrottle,
  TokensService,
];

@Global()
@Module({ controllers: [AuthController, TokensController], providers: PROVIDERS, exports: PROVIDERS })
export class AuthModule {}
