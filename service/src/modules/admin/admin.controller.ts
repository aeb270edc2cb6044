import {
  account,
  adminJob,
  storage,
  type UpdateAccountRequest,
  updateAccountRequest,
} from '@eremite/shared/contracts/admin';
import { listOf, type ListQuery, listQuery } from '@eremite/shared/contracts/list';
import { Body, Controller, Get, Param, Patch, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { AdminService } from './admin.service.ts';

@Controller('admin')
export class AdminController {
  constructor(private readonly admin: AdminService) {}

  @Get('accounts')
  @SerializeOptions({ schema: listOf(account) })
  accounts(@CurrentUser() user: SignedInUser, @Query({ schema: listQuery }) query: ListQuery) {
    return this.admin.accounts(user, query);
  }

  @Patch('accounts/:id')
  @SerializeOptions({ schema: account })
  setDisabled(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Body({ schema: updateAccountRequest }) body: UpdateAccountRequest,
  ) {
    return this.admin.setDisabled(user, id, body.disabled);
  }

  @Get('jobs')
  @SerializeOptions({ schema: listOf(adminJob) })
  jobs(@CurrentUser() user: SignedInUser, @Query({ schema: listQuery }) query: ListQuery) {
    return this.admin.jobs(user, query);
  }

  @Get('storage')
  @SerializeOptions({ schema: storage })
  storage(@CurrentUser() user: SignedInUser) {
    return this.admin.storage(user);
  }
}
