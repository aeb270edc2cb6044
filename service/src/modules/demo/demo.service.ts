import { createReadStream } from 'node:fs';
import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { createOverrideRequest, createReviewRequest, settleRequest } from '@eremite/shared/contracts/review';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import type { DemoFiller } from '../../common/demo-filler.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { JobsService } from '../../jobs/jobs.service.ts';
import { AuthService } from '../auth/auth.service.ts';
import { CriteriaService } from '../criteria/criteria.service.ts';
import { FilesService } from '../files/files.service.ts';
import { IntakesService } from '../intakes/intakes.service.ts';
import { AssignmentsService } from '../reviews/assignments.service.ts';
import { OverridesService } from '../reviews/overrides.service.ts';
import { ReviewsService } from '../reviews/reviews.service.ts';
import { SettlementsService } from '../reviews/settlements.service.ts';
import { RunsService } from '../runs/runs.service.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { EditionsService } from '../editions/editions.service.ts';
import { ShortlistsService } from '../shortlists/shortlists.service.ts';
import { SurveysService } from '../surveys/surveys.service.ts';
import { TeamsRepository } from '../teams/teams.repository.ts';
import { DemoObservations } from './demo-observations.ts';
import { DEMO_TABLES, demoFile } from './demo-tables.ts';

const PEOPLE: readonly { email: string; name: string; role: TeamRole | 'administrator' }[] = [
  { email: 'lead@eremite.example', name: 'Mira Halden', role: 'lead' },
  { email: 'reviewer@eremite.example', name: 'Osei Lindqvist', role: 'reviewer' },
  { email: 'observer@eremite.example', name: 'Tamsin Orrell', role: 'observer' },
  { email: 'admin@eremite.example', name: 'Ruth Calder', role: 'administrator' },
];

/** Fills an empty installation with the Halcyon Strip, by the same services that people use. */
@Injectable()
export class DemoService implements DemoFiller {
  constructor(
    private readonly auth: AuthService,
    private readonly teams: TeamsRepository,
    private readonly surveys: SurveysService,
    private readonly files: FilesService,
    private readonly intakes: IntakesService,
    private readonly criteria: CriteriaService,
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsService,
    private readonly reviews: ReviewsService,
    private readonly settlements: SettlementsService,
    private readonly assignments: AssignmentsService,
    private readonly overrides: OverridesService,
    private readonly shortlists: ShortlistsService,
    private readonly editions: EditionsService,
    private readonly jobs: JobsService,
    private readonly observations: DemoObservations,
  ) {}

  async fill({ password, report }: { password: string; report: (message: string) => void }) {
    const { lead, reviewer, teamId } = await this.#people(password);
    const survey = await this.surveys.create(lead, {
      teamId,
      name: 'Halcyon Strip',
      description: 'A deep HI strip of the demo: an invented survey with invented galaxies.',
      cosmology: { h0: 70, omegaM: 0.3 },
    });
    for (const table of DEMO_TABLES) {
      report(`the demo: ${table.settings.name}`);
      await this.#publish(lead, survey.id, table);
    }
    const criteria = await this.criteria.create(lead, survey.id, {
      settings: criteriaSettings.parse({}),
      note: 'The defaults.',
    });
    report('the demo: a run');
    const { runId, jobId } = await this.runs.start(lead, survey.id, { criteriaId: criteria.id });
    await this.#done(jobId);
    report('the demo: images and spectra');
    await this.observations.fill(lead, survey.id);
    report('the demo: reviews');
    await this.#review(lead, reviewer, survey.id, runId);
    return PEOPLE.map(({ email, role }) => ({ email, role }));
  }

  async #people(password: string) {
    const teamId = await this.teams.insertTeam('Halcyon team');
    const accounts = new Map<string, SignedInUser>();
    for (const { email, name, role } of PEOPLE) {
      const isAdministrator = role === 'administrator';
      const { id } = await this.auth.createAccount({ email, password, name, isAdministrator });
      if (!isAdministrator) await this.teams.join(teamId, id, role);
      accounts.set(role, { id, email, name, isAdministrator, scope: 'write' });
    }
    return { lead: accounts.get('lead')!, reviewer: accounts.get('reviewer')!, teamId };
  }

  async #publish(
    lead: SignedInUser,
    surveyId: string,
    { file, settings }: (typeof DEMO_TABLES)[number],
  ): Promise<void> {
    const saved = await this.files.save(createReadStream(demoFile(file)));
    const intake = await this.intakes.create(lead, surveyId, { ...saved, fileName: file }, settings);
    const { jobId } = await this.intakes.publish(lead, intake.id);
    await this.#done(jobId);
  }

  async #done(jobId: string): Promise<void> {
    const job = await this.jobs.settled(jobId);
    if (job.state !== 'done') throw new Error(`the demo could not be made: ${job.error?.detail ?? job.state}`);
  }

  /** A few words of people, so that every screen has something to show. */
  async #review(lead: SignedInUser, reviewer: SignedInUser, surveyId: string, runId: string): Promise<void> {
    const docket = (await this.verdicts.page(runId, {}, { limit: 60, sort: 'docket' })).items;
    const detectionIds = docket.map((item) => item.detectionId);
    await this.assignments.assign(lead, surveyId, { detectionIds, userId: reviewer.id }, true);
    const dark = docket.filter((item) => item.starlight === 'dark');
    const word = ({ starlight, surroundings }: VerdictItem) => ({ runId, starlight, surroundings });
    for (const item of dark.slice(0, 3))
      await this.reviews.create(reviewer, item.detectionId, createReviewRequest.parse(word(item)));
    const nearlyDark = docket.find((item) => item.starlight === 'nearly dark');
    if (nearlyDark) {
      const note = 'Faint but plain in both bands; its light is that of a diffuse dwarf.';
      const departure = createReviewRequest.parse({ ...word(nearlyDark), starlight: 'starlit', note });
      await this.reviews.create(reviewer, nearlyDark.detectionId, departure);
      const settled = 'Ordinary in shape, not in its gas-to-light ratio; nearly dark stands.';
      const settling = settleRequest.parse({ ...word(nearlyDark), note: settled });
      await this.settlements.settle(lead, nearlyDark.detectionId, settling);
    }
    const contested = docket.find((item) => item.starlight === 'contested' && item.counterpart);
    if (contested?.counterpart) {
      const { catalogueId, rowId } = contested.counterpart;
      const note = 'Red and smooth: a background galaxy. The bluer one beside it is the likelier host.';
      const rejection = createOverrideRequest.parse({ catalogueId, rowId, action: 'reject', note });
      await this.overrides.create(reviewer, contested.detectionId, rejection);
    }
    const listed = dark.filter((item) => item.surroundings === 'alone');
    if (listed.length > 0) await this.#handOn(lead, surveyId, runId, listed);
  }

  /** Settles what is dark and alone, puts it on the shortlist and freezes a first edition. */
  async #handOn(lead: SignedInUser, surveyId: string, runId: string, listed: readonly VerdictItem[]): Promise<void> {
    for (const { detectionId, starlight, surroundings } of listed) {
      const note =
        'Nothing in any band of the deep imaging inside the search; the depth is enough. The verdict stands.';
      const settling = settleRequest.parse({ runId, starlight, surroundings, note });
      await this.settlements.settle(lead, detectionId, settling);
    }
    const entries = listed.map((item) => ({
      detectionId: item.detectionId,
      reason: `P(none) ${item.pNone.toFixed(2)}, alone to M_r -17.`,
      nullResult: 'Nothing to 29 mag per square arcsec would leave no room for an ordinary dwarf.',
    }));
    await this.shortlists.put(lead, surveyId, { runId, entries }, undefined);
    const note = 'First list for deep imaging in the coming semester.';
    const { jobId } = await this.editions.create(lead, surveyId, { note }, undefined);
    await this.#done(jobId!);
  }
}
