import { createReadStream } from 'node:fs';
import { Readable } from 'node:stream';
import { ATTACHMENT_BYTES, type Attachment } from '@eremite/shared/contracts/attachment';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Database } from '../../database/database.ts';
import { FilesService } from '../files/files.service.ts';
import { attachmentType } from './attachment-type.ts';
import { type AttachmentRow, AttachmentsRepository } from './attachments.repository.ts';
import { DetectionAccess } from './detection-access.ts';

/** Most files of one person that wait for their note; more are forgotten ones. */
const MOST_WAITING = 50;

/** Files that go with a note: uploaded first, then named by the decision they belong to. */
@Injectable()
export class AttachmentsService {
  constructor(
    private readonly attachments: AttachmentsRepository,
    private readonly files: FilesService,
    private readonly access: DetectionAccess,
  ) {}

  /** @throws {AppError} TOO_LARGE, or VALIDATION_FAILED where it is no kind that may go with a note */
  async upload(
    user: SignedInUser,
    detectionId: string,
    file: { name: string; bytes: Uint8Array },
  ): Promise<Attachment> {
    await this.access.detection(user, detectionId, 'review');
    if (file.bytes.length > ATTACHMENT_BYTES)
      throw new AppError('TOO_LARGE', `An attachment has at most ${ATTACHMENT_BYTES / 1e6} MB.`);
    const mediaType = attachmentType(file.bytes, file.name);
    if (!mediaType) {
      const detail = 'An attachment is a PNG or JPEG picture, a PDF, a FITS image, or plain text.';
      throw new AppError('VALIDATION_FAILED', detail, [{ pointer: '/file', detail: 'not one of these' }]);
    }
    for (const key of await this.attachments.sweep(user.id)) await this.files.remove(key);
    if ((await this.attachments.waiting(user.id)) >= MOST_WAITING)
      throw new AppError('CONFLICT', `${MOST_WAITING} of your files wait for a note already.`);
    const { key, bytes, sha256 } = await this.files.save(Readable.from([Buffer.from(file.bytes)]), ATTACHMENT_BYTES);
    const values = { detectionId, uploadedBy: user.id, fileName: file.name, mediaType, bytes, sha256, fileKey: key };
    return toContract(await this.attachments.insert(values));
  }

  /** The file itself; one whose note is not sent is its owner's alone. */
  async download(user: SignedInUser, id: string) {
    const row = await this.attachments.find(id);
    if (!row) throw new AppError('NOT_FOUND', 'There is no such attachment.');
    const { detection, role } = await this.access.detection(user, row.detectionId, 'read');
    const before = await this.access.seesBefore(user, role, detection);
    const hidden =
      row.uploadedBy !== user.id && (row.subjectId === null || (before !== null && row.createdAt >= before));
    if (hidden) throw new AppError('NOT_FOUND', 'There is no such attachment.');
    return { ...toContract(row), stream: createReadStream(this.files.path(row.fileKey)) };
  }

  /** Gives files their note, inside the transaction that keeps it. */
  async attach(user: SignedInUser, detectionId: string, subjectId: string, ids: readonly string[], tx: Database) {
    const wanted = [...new Set(ids)];
    if (wanted.length === 0) return;
    const found = await this.attachments.attach(wanted, { detectionId, userId: user.id, subjectId }, tx);
    if (found !== wanted.length)
      throw new AppError('VALIDATION_FAILED', 'Some of these files were not uploaded for this note.', [
        { pointer: '/attachmentIds', detail: 'not a waiting file of yours' },
      ]);
  }

  /** Files of some notes. */
  async of(subjectIds: readonly string[], db?: Database): Promise<Map<string, Attachment[]>> {
    const found = new Map<string, Attachment[]>();
    if (subjectIds.length === 0) return found;
    for (const row of await this.attachments.of(subjectIds, db)) {
      const list = found.get(row.subjectId!) ?? [];
      found.set(row.subjectId!, [...list, toContract(row)]);
    }
    return found;
  }
}

function toContract({ id, fileName, mediaType, bytes, sha256 }: AttachmentRow): Attachment {
  return { id, fileName, mediaType: mediaType as Attachment['mediaType'], bytes, sha256 };
}
