import type { Preview, PreviewRequest } from '@eremite/shared/contracts/preview';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Learnt } from '../../scoring/engine.ts';
import type { EngineOverride } from '../../scoring/engine-input.ts';
import type { PreviewedDetection } from './preview-messages.ts';
import { type DetectionPlace, PreviewTables } from './preview-tables.ts';
import { PreviewThread } from './preview-thread.ts';
import { engineDecisions, RunInputs } from './run-inputs.ts';
import { RunsRepository } from './runs.repository.ts';
import { VerdictsService } from './verdicts.service.ts';

/** Shows what a handful of detections would become under other criteria, without a run. */
@Injectable()
export class PreviewService {
  constructor(
    private readonly runs: RunsRepository,
    private readonly inputs: RunInputs,
    private readonly verdicts: VerdictsService,
    private readonly tables: PreviewTables,
    private readonly thread: PreviewThread,
    private readonly access: AccessService,
  ) {}

  async preview(user: SignedInUser, surveyId: string, request: PreviewRequest): Promise<Preview> {
    const began = performance.now();
    const { survey } = await this.access.survey(user, surveyId, 'review');
    const { places, catalogues } = await this.#chosen(surveyId, request);
    const latest = await this.runs.latestDone(surveyId);
    const learnt = (latest?.learnt ?? null) as Learnt | null;
    const about = {
      ...engineDecisions(await this.inputs.decisionsNow(survey, catalogues)),
      criteria: withoutDraws(request.settings),
    };
    const { tables, notes } = await this.tables.read(catalogues, places, about);
    const scored = await this.thread.score({ input: { ...about, tables }, learnt, wanted: places });
    const before = latest ? await this.verdicts.items(latest.id, request.detectionIds) : undefined;
    return {
      items: scored.map((one, i) =>
        describe(one, places[i]!, before?.get(places[i]!.id) ?? null, about.decisions.overrides),
      ),
      basedOn: latest && learnt ? { id: latest.id, number: latest.number } : null,
      notes: [
        latest && learnt
          ? `Priors and the relation of stars to gas are those run ${latest.number} learnt under criteria ${latest.criteriaNumber}; a run would learn them anew.`
          : 'No finished run has learnt anything yet: priors and the relation of stars to gas are those of the criteria.',
        'Draws and shifted positions are left out.',
        ...notes,
      ],
      seconds: (performance.now() - began) / 1000,
    };
  }

  async #chosen(surveyId: string, { detectionIds, catalogueIds }: PreviewRequest) {
    const found = new Map((await this.runs.detectionPlaces(surveyId, detectionIds)).map((place) => [place.id, place]));
    const places = [...new Set(detectionIds)].flatMap((id) => found.get(id) ?? []);
    if (places.length !== new Set(detectionIds).size)
      throw new AppError('NOT_FOUND', 'Some of these detections are not of this survey.');
    const catalogues = await this.runs.publishedCatalogues(surveyId, catalogueIds);
    if (catalogueIds && catalogues.length !== new Set(catalogueIds).size)
      throw new AppError('NOT_FOUND', 'Some of these catalogues are not published in this survey.');
    const ids = new Set(catalogues.map(({ id }) => id));
    if (places.some(({ catalogueId }) => !ids.has(catalogueId)))
      throw new AppError('VALIDATION_FAILED', 'The HI lists of these detections must be among the catalogues.', [
        { pointer: '/catalogueIds', detail: 'an HI list is missing' },
      ]);
    return { places, catalogues };
  }
}

/** Criteria without what takes many times as long as a verdict. */
function withoutDraws(settings: PreviewRequest['settings']): PreviewRequest['settings'] {
  const { robustness, control } = settings;
  return { ...settings, robustness: { ...robustness, draws: 0 }, control: { ...control, offsetsPerSource: 0 } };
}

function describe(
  { item, detail, candidates, neighbours }: PreviewedDetection,
  place: DetectionPlace,
  before: VerdictItem | null,
  overrides: readonly EngineOverride[],
): Preview['items'][number] {
  const own = overrides.filter(
    (entry) => entry.detectionCatalogueId === place.catalogueId && entry.detectionRow === place.row,
  );
  return {
    ...detail,
    verdict: {
      ...item,
      detectionId: place.id,
      settled: before?.settled ?? null,
      reviews: before?.reviews ?? 0,
      overrides: own.length,
    },
    candidates: candidates.map((candidate) => {
      const word = own.find((entry) => entry.catalogueId === candidate.catalogueId && entry.rowId === candidate.rowId);
      return { ...candidate, override: word?.action ?? null };
    }),
    neighbours,
    before,
  };
}
