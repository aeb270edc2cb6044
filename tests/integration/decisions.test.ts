import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aMember } from '../support/builders.ts';
import { aScreenedSurvey, ledgerOf } from '../support/builders/small-survey.ts';
import type { Client } from '../support/client.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
let second: { client: Client; user: { id: string; email: string } };
let otherLead: { client: Client };
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
  second = await aMember(app, screened.team.id, 'reviewer');
  otherLead = await aMember(app, screened.team.id, 'lead');
});
afterAll(() => app.close());
const on = (name: string) => `/detections/${screened.items[name]!.detectionId}`;
const computed = (name: string) => {
  const { starlight, surroundings } = screened.items[name]!;
  return { runId: screened.run.id, starlight, surroundings };
};
const review = (client: Client, name: string, word: object = {}) =>
  client.post(`${on(name)}/reviews`, { ...computed(name), ...word });
const docket = async (client: Client, query: string) =>
  (await client.get(`/surveys/${screened.surveyId}/docket?state=all&${query}`)).body.items as {
    name: string;
    disagreement: boolean | null;
  }[];
const names = (items: { name: string }[]) => items.map(({ name }) => name);

describe('an answer in place of a verdict', () => {
  it.each(['not real', 'not extragalactic', 'needs an HI spectrum'])(
    '"%s" needs a note and is told',
    async (outcome) => {
      const bare = await review(screened.reviewer, 'S07', { outcome });
      expect([bare.status, bare.body.errors[0].pointer]).toEqual([400, '/note']);
      const given = await review(screened.reviewer, 'S07', { outcome, note: 'the line sits on an airport radar' });
      expect(given.body, given.text).toMatchObject({ outcome, agrees: false });
      expect(names(await docket(screened.lead, `outcome=${encodeURIComponent(outcome)}`))).toEqual(['S07']);
      // Whoever has not spoken herself does not find it by the filter.
      expect(await docket(second.client, `outcome=${encodeURIComponent(outcome)}`)).toEqual([]);
    },
  );
});

describe('undoing', () => {
  it('takes the own word back and lets the one before hold again', async () => {
    await review(screened.reviewer, 'S08', { note: 'first' });
    const { body } = await review(screened.reviewer, 'S08', { note: 'second' });
    expect((await second.client.delete(`/reviews/${body.id}`)).status).toBe(403);
    expect((await screened.stranger.delete(`/reviews/${body.id}`)).status).toBe(404);
    expect((await screened.reviewer.delete(`/reviews/${body.id}`)).status).toBe(204);
    const { items } = (await screened.reviewer.get(`${on('S08')}/reviews`)).body;
    expect(items).toMatchObject([{ note: 'first' }]);
    expect((await screened.reviewer.delete(`/reviews/${body.id}`)).status).toBe(409);
    expect((await screened.reviewer.delete(`/reviews/${items[0].id}`)).status).toBe(204);
    expect((await screened.reviewer.get(`${on('S08')}/reviews`)).body.total).toBe(0);
    const [line] = await ledgerOf(screened.observer, screened.surveyId);
    expect(line).toMatchObject({ action: 'took a review back', detail: { before: { note: 'first' }, after: null } });
  });
});

describe('two reviewers', () => {
  it('are blind until both have spoken, and agree by Cohen’s kappa over what they judged blind', async () => {
    const differing = { starlight: 'contested', note: 'two blobs' };
    for (const name of ['S01', 'S02', 'S03']) {
      await review(screened.reviewer, name);
      expect((await review(second.client, name, name === 'S03' ? differing : {})).body.blind).toBe(true);
    }
    // What is said after the other's word was seen does not count.
    expect((await review(second.client, 'S03', { note: 'I see it now' })).body.blind).toBe(false);
    const { items } = (await screened.lead.get(`/surveys/${screened.surveyId}/agreement`)).body;
    expect(items).toHaveLength(1);
    // starlit/starlit twice, starlit/contested once: observed 2/3, expected 1 x 2/3, kappa 0 (by hand).
    expect(items[0]).toMatchObject({ detections: 3, starlight: { observed: 2 / 3 } });
    expect(items[0].starlight.kappa).toBeCloseTo(0, 12);
    expect(items[0].surroundings).toMatchObject({ kappa: null, standardError: null, observed: 1 });
  });

  it('who differ are found by the lead, and by a reviewer only once she has spoken', async () => {
    await review(screened.reviewer, 'S04', { starlight: 'confused', note: 'two galaxies' });
    await review(otherLead.client, 'S04');
    expect(names(await docket(screened.lead, 'disagreement=yes'))).toEqual(['S04']);
    expect(await docket(second.client, 'disagreement=yes')).toEqual([]);
    expect((await docket(screened.lead, 'sort=disagreement'))[0]!.name).toBe('S04');
    const hidden = (await docket(second.client, 'search=S04'))[0]!;
    expect(hidden.disagreement).toBeNull();
    await review(second.client, 'S04');
    expect(names(await docket(second.client, 'disagreement=yes'))).toEqual(['S04']);
  });
});

describe('a collision', () => {
  const word = (note: string) => ({ ...computed('S05'), note });

  it('of two leads shows the other’s settlement and does not overwrite it unseen', async () => {
    const path = `${on('S05')}/settlements`;
    expect((await screened.lead.post(path, word('mine'))).status).toBe(204);
    for (const headers of [{}, { 'if-match': '"something else"' }] as Record<string, string>[]) {
      const refused = await otherLead.client.post(path, { ...word('theirs'), starlight: 'dark' }, headers);
      expect(refused.status).toBe(412);
      expect(refused.body.current).toMatchObject({ note: 'mine', by: 'A lead' });
    }
    const { settlement } = (await otherLead.client.get(path)).body;
    expect(settlement).toMatchObject({ note: 'mine', mine: false, moved: [] });
    expect((await otherLead.client.post(path, word('theirs'), { 'if-match': `"${settlement.id}"` })).status).toBe(204);
    const [line] = await ledgerOf(screened.lead, screened.surveyId);
    expect(line!.detail).toMatchObject({ before: { note: 'mine' } });
  });

  it('of two leads at the same moment lets one through', async () => {
    const path = `${on('S09')}/settlements`;
    const settle = (client: Client, note: string) => client.post(path, { ...computed('S09'), note });
    const both = await Promise.all([settle(screened.lead, 'a'), settle(otherLead.client, 'b')]);
    expect(both.map(({ status }) => status).sort()).toEqual([204, 412]);
    const loser = both.find(({ status }) => status === 412)!;
    const { settlement } = (await screened.lead.get(path)).body;
    expect(loser.body.current.note).toBe(settlement.note);
  });

  it('on an object shows the other’s word likewise', async () => {
    const path = `${on('S01')}/overrides`;
    const reject = { catalogueId: screened.catalogues.deep, rowId: 1, action: 'reject', note: 'a star' };
    const { body: first } = await screened.reviewer.post(path, reject);
    const accept = { ...reject, action: 'accept', note: 'a galaxy' };
    const refused = await second.client.post(path, accept);
    expect([refused.status, refused.body.current.note]).toEqual([412, 'a star']);
    expect((await second.client.post(path, accept, { 'if-match': `"${first.id}"` })).status).toBe(201);
  });

  it('with a catalogue that was deleted meanwhile is a clear refusal', async () => {
    const gone = { catalogueId: screened.surveyId, rowId: 1, action: 'reject', note: 'typed for nothing' };
    const refused = await screened.reviewer.post(`${on('S01')}/overrides`, gone);
    expect([refused.status, refused.body.detail]).toEqual([404, expect.stringContaining('any more')]);
  });
});

describe('a doubt', () => {
  it('is cleared or confirmed with a note, by its name in the run, and taken back', async () => {
    const path = `${on('S10')}/doubt-words`;
    const detail = await screened.lead.get(`/runs/${screened.run.id}${on('S10')}`);
    const doubt = detail.body.doubts[0].name as string;
    const word = { runId: screened.run.id, doubt, word: 'cleared', note: 'followed up: nothing there' };
    expect((await screened.reviewer.post(path, { ...word, note: '' })).status).toBe(400);
    expect((await screened.reviewer.post(path, { ...word, doubt: 'no such doubt' })).status).toBe(404);
    expect((await screened.observer.post(path, word)).status).toBe(403);
    const given = await screened.reviewer.post(path, word);
    expect(given.body, given.text).toMatchObject({ doubt, word: 'cleared', by: 'A reviewer', mine: true });
    expect((await screened.observer.get(path)).body.total).toBe(1);
    // Another reviewer who has not spoken is not led by it.
    expect((await second.client.get(path)).body.total).toBe(0);
    expect((await second.client.post(path, { ...word, word: 'confirmed' })).status).toBe(412);
    const back = await screened.lead.delete(`/doubt-words/${given.body.id}`, { note: 'not enough' });
    expect(back.body).toMatchObject({ withdrawnBy: 'A lead', withdrawnNote: 'not enough' });
  });
});

describe('a remark', () => {
  it('asks a colleague, who is written to with the address of the detection', async () => {
    const path = `${on('S11')}/remarks`;
    const asked = await screened.reviewer.post(path, { text: 'Is this the tail?', mentions: [second.user.id] });
    expect(asked.body, asked.text).toMatchObject({ author: 'A reviewer', mentions: [{ userId: second.user.id }] });
    const { body: outbox } = await screened.lead.get('/outbox');
    const mail = outbox.items.find((item: { to: string }) => item.to === second.user.email);
    expect(mail.subject).toBe('A reviewer asks you about S11');
    expect(mail.text).toContain('Is this the tail?');
    expect(mail.text).toContain(`/surveys/${screened.surveyId}/detections/${screened.items['S11']!.detectionId}`);
    expect((await second.client.get(path)).body.total).toBe(1);
    // A remark that does not ask her waits until she has spoken.
    await screened.reviewer.post(path, { text: 'I think it is dark.' });
    expect((await second.client.get(path)).body.total).toBe(1);
    await review(second.client, 'S11');
    expect((await second.client.get(path)).body.total).toBe(2);
    expect((await screened.reviewer.post(path, { text: 'x', mentions: [screened.run.id] })).status).toBe(400);
    expect((await screened.reviewer.post(path, { text: '  ' })).status).toBe(400);
    expect((await screened.observer.post(path, { text: 'hello' })).status).toBe(403);
  });
});

describe('an attachment', () => {
  const PNG = Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 1, 2, 3);
  const upload = (client: Client, bytes: Uint8Array, name = 'cut out.png') =>
    client.upload(`${on('S12')}/attachments`, name, bytes);

  it('goes with a note, comes back byte for byte as a download, and is its owner’s until then', async () => {
    const { body: file, status } = await upload(screened.reviewer, PNG);
    expect([status, file.mediaType, file.bytes]).toEqual([201, 'image/png', PNG.length]);
    const path = `/attachments/${file.id}`;
    expect((await screened.lead.get(path)).status).toBe(404);
    const stolen = await review(second.client, 'S12', { note: 'x', attachmentIds: [file.id] });
    expect([stolen.status, stolen.body.errors[0].pointer]).toEqual([400, '/attachmentIds']);
    const given = await review(screened.reviewer, 'S12', { note: 'see the cut-out', attachmentIds: [file.id] });
    expect(given.body.attachments).toMatchObject([{ id: file.id, fileName: 'cut out.png' }]);
    const answer = await screened.lead.raw('GET', path);
    expect(new Uint8Array(await answer.arrayBuffer())).toEqual(PNG);
    expect(answer.headers.get('content-disposition')).toBe("attachment; filename*=UTF-8''cut%20out.png");
    expect(answer.headers.get('x-content-type-options')).toBe('nosniff');
    expect((await screened.stranger.get(path)).status).toBe(404);
    expect((await second.client.get(path)).status).toBe(404);
  });

  it('is refused where it is too large, of another kind, or an observer’s', async () => {
    expect((await upload(screened.reviewer, new Uint8Array(5_000_001).fill(65), 'a.txt')).status).toBe(413);
    const program = await upload(screened.reviewer, Uint8Array.of(0x7f, 0x45, 0x4c, 0x46, 0), 'a.png');
    expect([program.status, program.body.errors[0].pointer]).toEqual([400, '/file']);
    expect((await upload(screened.observer, PNG)).status).toBe(403);
  });
});

describe('bad input', () => {
  it('such as a note of 100 kB or none at all is refused with the field, and nothing is kept', async () => {
    const long = await review(screened.reviewer, 'S06', { note: 'x'.repeat(100_000) });
    expect([long.status, long.body.errors[0].pointer]).toEqual([400, '/note']);
    expect(long.body.errors[0].detail).toContain('attachment');
    const blank = await review(screened.reviewer, 'S06', { starlight: 'dark', note: ' \n\t ' });
    expect(blank.status).toBe(400);
    expect((await screened.lead.get(`${on('S06')}/reviews`)).body.total).toBe(0);
  });

  it('sent twice with one key is done once', async () => {
    const word = { ...computed('S06'), note: 'sent again after the network was lost' };
    const send = () => screened.reviewer.post(`${on('S06')}/reviews`, word, { 'idempotency-key': 'a-b-c' });
    const [first, again] = [await send(), await send()];
    expect(again.body.id).toBe(first.body.id);
  });
});

describe('the phrases of a team', () => {
  it('are its own', async () => {
    const path = `/surveys/${screened.surveyId}/note-phrases`;
    expect((await screened.reviewer.get(path)).body.phrases.length).toBeGreaterThan(2);
    const phrases = ['Satellite trail.', 'Ghost of a bright star.'];
    expect((await screened.reviewer.put(path, { phrases })).body).toEqual({ phrases });
    expect((await screened.observer.put(path, { phrases: [] })).status).toBe(403);
    expect((await screened.stranger.get(path)).status).toBe(404);
  });
});
