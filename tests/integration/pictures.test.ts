import type { Field } from '@eremite/shared/contracts/field';
import type { SurveyPlots } from '@eremite/shared/contracts/plot';
import type { WhatIf } from '@eremite/shared/contracts/what-if';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { aScreenedSurvey, SETTINGS } from '../support/builders/small-survey.ts';
import { aStaffedSurvey } from '../support/builders.ts';
import { startApp, type TestApp } from '../support/start-app.ts';

let app: TestApp;
let screened: Awaited<ReturnType<typeof aScreenedSurvey>>;
beforeAll(async () => {
  app = await startApp();
  screened = await aScreenedSurvey(app);
});
afterAll(() => app.close());
const fieldOf = async (name: string, radiusArcsec: number) => {
  const { detectionId } = screened.items[name]!;
  const path = `/runs/${screened.run.id}/detections/${detectionId}/field?radiusArcsec=${radiusArcsec}`;
  return screened.observer.get(path);
};

describe('the field of a detection', () => {
  it('holds every row of the run within the radius, whether or not it bears on the verdict', async () => {
    const { body, status, text } = await fieldOf('S08', 240);
    expect(status, text).toBe(200);
    const field = body as Field;
    expect(field.isCut).toBe(false);
    expect(field.tables.map(({ name, kind, inside }) => [name, kind, inside])).toEqual([
      ['small HI list', 'hi', 0],
      ['small deep', 'optical', 0],
      ['small redshifts', 'optical', 1],
    ]);
    const redshifts = field.tables[2]!;
    expect(redshifts).toMatchObject({
      rowId: [2],
      objectName: ['behind'],
      band: ['r'],
      magnitude: [16],
      isStar: [false],
    });
    expect(redshifts.separationArcsec[0]).toBeCloseTo(200, 6);
    // (15 000 - 5000) / (1 + 5000 / 299 792.458), by hand.
    expect(redshifts.velocityDifferenceKms[0]).toBeCloseTo(9835.96, 1);
  });

  it('ends at the radius', async () => {
    const inside = async (radius: number) => ((await fieldOf('S07', radius)).body as Field).tables[2]!.inside;
    expect(await inside(179)).toBe(0);
    expect(await inside(181)).toBe(1);
  });

  it('leaves the detection itself out and shows other HI detections with their beam', async () => {
    const { body } = await fieldOf('S01', 7200);
    const hi = (body as Field).tables[0]!;
    expect(hi.objectName).not.toContain('S01');
    expect(hi.objectName).toEqual(expect.arrayContaining(['S02', 'S05']));
    expect(hi.beamArcsec).toEqual({ major: 45, minor: 45, angleDeg: 0 });
  });

  it('refuses a radius beyond two degrees and a detection that the run does not know', async () => {
    expect((await fieldOf('S01', 7201)).status).toBe(400);
    const path = `/runs/${screened.run.id}/detections/00000000-0000-4000-8000-000000000000/field?radiusArcsec=10`;
    expect((await screened.observer.get(path)).status).toBe(404);
  });
});

describe('what if the distance were another', () => {
  const whatIfOf = async (name: string) => {
    const { detectionId } = screened.items[name]!;
    const answer = await screened.observer.get(`/runs/${screened.run.id}/detections/${detectionId}/what-if`);
    expect(answer.status, answer.text).toBe(200);
    return answer.body as WhatIf;
  };

  it('is answered from a third of the distance in use to three times it, in order', async () => {
    const { points } = await whatIfOf('S01');
    const { distance } = (
      await screened.lead.get(`/runs/${screened.run.id}/detections/${screened.items['S01']!.detectionId}`)
    ).body;
    expect(points[0]!.angularMpc).toBeCloseTo(distance.angularMpc / 3, 6);
    expect(points.at(-1)!.angularMpc).toBeCloseTo(distance.angularMpc * 3, 6);
    const mpc = points.map(({ angularMpc }) => angularMpc);
    expect(mpc).toEqual([...mpc].sort((a, b) => a - b));
  });

  it('says what a run would say had that distance been entered', async () => {
    const { points, distanceFraction } = await whatIfOf('S07');
    const { detectionId } = screened.items['S07']!;
    for (const k of [5, Math.floor(points.length / 2), points.length - 6]) {
      const point = points[k]!;
      const distance = {
        distanceMpc: point.angularMpc,
        errorMpc: distanceFraction! * point.angularMpc,
        source: 'a test',
        note: 'to compare',
      };
      const patched = await screened.lead.patch(`/detections/${detectionId}`, distance);
      expect(patched.status, patched.text).toBe(200);
      const request = { settings: SETTINGS, detectionIds: [detectionId] };
      const { verdict } = (await screened.lead.post(`/surveys/${screened.surveyId}/preview`, request)).body.items[0];
      expect({ ...point, nearest: null }).toEqual({
        distanceMpc: expect.closeTo(verdict.distanceMpc, 9),
        angularMpc: point.angularMpc,
        searchRadiusArcsec: expect.any(Number),
        logHiMass: expect.closeTo(verdict.logHiMass, 9),
        starlight: verdict.starlight,
        pNone: expect.closeTo(verdict.pNone, 9),
        pMissed: expect.closeTo(verdict.pMissed, 9),
        power: expect.closeTo(verdict.power, 9),
        surroundings: verdict.surroundings,
        pAlone: verdict.pAlone === null ? null : expect.closeTo(verdict.pAlone, 9),
        nearest: null,
      });
      expect(point.nearest?.separationKpc).toBeCloseTo(verdict.nearest.separationKpc, 6);
    }
  });

  it('looks closer where a verdict changes', async () => {
    const { points } = await whatIfOf('S07');
    const changes = points.slice(1).filter((point, i) => point.surroundings !== points[i]!.surroundings);
    for (const after of changes) {
      const before = points[points.indexOf(after) - 1]!;
      // 48 steps over a factor of nine, each in eight: 0.57 per cent.
      expect(after.angularMpc / before.angularMpc).toBeLessThan(1.006);
    }
  });
});

describe('the plots of a run', () => {
  it('hold a point a detection, with the numbers of its verdict', async () => {
    const { body, status, text } = await screened.observer.get(`/runs/${screened.run.id}/plots`);
    expect(status, text).toBe(200);
    const plots = body as SurveyPlots;
    expect(plots.points.map(({ name }) => name)).toEqual(Object.keys(screened.items));
    for (const point of plots.points) {
      const item = screened.items[point.name]!;
      expect(point.pNoStarlight).toBeCloseTo(item.pNone + item.pMissed + item.pSpurious, 9);
      expect(point).toMatchObject({
        detectionId: item.detectionId,
        starlight: item.starlight,
        surroundings: item.surroundings,
        pAlone: item.pAlone,
        logHiMass: item.logHiMass,
        lightIsLimit: item.gasToLightIsLimit,
      });
      expect(10 ** (point.logHiMass! - point.logLight!)).toBeCloseTo(item.gasToLight!, 6);
    }
  });

  it('are a table too, with the screening caution', async () => {
    const { text, status } = await screened.observer.get(`/runs/${screened.run.id}/plots?format=csv`);
    expect(status).toBe(200);
    expect(text).toContain('screening result, not a discovery');
    const lines = text.split('\n').filter((line) => line !== '' && !line.startsWith('#'));
    expect(lines[0]).toMatch(/^detection,starlight,surroundings,p_no_starlight,p_alone,log_mhi,/);
    expect(lines).toHaveLength(1 + 12);
  });
});

it('no picture is served to another team', async () => {
  const stranger = await aStaffedSurvey(app);
  const { detectionId } = screened.items['S01']!;
  for (const part of [
    'plots',
    `detections/${detectionId}/what-if`,
    `detections/${detectionId}/field?radiusArcsec=60`,
  ]) {
    expect((await stranger.lead.get(`/runs/${screened.run.id}/${part}`)).status, part).toBe(404);
  }
});
