import { randomUUID } from 'node:crypto';
import { AuthService } from '@eremite/service/modules/auth/auth.service.ts';
import { TeamsRepository } from '@eremite/service/modules/teams/teams.repository.ts';
import type { Survey } from '@eremite/shared/contracts/survey';
import type { TeamRole } from '@eremite/shared/contracts/words';
import type { Client } from './client.ts';
import { PASSWORD, type TestApp } from './start-app.ts';

const unique = (): string => randomUUID().slice(0, 8);

/** An account, with {@link PASSWORD}. */
export async function aUser(app: TestApp, given: { email?: string; name?: string; isAdministrator?: boolean } = {}) {
  const email = given.email ?? `user-${unique()}@example.org`;
  const account = { email, name: 'Some One', password: PASSWORD, ...given };
  return app.get(AuthService).createAccount({ ...account, email });
}

/** A team without members. */
export async function aTeam(app: TestApp, name = `team ${unique()}`): Promise<{ id: string; name: string }> {
  return { id: await app.get(TeamsRepository).insertTeam(name), name };
}

/** A new account in a team, signed in. */
export async function aMember(app: TestApp, teamId: string, role: TeamRole) {
  const user = await aUser(app, { name: `A ${role}` });
  await app.get(TeamsRepository).join(teamId, user.id, role);
  return { user, client: await app.signIn(user.email) };
}

/** A survey made by a lead through the API. */
export async function aSurvey(lead: Client, teamId: string, given: object = {}): Promise<Survey> {
  const answer = await lead.post('/surveys', { teamId, name: `survey ${unique()}`, ...given });
  if (answer.status !== 201) throw new Error(`creating a survey answered ${answer.status}: ${answer.text}`);
  return answer.body as Survey;
}

/** A team with one survey and a signed-in member of each role, and someone of another team. */
export async function aStaffedSurvey(app: TestApp) {
  const team = await aTeam(app);
  const other = await aTeam(app);
  const [lead, reviewer, observer, stranger] = await Promise.all([
    aMember(app, team.id, 'lead'),
    aMember(app, team.id, 'reviewer'),
    aMember(app, team.id, 'observer'),
    aMember(app, other.id, 'lead'),
  ]);
  const survey = await aSurvey(lead.client, team.id);
  return {
    team,
    survey,
    lead: lead.client,
    reviewer: reviewer.client,
    observer: observer.client,
    stranger: stranger.client,
  };
}

/** Waits for the end of a job, asking as a client would. */
export async function jobEnd(client: Client, jobId: string, timeoutMs = 60_000) {
  const deadline = Date.now() + timeoutMs;
  for (;;) {
    const { body } = await client.get(`/jobs/${jobId}`);
    if (body.finishedAt) return body;
    if (Date.now() > deadline) throw new Error(`job ${jobId} did not end: ${JSON.stringify(body)}`);
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}
