import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aMember, aStaffedSurvey, aTeam, aUser } from '../support/builders.ts';
import { PASSWORD, startApp, type TestApp } from '../support/start-app.ts';

const tokenIn = (text: string): string => /token=([\w-]+)/.exec(text)![1]!;

describe('teams', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp();
  });
  afterAll(() => app.close());

  it('are made by administrators only, who lead them or invite their lead', async () => {
    const admin = await app.signIn((await aUser(app, { isAdministrator: true })).email);
    const other = await app.signIn((await aUser(app)).email);
    expect((await other.post('/teams', { name: 'mine' })).status).toBe(403);
    expect(await admin.post('/teams', { name: 'led' })).toMatchObject({
      status: 201,
      body: { role: 'lead', members: 1 },
    });
    const made = await admin.post('/teams', { name: 'handed over', leadEmail: 'Lead@example.org' });
    expect(made.body).toMatchObject({ role: null, members: 0 });
    const { body: outbox } = await admin.get('/outbox');
    expect(outbox.items[0]).toMatchObject({ to: 'lead@example.org', state: 'kept' });
    expect((await other.get('/teams')).body.items).toEqual([]);
  });

  it('give an administrator no access to their data', async () => {
    const { survey, team } = await aStaffedSurvey(app);
    const admin = await app.signIn((await aUser(app, { isAdministrator: true })).email);
    expect((await admin.get(`/surveys/${survey.id}`)).status).toBe(404);
    expect((await admin.get(`/teams/${team.id}/members`)).status).toBe(404);
    expect((await admin.get('/surveys')).body.total).toBe(0);
    const { body } = await admin.get('/teams');
    expect(body.items).toContainEqual({ id: team.id, name: team.name, role: null, members: 3 });
  });

  it('answer 409, not 500, when two teams take in one newcomer at the same moment', async () => {
    const email = 'wanted.twice@example.org';
    const tokens: string[] = [];
    for (const { team, lead } of [await aStaffedSurvey(app), await aStaffedSurvey(app)]) {
      await lead.post(`/teams/${team.id}/invitations`, { email, role: 'reviewer' });
      const mail = (await lead.get('/outbox')).body.items.find((one: { to: string }) => one.to === email);
      tokens.push(tokenIn(mail.text));
    }
    const accept = (token: string) =>
      app.client().post('/invitations/accept', { token, name: 'Wanted', password: PASSWORD });
    const statuses = (await Promise.all(tokens.map(accept))).map(({ status }) => status).sort();
    expect([[200, 200], [200, 409]]).toContainEqual(statuses); // prettier-ignore
    for (const token of tokens) expect([200, 410]).toContain((await accept(token)).status);
    const joined = await app.signIn(email);
    expect((await joined.get('/auth/me')).body.teams).toHaveLength(2);
  });

  it('take a colleague in by invitation, once', async () => {
    const { team, lead, observer, stranger } = await aStaffedSurvey(app);
    const email = 'new.colleague@example.org';
    expect((await observer.post(`/teams/${team.id}/invitations`, { email, role: 'reviewer' })).status).toBe(403);
    expect((await stranger.post(`/teams/${team.id}/invitations`, { email, role: 'reviewer' })).status).toBe(404);
    expect((await lead.post(`/teams/${team.id}/invitations`, { email, role: 'reviewer' })).status).toBe(201);
    const mail = (await lead.get('/outbox')).body.items.find((one: { to: string }) => one.to === email);
    const token = tokenIn(mail.text);
    expect((await stranger.get('/outbox')).body.items).toEqual([]);
    const visitor = app.client();
    expect((await visitor.get(`/invitations/preview?token=${token}`)).body).toEqual({
      teamName: team.name,
      email,
      role: 'reviewer',
      hasAccount: false,
    });
    const joined = await visitor.post('/invitations/accept', { token, name: 'New Colleague', password: PASSWORD });
    expect(joined).toMatchObject({ status: 200, body: { email, teams: [{ id: team.id, role: 'reviewer' }] } });
    expect((await visitor.get('/auth/me')).status).toBe(200);
    const again = await app.client().post('/invitations/accept', { token, name: 'Second', password: PASSWORD });
    expect(again).toMatchObject({ status: 410, body: { type: 'urn:eremite:error:link-expired' } });
  });

  it('take in someone who has an account with that account’s own password', async () => {
    const { team, lead } = await aStaffedSurvey(app);
    const known = await aUser(app);
    await lead.post(`/teams/${team.id}/invitations`, { email: known.email, role: 'observer' });
    const mail = (await lead.get('/outbox')).body.items.find((one: { to: string }) => one.to === known.email);
    const token = tokenIn(mail.text);
    const accept = (password: string) => app.client().post('/invitations/accept', { token, name: 'x', password });
    expect((await accept('some other password')).status).toBe(401);
    expect((await accept(PASSWORD)).body.id).toBe(known.id);
  });

  it('let a lead revoke an invitation', async () => {
    const { team, lead } = await aStaffedSurvey(app);
    const { body: made } = await lead.post(`/teams/${team.id}/invitations`, {
      email: 'gone@example.org',
      role: 'observer',
    });
    const mail = (await lead.get('/outbox')).body.items.find((one: { to: string }) => one.to === 'gone@example.org');
    expect((await lead.delete(`/teams/${team.id}/invitations/${made.id}`)).status).toBe(204);
    const accepted = await app
      .client()
      .post('/invitations/accept', { token: tokenIn(mail.text), name: 'x', password: PASSWORD });
    expect(accepted.status).toBe(410);
  });

  it('change roles and lose members, but never the last lead', async () => {
    const team = await aTeam(app);
    const [lead, second] = [await aMember(app, team.id, 'lead'), await aMember(app, team.id, 'observer')];
    const member = (id: string) => `/teams/${team.id}/members/${id}`;
    expect((await second.client.patch(member(second.user.id), { role: 'lead' })).status).toBe(403);
    expect((await lead.client.patch(member(lead.user.id), { role: 'observer' })).status).toBe(409);
    expect((await lead.client.delete(member(lead.user.id))).status).toBe(409);
    expect((await lead.client.patch(member(second.user.id), { role: 'lead' })).body.role).toBe('lead');
    expect((await lead.client.delete(member(lead.user.id))).status).toBe(204);
    expect((await lead.client.get(`/teams/${team.id}/members`)).status).toBe(404);
    expect((await second.client.get(`/teams/${team.id}/members`)).body.total).toBe(1);
  });
});

describe('mail', () => {
  it('goes out over SMTP where a server is configured, and then no link is kept', async () => {
    const received: string[] = [];
    const server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData(stream, _session, done) {
        let text = '';
        stream.on('data', (chunk: Buffer) => (text += chunk.toString()));
        stream.on('end', () => {
          received.push(text);
          done();
        });
      },
    });
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.server.address() as { port: number };
    const app = await startApp({ smtpUrl: `smtp://127.0.0.1:${port}` });
    try {
      const { team, lead } = await aStaffedSurvey(app);
      await lead.post(`/teams/${team.id}/invitations`, { email: 'far@example.org', role: 'observer' });
      await expect.poll(async () => (await lead.get('/outbox')).body.items[0].state, { timeout: 10_000 }).toBe('sent');
      expect(received[0]).toContain('far@example.org');
      expect(received[0]).toMatch(/token=/);
      expect((await lead.get('/outbox')).body.items[0].text).toBe('');
    } finally {
      await app.close();
      await new Promise<void>((resolve) => server.close(resolve));
    }
  });

  it('is kept with the reason when the server cannot be reached', async () => {
    const app = await startApp({ smtpUrl: 'smtp://127.0.0.1:1' });
    try {
      const { team, lead } = await aStaffedSurvey(app);
      expect(
        (await lead.post(`/teams/${team.id}/invitations`, { email: 'far@example.org', role: 'observer' })).status,
      ).toBe(201);
      await expect
        .poll(async () => (await lead.get('/outbox')).body.items[0].state, { timeout: 10_000 })
        .toBe('failed');
      expect((await lead.get('/outbox')).body.items[0]).toMatchObject({
        error: expect.stringContaining('ECONNREFUSED'),
      });
    } finally {
      await app.close();
    }
  });
});
