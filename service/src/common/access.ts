import type { TeamRole } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AccessRepository } from './access.repository.ts';
import { AppError } from './app-error.ts';
import type { SignedInUser } from './signed-in-user.ts';

/** What an action needs: to look, to judge (lead or reviewer), or to change the survey itself. */
export type Need = 'read' | 'review' | 'lead';

const SUFFICIENT: Record<Need, readonly TeamRole[]> = {
  read: ['lead', 'reviewer', 'observer'],
  review: ['lead', 'reviewer'],
  lead: ['lead'],
};
const WHO: Record<Need, string> = {
  read: 'the members of the team',
  review: 'leads and reviewers',
  lead: 'leads',
};

/** The one place that decides who may do what with a team's data. Administrators have no say here. */
@Injectable()
export class AccessService {
  constructor(private readonly access: AccessRepository) {}

  /**
   * The survey with the account's role in it.
   *
   * @throws {AppError} NOT_FOUND when it does not exist or is another team's; NOT_ALLOWED when the role is too small
   */
  async survey(user: SignedInUser, surveyId: string, need: Need) {
    const found = await this.access.survey(user.id, surveyId);
    if (!found) throw new AppError('NOT_FOUND', 'There is no such survey.');
    return { survey: found.survey, role: this.#sufficient(found.role as TeamRole, need) };
  }

  /** The account's role in a team, checked likewise. */
  async team(user: SignedInUser, teamId: string, need: Need): Promise<TeamRole> {
    const role = await this.access.role(user.id, teamId);
    if (!role) throw new AppError('NOT_FOUND', 'There is no such team.');
    return this.#sufficient(role as TeamRole, need);
  }

  #sufficient(role: TeamRole, need: Need): TeamRole {
    if (SUFFICIENT[need].includes(role)) return role;
    throw new AppError('NOT_ALLOWED', `Only ${WHO[need]} may do this; you are ${role} of this team.`);
  }
}
