import type { Readable } from 'node:stream';
import { OBSERVATION_BYTES } from '@eremite/shared/contracts/observation';
import { type CallHandler, type ExecutionContext, Injectable, type NestInterceptor } from '@nestjs/common';
import type { Response } from 'express';
import multer from 'multer';
import { catchError, from, type Observable } from 'rxjs';
import { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInRequest } from '../../common/signed-in-user.ts';
import { FilesService } from '../files/files.service.ts';
import { ObservationsRepository } from './observations.repository.ts';
import type { UploadedObservation } from './observations.service.ts';

const FIELD = 'file';
export type ObservationRequest = SignedInRequest & { observation?: UploadedObservation };

/**
 * Streams one file to the store once the person is known to be allowed to add one. A file whose request fails later on is
 * removed again.
 */
@Injectable()
export class ObservationUpload implements NestInterceptor {
  constructor(
    private readonly files: FilesService,
    private readonly access: AccessService,
    private readonly rows: ObservationsRepository,
  ) {}

  async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
    const http = context.switchToHttp();
    const request = http.getRequest<ObservationRequest>();
    await this.access.survey(request.user!, await this.surveyOf(request.params), 'review');
    const saved = await this.receive(request, http.getResponse<Response>());
    request.observation = saved;
    const discard = async (error: unknown): Promise<never> => {
      await this.files.remove(saved.key).catch(() => undefined);
      throw error;
    };
    return next.handle().pipe(catchError((error: unknown) => from(discard(error))));
  }

  private async surveyOf({ surveyId, id }: Record<string, unknown>): Promise<string> {
    const isId = (value: unknown): value is string => z.uuid().safeParse(value).success;
    if (isId(surveyId)) return surveyId;
    const detection = isId(id) ? await this.rows.detection(id) : undefined;
    if (!detection) throw new AppError('NOT_FOUND', 'There is no such survey or detection.');
    return detection.surveyId;
  }

  private receive(request: SignedInRequest, response: Response): Promise<UploadedObservation> {
    let saved: UploadedObservation | undefined;
    const storage: multer.StorageEngine = {
      _handleFile: (_request, file, done) => {
        this.files
          .save((file as { stream: Readable }).stream, OBSERVATION_BYTES)
          .then((kept) => {
            saved = { ...kept, fileName: shownName(file.originalname) };
            done(null, {});
          })
          .catch((error: Error) => done(error));
      },
      _removeFile: (_request, _file, done) => done(null),
    };
    const limits = { files: 1, fields: 10, fieldSize: 10_000 };
    const upload = multer({ storage, limits, defParamCharset: 'utf8' }).single(FIELD);
    return new Promise((resolve, reject) => {
      upload(request, response, (error: unknown) => {
        if (error === undefined && saved) return resolve(saved);
        const fault =
          error instanceof multer.MulterError || error === undefined
            ? new AppError('VALIDATION_FAILED', `Send one file as the multipart field "${FIELD}".`, [
                { pointer: `/${FIELD}`, detail: error === undefined ? 'missing' : error.message },
              ])
            : (error as Error);
        const removed = saved ? this.files.remove(saved.key).catch(() => undefined) : Promise.resolve();
        void removed.then(() => reject(fault));
      });
    });
  }
}

const shownName = (given: string): string =>
  given
    .replace(/\p{Cc}/gu, '')
    .trim()
    .slice(0, 200) || 'observation';
