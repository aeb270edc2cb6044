import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aMember } from '../support/builders.ts';
import { aScreenedSurvey } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
let second: { client: Client };
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
  second = await aMember(app, screened.team.id, 'reviewer');
});
afterAll(() => app.close());
const path = () => `/surveys/${screened.surveyId}/ledger`;
const agree = (client: Client, name: string, note: string) => {
  const { detectionId, starlight, surroundings } = screened.items[name]!;
  return client.post(`/detections/${detectionId}/reviews`, { runId: screened.run.id, starlight, surroundings, note });
};
interface Line {
  number: number;
  action: string;
  subject: string;
  note: string;
}
const lines = async (client: Client, query: string) => (await client.get(`${path()}?${query}`)).body.items as Line[];

describe('the ledger', () => {
  it('is filtered by who, what, when, on what and why', async () => {
    await agree(screened.reviewer, 'S01', 'a most quixotic word');
    await agree(screened.reviewer, 'S02', '');
    const { lead } = screened;
    expect((await lines(lead, 'action=agreed%20with%20a%20verdict')).map(({ subject }) => subject)).toEqual([
      'S02',
      'S01',
    ]);
    expect(await lines(lead, 'search=quixotic')).toHaveLength(1);
    expect(await lines(lead, 'search=S02')).toHaveLength(1);
    expect((await lines(lead, 'actor=A%20reviewer')).length).toBe(2);
    expect(await lines(lead, `detectionId=${screened.items['S01']!.detectionId}`)).toHaveLength(1);
    const today = new Date().toISOString().slice(0, 10);
    expect((await lines(lead, `since=${today}&until=${today}`)).length).toBeGreaterThan(5);
    expect(await lines(lead, 'until=2020-01-01')).toEqual([]);
    expect((await lead.get(`${path()}?since=yesterday`)).status).toBe(400);
    const { body: facets } = await lead.get(`${path()}/facets`);
    expect(facets.actors).toContain('A reviewer');
    expect(facets.actions).toContain('agreed with a verdict');
  });

  it('does not tell a blind reviewer by its filters what it does not tell her by its lines', async () => {
    const { client } = second;
    expect(await lines(client, 'search=quixotic')).toEqual([]);
    expect(await lines(client, 'action=agreed%20with%20a%20verdict')).toEqual([]);
    const [about] = await lines(client, 'search=S01');
    expect(about).toMatchObject({ action: 'reviewed a verdict', note: '' });
    expect((await client.get(`${path()}/facets`)).body.actions).not.toContain('agreed with a verdict');
    const csv = (await client.get(`${path()}/export?format=csv`)).text;
    expect(csv).not.toContain('quixotic');
    expect(csv).not.toContain('agreed with');
  });

  it('is saved whole, so that anyone can check the chain by what stands in the contract', async () => {
    const text = await (await screened.observer.raw('GET', `${path()}/export?format=jsonl`)).text();
    const rows = text
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line) as Record<string, unknown>);
    // Written from the description alone: a JSON array with the keys of every object sorted.
    const sorted = (value: unknown): unknown =>
      Array.isArray(value)
        ? value.map(sorted)
        : value !== null && typeof value === 'object'
          ? Object.fromEntries(
              Object.entries(value)
                .sort(([a], [b]) => (a < b ? -1 : 1))
                .map(([key, entry]) => [key, sorted(entry)]),
            )
          : value;
    let previous = '';
    for (const row of rows) {
      const { previousHash, surveyId, number, at, actorId, actor, action, subject, note, detail, hash } = row;
      expect(previousHash).toBe(previous);
      const covered = [previousHash, surveyId, number, at, actorId, actor, action, subject, note, sorted(detail)];
      expect(createHash('sha256').update(JSON.stringify(covered)).digest('hex')).toBe(hash);
      previous = hash as string;
    }
    const { body } = await screened.observer.get(`${path()}/verification`);
    expect(body).toEqual({ entries: rows.length, intact: true, brokenAt: null, lastHash: previous });
    const csv = (await screened.lead.get(`${path()}/export?format=csv&search=quixotic`)).text.trim().split('\r\n');
    expect(csv).toHaveLength(2);
    expect(csv[0]).toBe('number,at,actor,action,subject,note,detail,previous_hash,hash');
    expect((await screened.stranger.get(`${path()}/export`)).status).toBe(404);
  });
});

/** Reads server-sent events until one of a kind comes. */
async function* eventsOf(client: Client, url: string, signal: AbortSignal, headers = {}) {
  const response = await client.raw('GET', url, undefined, headers, signal);
  if (response.status !== 200) throw new Error(`events answered ${response.status}`);
  let text = '';
  for await (const chunk of response.body!.pipeThrough(new TextDecoderStream())) {
    text += chunk;
    for (let end = text.indexOf('\n\n'); end >= 0; end = text.indexOf('\n\n')) {
      const event = text.slice(0, end);
      text = text.slice(end + 2);
      const field = (name: string) => new RegExp(`^${name}: (.*)$`, 'm').exec(event)?.[1];
      if (field('event')) yield { event: field('event')!, id: field('id')!, data: field('data')! };
    }
  }
}

describe('what others do', () => {
  it('is told as it is done, to each as far as they may know, and from where they left off', async () => {
    const stop = new AbortController();
    const url = `/surveys/${screened.surveyId}/events`;
    const blind = eventsOf(second.client, url, stop.signal);
    const knowing = eventsOf(screened.lead, url, stop.signal);
    const { value: ready } = await blind.next();
    expect(ready).toMatchObject({ event: 'ready' });
    await knowing.next();
    await agree(screened.reviewer, 'S03', 'between us');
    const told = JSON.parse((await blind.next()).value!.data) as Record<string, unknown>;
    const { detectionId } = screened.items['S03']!;
    expect(told).toMatchObject({ action: 'reviewed a verdict', subject: 'S03', mine: false, detectionId });
    expect(JSON.stringify(told)).not.toContain('between us');
    const full = JSON.parse((await knowing.next()).value!.data) as Record<string, unknown>;
    expect(full).toMatchObject({ action: 'agreed with a verdict', actor: 'A reviewer' });
    stop.abort();

    await agree(screened.reviewer, 'S04', '');
    await agree(screened.reviewer, 'S05', '');
    const again = new AbortController();
    const since = Number(ready!.id);
    for (const [address, headers] of [
      [url, { 'last-event-id': String(since) }],
      [`${url}?after=${since}`, {}],
    ] as const) {
      const missed = eventsOf(screened.lead, address, again.signal, headers);
      await missed.next();
      const subjects: unknown[] = [];
      for (let i = 0; i < 3; i++) subjects.push(JSON.parse((await missed.next()).value!.data).subject);
      expect(subjects).toEqual(['S03', 'S04', 'S05']);
    }
    again.abort();
    expect((await screened.stranger.get(url)).status).toBe(404);
  });
});
