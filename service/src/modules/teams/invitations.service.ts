import type { AcceptInvitationRequest, InvitationRequest } from '@eremite/shared/contracts/auth';
import { Inject, Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import { isUniqueViolation } from '../../database/pg-error.ts';
import { AuthRepository } from '../auth/auth.repository.ts';
import { Passwords } from '../auth/passwords.ts';
import { randomToken, tokenHash } from '../auth/random-token.ts';
import { SignInThrottle } from '../auth/sign-in-throttle.ts';
import { MailService } from '../mail/mail.service.ts';
import { TeamsRepository } from './teams.repository.ts';

const DAYS = 14;

/** Invitations by e-mail: a link that makes its receiver a member. */
@Injectable()
export class InvitationsService {
  constructor(
    private readonly teams: TeamsRepository,
    private readonly access: AccessService,
    private readonly accounts: AuthRepository,
    private readonly passwords: Passwords,
    private readonly throttle: SignInThrottle,
    private readonly mail: MailService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async list(user: SignedInUser, teamId: string) {
    await this.access.team(user, teamId, 'lead');
    return (await this.teams.invitations(teamId)).map(toInvitation);
  }

  async invite(user: SignedInUser, teamId: string, request: InvitationRequest) {
    await this.access.team(user, teamId, 'lead');
    const members = await this.teams.members(teamId);
    if (members.some((member) => member.email === request.email)) {
      throw new AppError('CONFLICT', `${request.email} is a member of this team already.`);
    }
    const team = await this.teams.team(teamId);
    return this.send(user, team!, request);
  }

  /** Makes the invitation and its mail, whoever is allowed to. */
  async send(user: SignedInUser, team: { id: string; name: string }, { email, role }: InvitationRequest) {
    const token = randomToken();
    const row = await this.teams.db.transaction((tx) =>
      this.teams.invite(
        {
          teamId: team.id,
          email,
          role,
          tokenHash: tokenHash(token),
          invitedBy: user.id,
          expiresAt: new Date(Date.now() + DAYS * 24 * 3600_000),
        },
        tx,
      ),
    );
    const link = `${this.env.publicUrl ?? `http://localhost:${this.env.port}`}/accept-invitation?token=${token}`;
    await this.mail.send({
      teamId: team.id,
      to: email,
      subject: `${user.name} invites you to the team ${team.name}`,
      text:
        `${user.name} invites you to the survey team "${team.name}" on Eremite as ${role}.\n\n` +
        `Open this link within ${DAYS} days to join:\n\n${link}\n\n` +
        'If you did not expect this, leave the link unopened.\n',
    });
    return toInvitation(row);
  }

  async revoke(user: SignedInUser, teamId: string, id: string): Promise<void> {
    await this.access.team(user, teamId, 'lead');
    if (!(await this.teams.revoke(teamId, id))) throw new AppError('NOT_FOUND', 'There is no such open invitation.');
  }

  async preview(token: string) {
    const { invitation, teamName } = await this.#open(token);
    const hasAccount = (await this.accounts.userByEmail(invitation.email)) !== undefined;
    return { teamName, email: invitation.email, role: invitation.role, hasAccount };
  }

  /**
   * Joins the team, with a new account or, where the address has one, with that account's own password.
   *
   * @returns id of the account
   */
  async accept({ token, name, password }: AcceptInvitationRequest, address: string): Promise<string> {
    const { invitation } = await this.#open(token);
    const { email, teamId, role } = invitation;
    this.throttle.check(address, email);
    const existing = await this.accounts.userByEmail(email);
    if (existing && (existing.disabledAt || !(await this.passwords.fits(existing.passwordHash, password)))) {
      this.throttle.failed(address, email);
      throw new AppError('SIGN_IN_FAILED', 'This address has an account; give its password.');
    }
    const passwordHash = existing ? '' : await this.passwords.hash(password);
    const joining = this.teams.db.transaction(async (tx) => {
      if (!(await this.teams.accept(invitation.id, tx))) throw new AppError('LINK_EXPIRED');
      const { id } = existing ?? (await this.accounts.insertUser({ email, name, passwordHash }, tx));
      await this.teams.join(teamId, id, role, tx);
      return id;
    });
    return joining.catch((error: unknown) => {
      // Invitations of two teams accepted at once: the other one made the account.
      if (isUniqueViolation(error))
        throw new AppError(
          'CONFLICT',
          'This address was given an account a moment ago; accept again with its password.',
        );
      throw error;
    });
  }

  async #open(token: string) {
    const found = await this.teams.invitationByHash(tokenHash(token));
    if (!found)
      throw new AppError('LINK_EXPIRED', 'The invitation was used, revoked or has expired; ask for a new one.');
    return found;
  }
}

function toInvitation(row: Awaited<ReturnType<TeamsRepository['invite']>>) {
  return {
    id: row.id,
    email: row.email,
    role: row.role,
    expiresAt: row.expiresAt.toISOString(),
    acceptedAt: row.acceptedAt?.toISOString() ?? null,
  };
}
