import {
  type ChangePasswordRequest,
  changePasswordRequest,
  meResponse,
  type SignInRequest,
  signInRequest,
} from '@eremite/shared/contracts/auth';
import { Body, Controller, Get, HttpCode, Inject, Post, Req, Res, SerializeOptions } from '@nestjs/common';
import type { Request, Response } from 'express';
import { CurrentUser, Public, type SignedInUser } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import { AuthService } from './auth.service.ts';
import { ACCESS_COOKIE, clearSessionCookies, cookieOf, REFRESH_COOKIE, setSessionCookies } from './cookies.ts';

@Controller('auth')
export class AuthController {
  constructor(
    private readonly auth: AuthService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  @Public()
  @Post('sign-in')
  @HttpCode(200)
  @SerializeOptions({ schema: meResponse })
  async signIn(
    @Body({ schema: signInRequest }) body: SignInRequest,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ) {
    const { me, tokens } = await this.auth.signIn(body, request.ip ?? '');
    setSessionCookies(response, this.env, tokens);
    return me;
  }

  @Public()
  @Post('refresh')
  @HttpCode(204)
  async refresh(@Req() request: Request, @Res({ passthrough: true }) response: Response): Promise<void> {
    setSessionCookies(response, this.env, await this.auth.refresh(cookieOf(request, REFRESH_COOKIE)));
  }

  @Public()
  @Post('sign-out')
  @HttpCode(204)
  async signOut(@Req() request: Request, @Res({ passthrough: true }) response: Response): Promise<void> {
    await this.auth.signOut(cookieOf(request, REFRESH_COOKIE), cookieOf(request, ACCESS_COOKIE));
    clearSessionCookies(response, this.env);
  }

  @Get('me')
  @SerializeOptions({ schema: meResponse })
  me(@CurrentUser() user: SignedInUser) {
    return this.auth.me(user.id);
  }

  @Post('password')
  @HttpCode(204)
  changePassword(
    @CurrentUser() user: SignedInUser,
    @Body({ schema: changePasswordRequest }) body: ChangePasswordRequest,
    @Req() request: Request,
  ): Promise<void> {
    return this.auth.changePassword(user, body, request.ip ?? '');
  }
}
