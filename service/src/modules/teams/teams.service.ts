import type { CreateTeamRequest } from '@eremite/shared/contracts/auth';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Database } from '../../database/database.ts';
import { InvitationsService } from './invitations.service.ts';
import { TeamsRepository } from './teams.repository.ts';

/** Teams and their members. */
@Injectable()
export class TeamsService {
  constructor(
    private readonly teams: TeamsRepository,
    private readonly access: AccessService,
    private readonly invitations: InvitationsService,
  ) {}

  /** One's own teams; an administrator sees that the others exist, not what they hold. */
  list(user: SignedInUser) {
    return this.teams.teams(user.id, user.isAdministrator);
  }

  async create(user: SignedInUser, request: CreateTeamRequest) {
    if (!user.isAdministrator) throw new AppError('NOT_ALLOWED', 'Only administrators make teams.');
    const { name, leadEmail } = request;
    const id = await this.teams.db.transaction(async (tx) => {
      const teamId = await this.teams.insertTeam(name, tx);
      if (!leadEmail) await this.teams.join(teamId, user.id, 'lead', tx);
      return teamId;
    });
    if (leadEmail) await this.invitations.send(user, { id, name }, { email: leadEmail, role: 'lead' });
    return { id, name, role: leadEmail ? null : ('lead' as const), members: leadEmail ? 0 : 1 };
  }

  async members(user: SignedInUser, teamId: string) {
    await this.access.team(user, teamId, 'read');
    return this.teams.members(teamId);
  }

  async setRole(user: SignedInUser, teamId: string, userId: string, role: TeamRole) {
    await this.access.team(user, teamId, 'lead');
    await this.#change(teamId, async (tx) => {
      await this.#member(teamId, userId, tx);
      await this.teams.join(teamId, userId, role, tx);
    });
    return this.#member(teamId, userId);
  }

  /** A lead removes anyone, everyone may leave. */
  async remove(user: SignedInUser, teamId: string, userId: string): Promise<void> {
    await this.access.team(user, teamId, userId === user.id ? 'read' : 'lead');
    await this.#change(teamId, async (tx) => {
      await this.#member(teamId, userId, tx);
      await this.teams.leave(teamId, userId, tx);
    });
  }

  async #member(teamId: string, userId: string, db?: Database) {
    const member = (await this.teams.members(teamId, db)).find((one) => one.userId === userId);
    if (!member) throw new AppError('NOT_FOUND', 'There is no such member in this team.');
    return member;
  }

  /** A team without a lead could never be mended from inside. */
  async #change(teamId: string, work: (tx: Database) => Promise<void>): Promise<void> {
    await this.teams.db.transaction(async (tx) => {
      await this.teams.lock(teamId, tx);
      await work(tx);
      if ((await this.teams.countLeads(teamId, tx)) === 0) {
        throw new AppError('CONFLICT', 'A team needs a lead: make someone else lead first.');
      }
    });
  }
}
