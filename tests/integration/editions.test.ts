import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ArchiveError } from '@eremite/service/edition/archive/archive-error.ts';
import { MANIFEST } from '@eremite/service/edition/archive/manifest.ts';
import { readArchive } from '@eremite/service/edition/archive/read-archive.ts';
import { replay } from '@eremite/service/edition/archive/replay.ts';
import { sha256 } from '@eremite/service/edition/archive/sha256.ts';
import { EDITION_FORMATS, EDITION_TABLES } from '@eremite/shared/contracts/edition';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ZipFile } from 'yazl';
import { jobEnd } from '../support/builders.ts';
import { aScreenedSurvey, ledgerOf, settle } from '../support/builders/small-survey.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

const LISTED = ['S12', 'S08', 'S10'];
let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
const folder = mkdtempSync(join(tmpdir(), 'eremite-editions-'));
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(async () => {
  await app.close();
  rmSync(folder, { recursive: true, force: true });
});

const editions = () => `/surveys/${screened.surveyId}/editions`;
const shortlist = (names: readonly string[]) => {
  const entries = names.map((name) => ({
    detectionId: screened.items[name]!.detectionId,
    reason: `reason of ${name}`,
    nullResult: '=cmd() nothing would prove much',
  }));
  return screened.lead.put(`/surveys/${screened.surveyId}/shortlist`, { runId: screened.run.id, entries });
};
async function freeze(note = 'of a test') {
  const made = await screened.lead.post(editions(), { note });
  expect(made.status, made.text).toBe(201);
  const job = await jobEnd(screened.lead, made.body.jobId);
  expect(job.state, JSON.stringify(job.error)).toBe('done');
  return (await screened.lead.get(`/editions/${made.body.id}`)).body;
}
const bytesOf = async (path: string, client = screened.observer) =>
  Buffer.from(await (await client.raw('GET', path)).arrayBuffer());
async function archiveOf(id: string, name: string): Promise<string> {
  const path = join(folder, name);
  writeFileSync(path, await bytesOf(`/editions/${id}/export/archive`));
  return path;
}

describe('an edition', () => {
  it('is not made of an empty list, by someone else, or without a word', async () => {
    expect((await screened.lead.post(editions(), { note: 'x' })).body).toMatchObject({ status: 409 });
    for (const name of LISTED) await settle(screened, name);
    expect((await shortlist(LISTED)).status).toBe(200);
    expect((await screened.lead.post(editions(), { note: ' ' })).status).toBe(400);
    expect((await screened.reviewer.post(editions(), { note: 'x' })).status).toBe(403);
    expect((await screened.stranger.post(editions(), { note: 'x' })).status).toBe(404);
  });

  it('freezes list, words, inputs and ledger head under a number', async () => {
    const edition = await freeze('for deep imaging');
    expect(edition).toMatchObject({
      number: 1,
      state: 'frozen',
      note: 'for deep imaging',
      entries: 3,
      run: { number: 1 },
      supersedes: null,
      archive: { sha256: expect.stringMatching(/^[0-9a-f]{64}$/) },
    });
    expect(edition.list.map(({ verdict }: { verdict: { name: string } }) => verdict.name)).toEqual(LISTED);
    expect(edition.list[0]).toMatchObject({
      reason: 'reason of S12',
      said: [{ as: 'settled', note: 'Looked at; it stands.' }],
    });
    expect(edition.inputs.map(({ name }: { name: string }) => name)).toEqual([
      'small HI list',
      'small deep',
      'small redshifts',
    ]);
    expect(edition.methods).toMatch(/Sutherland & Saunders 1992/);
    const [last] = await ledgerOf(screened.lead, screened.surveyId);
    expect(last).toMatchObject({ action: 'froze an edition', note: 'for deep imaging' });
    expect((await screened.stranger.get(`/editions/${edition.id}`)).status).toBe(404);
  });

  it('stays as it was when the list, a word and the name of the survey change', async () => {
    const [first] = (await screened.observer.get(editions())).body.items;
    const before = (await screened.observer.get(`/editions/${first.id}`)).body;
    await settle(screened, 'S12', { note: 'Looked at again.' });
    await shortlist(['S10']);
    await screened.lead.patch(`/surveys/${screened.surveyId}`, { name: 'renamed' });
    const after = (await screened.observer.get(`/editions/${first.id}`)).body;
    expect(after).toEqual(before);
    await shortlist(LISTED);
  });

  it('is superseded by the next one, with the difference', async () => {
    const [first] = (await screened.observer.get(editions())).body.items;
    await settle(screened, 'S11');
    await shortlist(['S08', 'S12', 'S11']);
    const second = await freeze();
    expect(second).toMatchObject({ number: 2, supersedes: { id: first.id, number: 1 } });
    expect((await screened.observer.get(`/editions/${first.id}`)).body.supersededBy).toMatchObject({ number: 2 });
    const { body } = await screened.observer.get(`/editions/${second.id}/difference?from=${first.id}`);
    expect(body).toMatchObject({
      added: [{ name: 'S11', rank: 3 }],
      removed: [{ name: 'S10', rank: 3 }],
      runChanged: null,
      unchanged: 0,
    });
    expect(body.changed.map(({ name }: { name: string }) => name).sort()).toEqual(['S08', 'S12']);
    expect(body.changed[0].what.join()).toMatch(/rank/);
  });

  it('is handed out in every format and every table, guarded and with the caution', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    for (const format of EDITION_FORMATS) {
      const answer = await screened.observer.raw('GET', `/editions/${edition.id}/export/${format}`);
      expect(answer.status, format).toBe(200);
      expect(answer.headers.get('content-disposition'), format).toMatch(/^attachment; filename="edition-2/);
      expect((await answer.arrayBuffer()).byteLength, format).toBeGreaterThan(500);
    }
    for (const table of EDITION_TABLES) {
      const { status, text } = await screened.observer.get(
        `/editions/${edition.id}/export/csv?table=${table}&units=yes`,
      );
      expect(status, table).toBe(200);
      expect(text.split('\r\n')[0], table).toMatch(/^"?# .*screening result/);
    }
    const csv = (await screened.observer.get(`/editions/${edition.id}/export/csv`)).text;
    expect(csv).toContain(",'=cmd() nothing would prove much");
    const targets = (await screened.observer.get(`/editions/${edition.id}/export/targets`)).text;
    expect(targets).toMatch(/\n +1 \| +0\.\d{4} \| S08 +\| 10:\d\d:00\.00 \| \+04:00:00\.0 \| J2000/);
    const latex = (await screened.observer.get(`/editions/${edition.id}/export/latex`)).text;
    expect(latex).toMatch(/\\begin\{deluxetable\*\}[\s\S]*S08 &[\s\S]*\\enddata/);
    expect((await screened.observer.get(`/editions/${edition.id}/export/xlsx`)).status).toBe(400);
  });

  it('prints a page a source, with the faces of the application in it', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const pdf = await bytesOf(`/editions/${edition.id}/export/dossier`);
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
    expect(pdf.length / 3).toBeLessThan(300_000);
    const text = pdf.toString('latin1');
    expect(text).toMatch(/SourceSans3/);
    expect(text).toMatch(/RobotoMono/);
  });
});

describe('repeating an edition', () => {
  it('gives every number again, by button and by command', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const accepted = await screened.observer.post(`/editions/${edition.id}/replay`);
    expect(accepted.status, accepted.text).toBe(202);
    const job = await jobEnd(screened.observer, accepted.body.jobId);
    expect(job.result, JSON.stringify(job)).toMatchObject({ identical: true, detections: 12, differences: [] });
    const result = await replay(await archiveOf(edition.id, 'same.zip'));
    expect(result.sentence).toMatch(/^Identical: all 12 verdicts/);
  });

  it('refuses an archive in which one byte of an input was changed, naming it', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const forged = await repacked(await archiveOf(edition.id, 'whole.zip'), {
      'inputs/02-deep.csv': (bytes) => Buffer.from(bytes.toString().replace('17.5', '17.4')),
    });
    await expect(replay(forged)).rejects.toThrow(
      /^inputs\/02-deep\.csv was changed since the edition was frozen \(\d+ bytes as before; sha256/,
    );
  });

  it('tells what differs when the results are not those of the inputs', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const forged = await repacked(
      await archiveOf(edition.id, 'results.zip'),
      {
        'results/verdicts.jsonl': (bytes) =>
          Buffer.from(bytes.toString().replace('"starlight":"starlit"', '"starlight":"dark"')),
      },
      true,
    );
    const result = await replay(forged);
    expect(result.identical).toBe(false);
    expect(result.differences).toEqual(['S01: starlight "dark" → "starlit"']);
  });

  it('says of a damaged or foreign file what is wrong with it', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const bytes = readFileSync(await archiveOf(edition.id, 'damaged.zip'));
    const cut = join(folder, 'cut.zip');
    writeFileSync(cut, bytes.subarray(0, bytes.length / 2));
    await expect(replay(cut)).rejects.toThrow(ArchiveError);
    writeFileSync(cut, 'not a zip file at all');
    await expect(replay(cut)).rejects.toThrow(/cannot be opened as a zip archive/);
  });
});

describe('a guest link', () => {
  it('opens one edition to a browser without an account, until it is revoked', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const links = `/editions/${edition.id}/links`;
    expect((await screened.observer.post(links, { label: 'referee' })).status).toBe(403);
    const made = await screened.lead.post(links, { label: 'referee', expiresInDays: 7 });
    expect(made.status, made.text).toBe(201);
    const { token, id } = made.body;
    const guest = app.client();
    const seen = await guest.get(`/shared/${token}`);
    expect(seen.status).toBe(200);
    expect(seen.body.edition.list.map(({ rank }: { rank: number }) => rank)).toEqual([1, 2, 3]);
    const { detectionId } = seen.body.edition.list[0];
    expect((await guest.get(`/shared/${token}/detections/${detectionId}`)).body.verdict.name).toBe('S08');
    expect((await guest.get(`/shared/${token}/detections/${screened.items['S01']!.detectionId}`)).status).toBe(404);
    expect((await guest.get(`/shared/${token}/export/csv`)).text).toContain('S08');
    expect((await guest.get(`/editions/${edition.id}`)).status).toBe(401);
    const list = (await screened.lead.get(links)).body.items;
    expect(list[0]).toMatchObject({ label: 'referee', revokedAt: null, lastUsedAt: expect.any(String) });
    expect(JSON.stringify(list)).not.toContain(token);
    expect((await screened.observer.get(links)).status).toBe(403);
    expect((await screened.stranger.delete(`/links/${id}`)).status).toBe(404);
    expect((await screened.lead.delete(`/links/${id}`)).status).toBe(204);
    expect((await guest.get(`/shared/${token}`)).status).toBe(410);
    expect((await guest.get(`/shared/${token}/export/csv`)).status).toBe(410);
    expect((await guest.get(`/shared/${'x'.repeat(43)}`)).status).toBe(404);
    expect((await ledgerOf(screened.lead, screened.surveyId)).map(({ action }) => action).slice(0, 2)).toEqual([
      'revoked a guest link',
      'made a guest link',
    ]);
  });

  it('expires', async () => {
    const [edition] = (await screened.observer.get(editions())).body.items;
    const { body } = await screened.lead.post(`/editions/${edition.id}/links`, {
      label: 'soon over',
      expiresInDays: 1,
    });
    await app.db.execute(`update guest_links set expires_at = now() - interval '1 minute' where id = '${body.id}'`);
    const over = await app.client().get(`/shared/${body.token}`);
    expect(over.status).toBe(410);
    expect(over.body.detail).toMatch(/expired/);
  });
});

describe('the software version of an edition', () => {
  it('is that of the package', async () => {
    const { SOFTWARE_VERSION } = await import('@eremite/service/edition/software-version.ts');
    const version = execFileSync(process.execPath, ['-p', 'require("./package.json").version'], {
      cwd: join(import.meta.dirname, '../..'),
    });
    expect(version.toString().trim()).toBe(SOFTWARE_VERSION);
  });
});

/** The archive with some files changed; with the hashes of the changed ones set right where `honest`. */
async function repacked(
  path: string,
  changes: Record<string, (bytes: Buffer) => Buffer>,
  honest = false,
): Promise<string> {
  const place = mkdtempSync(join(folder, 'unpacked-'));
  await readArchive(path, place);
  const { files, ...head } = JSON.parse(readFileSync(join(place, MANIFEST), 'utf8'));
  const zip = new ZipFile();
  const entries: { path: string; sha256?: string; bytes?: number }[] = [...files];
  for (const file of entries) {
    const bytes = changes[file.path]?.(readFileSync(join(place, file.path))) ?? readFileSync(join(place, file.path));
    if (honest) Object.assign(file, { bytes: bytes.length, sha256: sha256(bytes) });
    zip.addBuffer(bytes, file.path);
  }
  zip.addBuffer(Buffer.from(JSON.stringify({ ...head, files: entries })), MANIFEST);
  zip.end();
  const pieces: Buffer[] = [];
  for await (const piece of zip.outputStream) pieces.push(piece as Buffer);
  writeFileSync(`${place}.zip`, Buffer.concat(pieces));
  return `${place}.zip`;
}
