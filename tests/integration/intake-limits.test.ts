import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aStaffedSurvey } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

describe('the limits of an installation', () => {
  let app: TestApp;
  let staff: Awaited<ReturnType<typeof aStaffedSurvey>>;
  beforeAll(async () => {
    app = await startApp({ maxUploadBytes: 5000, tableLimits: { maxBytes: 4000, maxColumns: 3, maxCellLength: 50 } });
    staff = await aStaffedSurvey(app);
  });
  afterAll(() => app.close());
  const upload = (text: string) => staff.lead.upload(`/surveys/${staff.survey.id}/intakes`, 'table.csv', text);

  it('on the file are told', async () => {
    const { status, body } = await upload(`ra,dec\n${'1.5,2.5\n'.repeat(700)}`);
    expect(status).toBe(413);
    expect(body.detail).toMatch(/5000 bytes/);
  });
  it('on its contents are told, with the mend', async () => {
    const { status, body } = await upload(`ra,dec\n${'1.5,2.5\n'.repeat(550)}`);
    expect(status).toBe(422);
    expect(body.detail).toMatch(/more than the limit of 4000\. .*raised/);
  });
  it('on columns are told, with the mend', async () => {
    const { status, body } = await upload('ra,dec,a,b\n1.5,2.5,3,4\n');
    expect(status).toBe(422);
    expect(body.detail).toMatch(/4 columns, more than the limit of 3.*raised/);
  });
  it('on cells put the row aside with the reason', async () => {
    const { status, body } = await upload(`ra,dec,note\n1.5,2.5,short\n1.6,2.6,${'x'.repeat(51)}\n`);
    expect(status).toBe(201);
    expect(body.check.reasons).toMatchObject([{ reason: 'Cell 3 is longer than the limit of 50 bytes.', count: 1 }]);
  });
});
