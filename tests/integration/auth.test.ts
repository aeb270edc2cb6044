import { users } from '@eremite/schema';
import { eq } from 'drizzle-orm';
import jwt from 'jsonwebtoken';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey, aUser } from '../support/builders.ts';
import { PASSWORD, startApp, type TestApp } from '../support/start-app.ts';

describe('signing in', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp();
  });
  afterAll(() => app.close());

  it('answers with the account, sets cookies scripts cannot read, and lets /auth/me answer', async () => {
    const user = await aUser(app, { name: 'Ada Example' });
    const client = app.client();
    const answer = await client.post('/auth/sign-in', { email: user.email.toUpperCase(), password: PASSWORD });
    expect(answer).toMatchObject({ status: 200, body: { id: user.id, name: 'Ada Example', teams: [] } });
    const cookies = answer.headers.getSetCookie();
    for (const name of ['access', 'refresh']) {
      expect(cookies.find((line) => line.startsWith(`${name}=`))).toMatch(/HttpOnly.*SameSite=Lax/);
    }
    expect(cookies.find((line) => line.startsWith('csrf='))).not.toMatch(/HttpOnly/);
    expect((await client.get('/auth/me')).body.email).toBe(user.email);
  });

  it('keeps the access token alive for at least 60 minutes', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const { exp, iat } = jwt.decode(client.cookie('access')!) as { exp: number; iat: number };
    expect(exp - iat).toBeGreaterThanOrEqual(3600);
  });

  it('answers 401 alike to a wrong password and to an unknown e-mail', async () => {
    const user = await aUser(app);
    const wrong = await app.client().post('/auth/sign-in', { email: user.email, password: 'not the password' });
    const unknown = await app
      .client()
      .post('/auth/sign-in', { email: 'nobody@example.org', password: 'not the password' });
    expect(wrong.status).toBe(401);
    expect(unknown.status).toBe(401);
    const { requestId: a, ...first } = wrong.body;
    const { requestId: b, ...second } = unknown.body;
    expect(first).toEqual(second);
    expect(a).not.toBe(b);
  });

  it('answers 401 with its own type to an expired access token', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const { sid } = jwt.decode(client.cookie('access')!) as { sid: string };
    const old = jwt.sign({ sid }, app.env.secret!, { subject: user.id, issuer: 'eremite', expiresIn: -1 });
    client.setCookie('access', old);
    expect(await client.get('/auth/me')).toMatchObject({
      status: 401,
      body: { type: 'urn:eremite:error:token-expired' },
    });
  });

  it.each([
    [
      'signed with another key',
      (id: string, sid: string) => jwt.sign({ sid }, 'x'.repeat(40), { subject: id, issuer: 'eremite' }),
    ],
    [
      'not signed at all',
      (id: string, sid: string) => jwt.sign({ sid, sub: id, iss: 'eremite' }, '', { algorithm: 'none' }),
    ],
  ])('refuses an access token that is %s', async (_, forge) => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const { sid } = jwt.decode(client.cookie('access')!) as { sid: string };
    client.setCookie('access', forge(user.id, sid));
    expect((await client.get('/auth/me')).status).toBe(401);
  });

  it('slows down guessing one account, not others', async () => {
    const [victim, other] = [await aUser(app), await aUser(app)];
    const guess = (email: string) => app.client().post('/auth/sign-in', { email, password: 'guess' });
    const statuses: number[] = [];
    for (let i = 0; i < 12; i += 1) statuses.push((await guess(victim.email)).status);
    expect(statuses.slice(0, 10)).toEqual(Array(10).fill(401));
    expect(statuses.slice(10)).toEqual([429, 429]);
    expect((await guess(other.email)).status).toBe(401);
  });

  it('refuses an unsafe request without the echoed csrf value', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const answer = await client.post('/tokens', { name: 'x' }, { 'x-csrf-token': 'something else' });
    expect(answer).toMatchObject({ status: 403, body: { type: 'urn:eremite:error:csrf-mismatch' } });
    expect((await client.post('/tokens', { name: 'x' })).status).toBe(201);
  });

  it('ends the session on sign-out, also for a copy of its cookies', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const access = client.cookie('access')!;
    expect((await client.post('/auth/sign-out')).status).toBe(204);
    client.setCookie('access', access);
    expect((await client.get('/auth/me')).status).toBe(401);
  });

  it('renews the session, and ends it when a replaced refresh token comes back much later', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const stolen = client.cookie('refresh')!;
    expect((await client.post('/auth/refresh')).status).toBe(204);
    expect((await client.post('/auth/refresh')).status).toBe(204);
    expect(client.cookie('refresh')).not.toBe(stolen);
    expect((await client.get('/auth/me')).status).toBe(200);
    const thief = app.client();
    thief.setCookie('refresh', stolen);
    expect((await thief.post('/auth/refresh')).status).toBe(401);
    expect((await client.get('/auth/me')).status).toBe(401);
  });

  it('lets two tabs renew at once', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const second = app.client();
    second.setCookie('refresh', client.cookie('refresh')!);
    expect((await client.post('/auth/refresh')).status).toBe(204);
    expect((await second.post('/auth/refresh')).status).toBe(204);
    expect((await second.get('/auth/me')).status).toBe(200);
    expect((await client.get('/auth/me')).status).toBe(200);
  });

  it('changes the password, which ends the other sessions', async () => {
    const user = await aUser(app);
    const [here, there] = [await app.signIn(user.email), await app.signIn(user.email)];
    const wrong = await here.post('/auth/password', { current: 'wrong', next: 'another long password' });
    expect(wrong).toMatchObject({ status: 400, body: { errors: [{ pointer: '/current' }] } });
    expect((await here.post('/auth/password', { current: PASSWORD, next: 'short' })).status).toBe(400);
    expect((await here.post('/auth/password', { current: PASSWORD, next: 'another long password' })).status).toBe(204);
    expect((await here.get('/auth/me')).status).toBe(200);
    expect((await there.get('/auth/me')).status).toBe(401);
    await expect(app.signIn(user.email)).rejects.toThrow('401');
    await app.signIn(user.email, 'another long password');
  });

  it('shuts out a disabled account at once', async () => {
    const user = await aUser(app);
    const admin = await app.signIn((await aUser(app, { isAdministrator: true })).email);
    const client = await app.signIn(user.email);
    expect((await client.patch(`/admin/accounts/${user.id}`, { disabled: false })).status).toBe(403);
    expect((await admin.patch(`/admin/accounts/${user.id}`, { disabled: true })).body.disabled).toBe(true);
    expect((await client.get('/auth/me')).status).toBe(401);
    await expect(app.signIn(user.email)).rejects.toThrow('401');
    await admin.patch(`/admin/accounts/${user.id}`, { disabled: false });
    await app.signIn(user.email);
  });

  it('stores neither passwords nor tokens in the clear', async () => {
    const user = await aUser(app);
    const [row] = await app.db.select().from(users).where(eq(users.id, user.id));
    expect(row!.passwordHash).toMatch(/^\$argon2id\$/);
  });

  it('names each fault of a body with its place', async () => {
    const { body, status } = await app.client().post('/auth/sign-in', { email: 3, extra: true });
    expect(status).toBe(400);
    expect(body.errors.map((one: { pointer: string }) => one.pointer)).toEqual(
      expect.arrayContaining(['/email', '/password']),
    );
    const broken = await app
      .client()
      .request('POST', '/auth/sign-in', '{"email":', { 'content-type': 'application/json' });
    expect(broken).toMatchObject({ status: 400, body: { type: 'urn:eremite:error:validation-failed' } });
  });
});

describe('personal tokens', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startApp();
  });
  afterAll(() => app.close());

  it('sign a script in; are shown once; can be revoked', async () => {
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const { body: made } = await client.post('/tokens', { name: 'nightly', scope: 'write', expiresInDays: 1 });
    const script = app.client(made.token);
    expect((await script.get('/auth/me')).body.id).toBe(user.id);
    const { body: list } = await client.get('/tokens');
    expect(list.items).toHaveLength(1);
    expect(JSON.stringify(list)).not.toContain(made.token);
    expect(list.items[0].lastUsedAt).not.toBeNull();
    expect((await client.delete(`/tokens/${made.id}`)).status).toBe(204);
    expect((await script.get('/auth/me')).status).toBe(401);
  });

  it('may not write with scope read, nor make tokens or change the password', async () => {
    const { lead, team, survey } = await aStaffedSurvey(app);
    const { body: reading } = await lead.post('/tokens', { name: 'r', scope: 'read' });
    const { body: writing } = await lead.post('/tokens', { name: 'w', scope: 'write' });
    const reader = app.client(reading.token);
    const writer = app.client(writing.token);
    expect((await reader.get(`/surveys/${survey.id}`)).status).toBe(200);
    expect((await reader.post('/surveys', { teamId: team.id, name: 'no' })).status).toBe(403);
    expect((await writer.post('/surveys', { teamId: team.id, name: 'yes' })).status).toBe(201);
    expect((await writer.post('/tokens', { name: 'another' })).status).toBe(403);
    expect((await writer.post('/auth/password', { current: PASSWORD, next: 'another long password' })).status).toBe(
      403,
    );
  });

  it('answer 401 once expired', async () => {
    const { personalTokens } = await import('@eremite/schema');
    const user = await aUser(app);
    const client = await app.signIn(user.email);
    const { body: made } = await client.post('/tokens', { name: 'old' });
    await app.db
      .update(personalTokens)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(personalTokens.id, made.id));
    expect(await app.client(made.token).get('/auth/me')).toMatchObject({
      status: 401,
      body: { type: 'urn:eremite:error:token-expired' },
    });
  });
});
