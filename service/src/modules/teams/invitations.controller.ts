import {
  type AcceptInvitationRequest,
  acceptInvitationRequest,
  invitationPreview,
  meResponse,
} from '@eremite/shared/contracts/auth';
import { Body, Controller, Get, HttpCode, Inject, Post, Query, Req, Res, SerializeOptions } from '@nestjs/common';
import type { Request, Response } from 'express';
import { z } from 'zod';
import { Public } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import { AuthService } from '../auth/auth.service.ts';
import { setSessionCookies } from '../auth/cookies.ts';
import { InvitationsService } from './invitations.service.ts';

const previewQuery = z.object({ token: z.string().min(10).max(200) });

@Public()
@Controller('invitations')
export class InvitationsController {
  constructor(
    private readonly invitations: InvitationsService,
    private readonly auth: AuthService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  @Get('preview')
  @SerializeOptions({ schema: invitationPreview })
  preview(@Query({ schema: previewQuery }) query: z.output<typeof previewQuery>) {
    return this.invitations.preview(query.token);
  }

  /** Joins and signs in. */
  @Post('accept')
  @HttpCode(200)
  @SerializeOptions({ schema: meResponse })
  async accept(
    @Body({ schema: acceptInvitationRequest }) body: AcceptInvitationRequest,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ) {
    const userId = await this.invitations.accept(body, request.ip ?? '');
    setSessionCookies(response, this.env, await this.auth.begin(userId));
    return this.auth.me(userId);
  }
}
