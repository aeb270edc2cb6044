import {
  type CreateTeamRequest,
  createTeamRequest,
  invitation,
  type InvitationRequest,
  invitationRequest,
  team,
  teamMember,
  type UpdateMemberRequest,
  updateMemberRequest,
} from '@eremite/shared/contracts/auth';
import { listOf, type ListQuery, listQuery } from '@eremite/shared/contracts/list';
import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { pageOf } from '../../common/paging.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { InvitationsService } from './invitations.service.ts';
import { TeamsService } from './teams.service.ts';

const uuid = { schema: z.uuid() };

@Controller('teams')
export class TeamsController {
  constructor(
    private readonly teams: TeamsService,
    private readonly invitations: InvitationsService,
  ) {}

  @Get()
  @SerializeOptions({ schema: listOf(team) })
  async list(@CurrentUser() user: SignedInUser, @Query({ schema: listQuery }) query: ListQuery) {
    return pageOf(await this.teams.list(user), query);
  }

  @Post()
  @SerializeOptions({ schema: team })
  create(@CurrentUser() user: SignedInUser, @Body({ schema: createTeamRequest }) body: CreateTeamRequest) {
    return this.teams.create(user, body);
  }

  @Get(':teamId/members')
  @SerializeOptions({ schema: listOf(teamMember) })
  async members(
    @CurrentUser() user: SignedInUser,
    @Param('teamId', uuid) teamId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return pageOf(await this.teams.members(user, teamId), query);
  }

  @Patch(':teamId/members/:userId')
  @SerializeOptions({ schema: teamMember })
  setRole(
    @CurrentUser() user: SignedInUser,
    @Param('teamId', uuid) teamId: string,
    @Param('userId', uuid) userId: string,
    @Body({ schema: updateMemberRequest }) body: UpdateMemberRequest,
  ) {
    return this.teams.setRole(user, teamId, userId, body.role);
  }

  @Delete(':teamId/members/:userId')
  @HttpCode(204)
  remove(
    @CurrentUser() user: SignedInUser,
    @Param('teamId', uuid) teamId: string,
    @Param('userId', uuid) userId: string,
  ): Promise<void> {
    return this.teams.remove(user, teamId, userId);
  }

  @Get(':teamId/invitations')
  @SerializeOptions({ schema: listOf(invitation) })
  async listInvitations(
    @CurrentUser() user: SignedInUser,
    @Param('teamId', uuid) teamId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return pageOf(await this.invitations.list(user, teamId), query);
  }

  @Post(':teamId/invitations')
  @SerializeOptions({ schema: invitation })
  invite(
    @CurrentUser() user: SignedInUser,
    @Param('teamId', uuid) teamId: string,
    @Body({ schema: invitationRequest }) body: InvitationRequest,
  ) {
    return this.invitations.invite(user, teamId, body);
  }

  @Delete(':teamId/invitations/:id')
  @HttpCode(204)
  revoke(
    @CurrentUser() user: SignedInUser,
    @Param('teamId', uuid) teamId: string,
    @Param('id', uuid) id: string,
  ): Promise<void> {
    return this.invitations.revoke(user, teamId, id);
  }
}
