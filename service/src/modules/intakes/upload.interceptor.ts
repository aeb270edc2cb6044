import type { Readable } from 'node:stream';
import { type CallHandler, type ExecutionContext, Injectable, type NestInterceptor } from '@nestjs/common';
import type { Response } from 'express';
import multer from 'multer';
import { catchError, from, type Observable } from 'rxjs';
import { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInRequest } from '../../common/signed-in-user.ts';
import { FilesService, type SavedFile } from '../files/files.service.ts';

/** An uploaded file that is safely on disk. */
export interface UploadedTable extends SavedFile {
  fileName: string;
}
const FIELD = 'file';

/**
 * Streams the multipart field `file` to the file store, once the person is known to be allowed to. A file whose request
 * fails later on is removed again.
 */
@Injectable()
export class UploadInterceptor implements NestInterceptor {
  constructor(
    private readonly files: FilesService,
    private readonly access: AccessService,
  ) {}

  async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
    const http = context.switchToHttp();
    const request = http.getRequest<SignedInRequest & { file?: unknown; upload?: UploadedTable }>();
    const surveyId = z.uuid().safeParse(request.params['surveyId']);
    if (!surveyId.success) throw new AppError('NOT_FOUND', 'There is no such survey.');
    await this.access.survey(request.user!, surveyId.data, 'lead');
    const upload = await this.receive(request, http.getResponse<Response>());
    request.upload = upload;
    const discard = async (error: unknown): Promise<never> => {
      await this.files.remove(upload.key).catch(() => undefined);
      throw error;
    };
    return next.handle().pipe(catchError((error: unknown) => from(discard(error))));
  }

  private receive(request: SignedInRequest, response: Response): Promise<UploadedTable> {
    let saved: UploadedTable | undefined;
    const storage: multer.StorageEngine = {
      _handleFile: (_request, file, done) => {
        this.files
          .save((file as { stream: Readable }).stream)
          .then((kept) => {
            saved = { ...kept, fileName: shownName(file.originalname) };
            done(null, {});
          })
          .catch((error: Error) => done(error));
      },
      _removeFile: (_request, _file, done) => done(null),
    };
    const limits = { files: 1, fields: 10, fieldSize: 4 * 1024 ** 2 };
    const upload = multer({ storage, limits, defParamCharset: 'utf8' }).single(FIELD);
    return new Promise((resolve, reject) => {
      upload(request, response, (error: unknown) => {
        if (error === undefined || error === null) {
          if (saved) resolve(saved);
          else
            reject(
              new AppError('VALIDATION_FAILED', `Send the table as the multipart field "${FIELD}".`, [
                { pointer: `/${FIELD}`, detail: 'missing' },
              ]),
            );
          return;
        }
        const told =
          error instanceof multer.MulterError ? new AppError('VALIDATION_FAILED', multipartFault(error)) : error;
        const gone = saved ? this.files.remove(saved.key).catch(() => undefined) : Promise.resolve();
        void gone.then(() => reject(told as Error));
      });
    });
  }
}

/** The name as it is shown and stored: the file itself lies under a key of its own. */
function shownName(given: string): string {
  return (
    given
      .replace(/\p{Cc}/gu, '')
      .trim()
      .slice(0, 255) || 'table'
  );
}

function multipartFault({ code, field, message }: multer.MulterError): string {
  if (code === 'LIMIT_UNEXPECTED_FILE')
    return `The file must be in the field "${FIELD}", one at a time; found it in "${field ?? ''}".`;
  return `The upload could not be read: ${message}.`;
}
