import type { Criteria } from '@eremite/shared/contracts/criteria';
import type { Run } from '@eremite/shared/contracts/run';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { aStaffedSurvey, jobEnd } from '../builders.ts';
import type { Client } from '../client.ts';
import type { TestApp } from '../start-app.ts';

const ARCSEC = 1 / 3600;
/** Twelve detections two degrees (some 2.5 Mpc) apart at cz 5000 km/s, so that they are no neighbours of each other. */
export const NAMES = Array.from({ length: 12 }, (_, i) => `S${String(i + 1).padStart(2, '0')}`);
const places = NAMES.map((name, i) => ({ name, raDeg: 150 + 2 * (i % 4), decDeg: 2 + 2 * Math.floor(i / 4) }));
const csv = (head: string, rows: readonly (readonly (string | number)[])[]): string =>
  [head, ...rows.map((row) => row.join(','))].join('\n') + '\n';

/** The HI list: the same gas, width and signal everywhere, so that only the surroundings differ. */
export const HI_TABLE = {
  name: 'hi.csv',
  text: csv(
    'name,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr,reliability',
    places.map(({ name, raDeg, decDeg }) => [name, raDeg, decDeg, 5000, 80, 1.2, 10, 0.99]),
  ),
  settings: {
    kind: 'hi',
    name: 'small HI list',
    units: { ra: 'deg', dec: 'deg', velocity: 'km/s', flux: 'Jy km/s' },
    frame: 'icrs',
    velocity: { convention: 'optical', frame: 'barycentric' },
    beamArcsec: { major: 45, minor: 45, angleDeg: 0 },
  },
};

/** Deep photometry: S01 to S05 have a galaxy 2 arcsec north, S06 two as likely ones, the rest nothing. */
export const DEEP_TABLE = {
  name: 'deep.csv',
  text: csv('id,ra,dec,rmag', [
    ...places.slice(0, 5).map(({ raDeg, decDeg }, i) => [`d${i + 1}`, raDeg, decDeg + 2 * ARCSEC, 17.5]),
    ['d6a', places[5]!.raDeg, places[5]!.decDeg + 3 * ARCSEC, 17.5],
    ['d6b', places[5]!.raDeg, places[5]!.decDeg - 3 * ARCSEC, 17.5],
    ['far', 155, 10, 18],
  ]),
  settings: {
    kind: 'optical',
    name: 'small deep',
    columns: { name: 'id', ra: 'ra', dec: 'dec', magnitudes: [{ column: 'rmag', band: 'r' }] },
    units: { ra: 'deg', dec: 'deg' },
    frame: 'icrs',
    positionErrorArcsec: 0.2,
    errorMeaning: 'sigma1d',
    bands: [{ name: 'r', system: 'AB', depth5Sigma: 25.5, seeingFwhmArcsec: 1, extinction: 'none' }],
    footprint: { type: 'all-sky' },
  },
};

/** Redshifts: S07 has a bright neighbour 3 arcmin away (some 60 kpc) at nearly its velocity. */
export const REDSHIFT_TABLE = {
  name: 'redshifts.csv',
  text: csv('id,ra,dec,cz,rmag', [
    ['n7', places[6]!.raDeg, places[6]!.decDeg + 180 * ARCSEC, 5060, 14],
    ['behind', places[7]!.raDeg, places[7]!.decDeg + 200 * ARCSEC, 15000, 16],
  ]),
  settings: {
    kind: 'optical',
    name: 'small redshifts',
    columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', magnitudes: [{ column: 'rmag', band: 'r' }] },
    units: { ra: 'deg', dec: 'deg', velocity: 'km/s' },
    frame: 'icrs',
    velocity: { convention: 'optical', frame: 'barycentric' },
    positionErrorArcsec: 0.2,
    errorMeaning: 'sigma1d',
    bands: [{ name: 'r', system: 'AB', depth5Sigma: 18, extinction: 'none' }],
    redshiftDepth: { band: 'r', magnitude: 18 },
    footprint: { type: 'all-sky' },
  },
};

/** Uploads and publishes a table; answers the id of the catalogue. */
export async function aCatalogue(
  lead: Client,
  surveyId: string,
  table: { name: string; text: string; settings: object },
): Promise<string> {
  const { name, text, settings } = table;
  const intake = await lead.upload(`/surveys/${surveyId}/intakes`, name, text, { settings });
  if (intake.status !== 201) throw new Error(`the upload answered ${intake.status}: ${intake.text}`);
  const accepted = await lead.post(`/intakes/${intake.body.id}/publish`);
  if (accepted.status !== 202) throw new Error(`publishing answered ${accepted.status}: ${accepted.text}`);
  const job = await jobEnd(lead, accepted.body.jobId);
  if (job.state !== 'done') throw new Error(`publishing ended ${job.state}: ${JSON.stringify(job.error)}`);
  return job.result.catalogueId as string;
}

/** With a prior that lets a deep and empty place be called dark: twelve detections teach nothing. */
export const SETTINGS = { counterpart: { priorFraction: 0.9 } };

export async function someCriteria(lead: Client, surveyId: string, settings: object = SETTINGS): Promise<Criteria> {
  const answer = await lead.post(`/surveys/${surveyId}/criteria`, { settings, note: 'of a test' });
  if (answer.status !== 201) throw new Error(`criteria answered ${answer.status}: ${answer.text}`);
  return answer.body as Criteria;
}

/** Starts a run and waits for its end. */
export async function aRun(lead: Client, surveyId: string, criteriaId: string): Promise<Run> {
  const accepted = await lead.post(`/surveys/${surveyId}/runs`, { criteriaId });
  if (accepted.status !== 202) throw new Error(`the run answered ${accepted.status}: ${accepted.text}`);
  const job = await jobEnd(lead, accepted.body.jobId);
  if (job.state !== 'done') throw new Error(`the run ended ${job.state}: ${JSON.stringify(job.error)}`);
  return (await lead.get(`/runs/${accepted.body.runId}`)).body as Run;
}

/** A staffed survey with the three small tables published. */
export async function aFilledSurvey(app: TestApp) {
  const staff = await aStaffedSurvey(app);
  const surveyId = staff.survey.id;
  const hi = await aCatalogue(staff.lead, surveyId, HI_TABLE);
  const deep = await aCatalogue(staff.lead, surveyId, DEEP_TABLE);
  const redshifts = await aCatalogue(staff.lead, surveyId, REDSHIFT_TABLE);
  return { ...staff, surveyId, catalogues: { hi, deep, redshifts } };
}

/** The same with criteria and a finished run. */
export async function aScreenedSurvey(app: TestApp) {
  const filled = await aFilledSurvey(app);
  const criteria = await someCriteria(filled.lead, filled.surveyId);
  const run = await aRun(filled.lead, filled.surveyId, criteria.id);
  return { ...filled, criteria, run, items: await verdictsOf(filled.lead, run.id) };
}

/** All verdicts of a small run by the name of the detection. */
export async function verdictsOf(client: Client, runId: string): Promise<Record<string, VerdictItem>> {
  const { body } = await client.get(`/runs/${runId}/verdicts?limit=1000`);
  return Object.fromEntries((body.items as VerdictItem[]).map((item) => [item.name, item]));
}

/** The lead's last word on a detection: as computed, unless said otherwise. */
export async function settle(
  { lead, items, run }: Pick<Awaited<ReturnType<typeof aScreenedSurvey>>, 'lead' | 'items' | 'run'>,
  name: string,
  given: object = {},
): Promise<void> {
  const { detectionId, starlight, surroundings } = items[name]!;
  const word = { runId: run.id, starlight, surroundings, note: 'Looked at; it stands.', ...given };
  const answer = await lead.post(`/detections/${detectionId}/settlements`, word);
  if (answer.status >= 300) throw new Error(`settling ${name} answered ${answer.status}: ${answer.text}`);
}

/** Actions of the ledger, newest first. */
export async function ledgerOf(client: Client, surveyId: string) {
  const { body } = await client.get(`/surveys/${surveyId}/ledger`);
  return body.items as {
    action: string;
    subject: string;
    note: string;
    actor: string;
    detail: Record<string, unknown>;
  }[];
}
