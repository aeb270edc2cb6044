import { createReadStream } from 'node:fs';
import type {
  ImageFacts,
  Observation,
  ObservationFields,
  RasterQuery,
  SpectrumChannels,
  SpectrumFacts,
} from '@eremite/shared/contracts/observation';
import { Inject, Injectable } from '@nestjs/common';
import { AccessService, type Need } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import type { ImageLimits } from '../../images/image.ts';
import { DEFAULT_LIMITS } from '../../tables/table.ts';
import { FilesService, type SavedFile } from '../files/files.service.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { angleWords, byName, degreesOff } from './match-observation.ts';
import { ObservationThread } from './observation-thread.ts';
import { type ListedObservation, type ObservedDetection, ObservationsRepository } from './observations.repository.ts';

export type UploadedObservation = SavedFile & { fileName: string };

/** Images and spectra that show detections. Everyone of the team sees them; who may review may add some. */
@Injectable()
export class ObservationsService {
  constructor(
    private readonly rows: ObservationsRepository,
    private readonly files: FilesService,
    private readonly thread: ObservationThread,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async list(user: SignedInUser, detectionId: string): Promise<Observation[]> {
    const { role } = await this.detection(user, detectionId, 'read');
    return (await this.rows.of(detectionId)).map((row) => toContract(row, user, role));
  }

  /** A file of a given detection. @throws {AppError} OBSERVATION_UNREADABLE, OBSERVATION_ELSEWHERE, CONFLICT */
  async addTo(user: SignedInUser, detectionId: string, file: UploadedObservation, fields: ObservationFields) {
    const { detection } = await this.detection(user, detectionId, 'review');
    return this.add(user, [detection], file, fields, detection);
  }

  /** A file of a survey, whose detection is found by the place it shows, or by its name. */
  async addToSurvey(user: SignedInUser, surveyId: string, file: UploadedObservation, fields: ObservationFields) {
    await this.access.survey(user, surveyId, 'review');
    return this.add(user, await this.rows.detections(surveyId), file, fields);
  }

  async remove(user: SignedInUser, id: string): Promise<void> {
    const { row, detection, role } = await this.one(user, id, 'review');
    if (row.uploadedBy !== user.id && role !== 'lead') {
      throw new AppError('NOT_ALLOWED', 'Only leads and who uploaded it may remove it.');
    }
    await this.rows.transaction(async (tx) => {
      await this.rows.remove(id, tx);
      const detail = { detectionId: detection.id, fileName: row.fileName, sha256: row.sha256 };
      const action = row.kind === 'image' ? 'removed an image' : 'removed a spectrum';
      const entry = { surveyId: detection.surveyId, actor: user, action, subject: detection.name, detail };
      await this.ledger.append(entry, tx);
    });
    await this.files.remove(row.fileKey);
  }

  async download(user: SignedInUser, id: string) {
    const { row } = await this.one(user, id, 'read');
    return { fileName: row.fileName, bytes: row.bytes, stream: createReadStream(this.files.path(row.fileKey)) };
  }

  /** Values of an image on a square about its detection. */
  async raster(user: SignedInUser, id: string, { halfArcsec, pixels }: RasterQuery): Promise<Float32Array> {
    const { row, detection } = await this.one(user, id, 'read');
    if (row.kind !== 'image') throw new AppError('NOT_FOUND', 'A spectrum has no raster.');
    const square = { raDeg: detection.raDeg, decDeg: detection.decDeg, halfArcsec, pixels };
    return this.thread.ask({ what: 'raster', path: this.files.path(row.fileKey), limits: this.limits, square });
  }

  async channels(user: SignedInUser, id: string): Promise<SpectrumChannels> {
    const { row } = await this.one(user, id, 'read');
    if (row.kind !== 'spectrum') throw new AppError('NOT_FOUND', 'An image has no channels.');
    return (await this.rows.channels(id)) as SpectrumChannels;
  }

  private get limits(): ImageLimits {
    return { ...DEFAULT_LIMITS, maxBytes: 2 ** 30, maxPixels: this.env.maxImagePixels };
  }

  private async add(
    user: SignedInUser,
    detections: ObservedDetection[],
    file: UploadedObservation,
    fields: ObservationFields,
    wanted?: ObservedDetection,
  ): Promise<Observation> {
    const path = this.files.path(file.key);
    const kind = await this.thread.ask({ what: 'recognise', path, limits: this.limits });
    const read =
      kind === 'image'
        ? await this.readImage(path, detections, file, wanted)
        : await this.readSpectrum(path, detections, file, fields, wanted);
    const { detection, facts, channels } = read;
    const label =
      fields.label ||
      (facts as Partial<ImageFacts>).filter ||
      file.fileName.replace(/\.(fits?|csv|xml|vot|gz)\b/gi, '');
    const id = await this.rows.transaction(async (tx) => {
      if (await this.rows.same(detection.id, file.sha256, tx)) {
        throw new AppError('CONFLICT', `${detection.name} has this very file already.`);
      }
      const { key: fileKey, bytes, sha256, fileName } = file;
      const id = await this.rows.insert(
        {
          detectionId: detection.id,
          kind,
          label,
          fileName,
          bytes,
          sha256,
          fileKey,
          facts,
          channels,
          uploadedBy: user.id,
        },
        tx,
      );
      const action = kind === 'image' ? 'added an image' : 'added a spectrum';
      const detail = { detectionId: detection.id, fileName, label, sha256 };
      await this.ledger.append(
        { surveyId: detection.surveyId, actor: user, action, subject: detection.name, detail },
        tx,
      );
      return id;
    });
    const { role } = await this.access.survey(user, detection.surveyId, 'review');
    return toContract((await this.rows.find(id))!, user, role);
  }

  private async readImage(
    path: string,
    detections: ObservedDetection[],
    { fileName }: UploadedObservation,
    wanted: ObservedDetection | undefined,
  ) {
    const { facts, inside } = await this.thread.ask({
      what: 'image',
      path,
      limits: this.limits,
      places: detections.map(({ raDeg, decDeg }) => ({ raDeg, decDeg })),
    });
    const byDistance = [...detections.keys()].sort(
      (a, b) => degreesOff(facts, detections[a]!) - degreesOff(facts, detections[b]!),
    );
    const shown = byDistance.filter((i) => inside[i]).map((i) => detections[i]!);
    const detection = wanted ? shown[0] : (byName(shown, fileName, facts.object) ?? shown[0]);
    if (detection) return { detection, facts, channels: null };
    const nearest = detections[byDistance[0]!];
    const where = nearest
      ? `${wanted ? '' : 'The nearest detection, '}${nearest.name}${wanted ? '' : ','} lies ${angleWords(degreesOff(facts, nearest))} from the middle of the image, outside it.`
      : 'The survey has no published detections.';
    throw new AppError('OBSERVATION_ELSEWHERE', where);
  }

  private async readSpectrum(
    path: string,
    detections: ObservedDetection[],
    { fileName }: UploadedObservation,
    { convention, frame, fluxUnit }: ObservationFields,
    wanted: ObservedDetection | undefined,
  ) {
    const detection = wanted ?? byName(detections, fileName);
    if (!detection) {
      throw new AppError(
        'OBSERVATION_ELSEWHERE',
        'A spectrum says nothing of its place: name the file after its detection, or upload it on the page of the detection.',
      );
    }
    const place = {
      raDeg: detection.raDeg,
      decDeg: detection.decDeg,
      velocityKms: detection.velocityKms,
      width50Kms: detection.width50Kms,
    };
    const settings = { convention, frame, fluxUnit };
    return { detection, ...(await this.thread.ask({ what: 'spectrum', path, limits: this.limits, place, settings })) };
  }

  private async detection(user: SignedInUser, id: string, need: Need) {
    const detection = await this.rows.detection(id);
    if (!detection) throw new AppError('NOT_FOUND', 'There is no such detection.');
    const { role } = await this.access.survey(user, detection.surveyId, need);
    return { detection, role };
  }

  private async one(user: SignedInUser, id: string, need: Need) {
    const found = await this.rows.find(id);
    if (!found) throw new AppError('NOT_FOUND', 'There is no such image or spectrum.');
    const { role } = await this.access.survey(user, found.detection.surveyId, need);
    return { ...found, role };
  }
}

function toContract({ row, detection, by }: ListedObservation, user: SignedInUser, role: string): Observation {
  return {
    id: row.id,
    detectionId: row.detectionId,
    detectionName: detection.name,
    label: row.label,
    fileName: row.fileName,
    bytes: row.bytes,
    sha256: row.sha256,
    uploadedBy: by,
    createdAt: row.createdAt.toISOString(),
    mayDelete: role === 'lead' || (role === 'reviewer' && row.uploadedBy === user.id),
    image: row.kind === 'image' ? (row.facts as ImageFacts) : null,
    spectrum: row.kind === 'spectrum' ? (row.facts as SpectrumFacts) : null,
  };
}
