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
import type { Companion } from './companions.ts';
import { IntakesRepository } from './intakes.repository.ts';

/** Uploaded files that are safely on disk: the table, and what came with it. */
export interface UploadedTable extends SavedFile {
  fileName: string;
  companions: Companion[];
}
const FIELD = 'file';
const READ_ME = 'readMe';
/** Files that make up one catalogue. */
export const MOST_PARTS = 200;

interface Received extends SavedFile {
  field: string;
  fileName: string;
}

/**
 * Streams the multipart fields `file` (one table, or several that are parts of one) and `readMe` to the file store, once
 * the person is known to be allowed to. Files whose request fails later on are removed again.
 */
@Injectable()
export class UploadInterceptor implements NestInterceptor {
  constructor(
    private readonly files: FilesService,
    private readonly access: AccessService,
    private readonly intakes: IntakesRepository,
  ) {}

  async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
    const http = context.switchToHttp();
    const request = http.getRequest<SignedInRequest & { upload?: UploadedTable }>();
    await this.access.survey(request.user!, await this.surveyOf(request.params), 'lead');
    const received = await this.receive(request, http.getResponse<Response>());
    request.upload = asTable(received);
    const discard = async (error: unknown): Promise<never> => {
      await this.discard(received);
      throw error;
    };
    return next.handle().pipe(catchError((error: unknown) => from(discard(error))));
  }

  /** A table comes to a survey; a further part to a table that is there. */
  private async surveyOf({ surveyId, id }: Record<string, unknown>): Promise<string> {
    const isId = (value: unknown): value is string => z.uuid().safeParse(value).success;
    if (isId(surveyId)) return surveyId;
    const row = isId(id) ? await this.intakes.find(id) : undefined;
    if (!row) throw new AppError('NOT_FOUND', 'There is no such survey or upload.');
    return row.surveyId;
  }

  private async discard(received: readonly Received[]): Promise<void> {
    await Promise.all(received.map(({ key }) => this.files.remove(key).catch(() => undefined)));
  }

  private receive(request: SignedInRequest, response: Response): Promise<Received[]> {
    const received: Received[] = [];
    const storage: multer.StorageEngine = {
      _handleFile: (_request, file, done) => {
        // In the order of the form, whichever is written first.
        const place = received.push(undefined as unknown as Received) - 1;
        this.files
          .save((file as { stream: Readable }).stream)
          .then((kept) => {
            received[place] = { ...kept, field: file.fieldname, fileName: shownName(file.originalname) };
            done(null, {});
          })
          .catch((error: Error) => done(error));
      },
      _removeFile: (_request, _file, done) => done(null),
    };
    const limits = { files: MOST_PARTS + 1, fields: 10, fieldSize: 4 * 1024 ** 2 };
    const upload = multer({ storage, limits, defParamCharset: 'utf8' }).fields([
      { name: FIELD, maxCount: MOST_PARTS },
      { name: READ_ME, maxCount: 1 },
    ]);
    return new Promise((resolve, reject) => {
      upload(request, response, (error: unknown) => {
        const saved = received.filter(Boolean);
        const none = !saved.some(({ field }) => field === FIELD);
        const fault =
          error ??
          (none
            ? new AppError('VALIDATION_FAILED', `Send the table as the multipart field "${FIELD}".`, [
                { pointer: `/${FIELD}`, detail: 'missing' },
              ])
            : undefined);
        if (fault === undefined) return resolve(saved);
        const told =
          fault instanceof multer.MulterError ? new AppError('VALIDATION_FAILED', multipartFault(fault)) : fault;
        void this.discard(saved).then(() => reject(told as Error));
      });
    });
  }
}

function asTable(received: readonly Received[]): UploadedTable {
  const [{ field: _field, ...table }, ...parts] = received.filter(({ field }) => field === FIELD) as [
    Received,
    ...Received[],
  ];
  const readMe = received.filter(({ field }) => field === READ_ME);
  const companion =
    (role: Companion['role']) =>
    ({ field: _, ...file }: Received): Companion => ({ role, ...file });
  return { ...table, companions: [...readMe.map(companion('readMe')), ...parts.map(companion('part'))] };
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
  if (code === 'LIMIT_UNEXPECTED_FILE') {
    const most = `at most ${MOST_PARTS} in "${FIELD}" and one in "${READ_ME}"`;
    return `Files must be in the field "${FIELD}", a ReadMe in "${READ_ME}", ${most}; found too many, or one in "${field ?? ''}".`;
  }
  return `The upload could not be read: ${message}.`;
}
