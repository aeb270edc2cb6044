import {
  type CreateTokenRequest,
  createdToken,
  createTokenRequest,
  personalToken,
} from '@eremite/shared/contracts/auth';
import { listOf, type ListQuery, listQuery } from '@eremite/shared/contracts/list';
import { Body, Controller, Delete, Get, HttpCode, Param, Post, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { pageOf } from '../../common/paging.ts';
import { SecretAnswer } from '../../common/secret-answer.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { TokensService } from './tokens.service.ts';

@Controller('tokens')
export class TokensController {
  constructor(private readonly tokens: TokensService) {}

  @Get()
  @SerializeOptions({ schema: listOf(personalToken) })
  async list(@CurrentUser() user: SignedInUser, @Query({ schema: listQuery }) query: ListQuery) {
    return pageOf(await this.tokens.list(user), query);
  }

  @Post()
  @SecretAnswer()
  @SerializeOptions({ schema: createdToken })
  create(@CurrentUser() user: SignedInUser, @Body({ schema: createTokenRequest }) body: CreateTokenRequest) {
    return this.tokens.create(user, body);
  }

  @Delete(':id')
  @HttpCode(204)
  revoke(@CurrentUser() user: SignedInUser, @Param('id', { schema: z.uuid() }) id: string): Promise<void> {
    return this.tokens.revoke(user, id);
  }
}
