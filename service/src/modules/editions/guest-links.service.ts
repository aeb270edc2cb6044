import type { CreateGuestLinkRequest, createdGuestLink, GuestLink } from '@eremite/shared/contracts/edition';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Inject, Injectable } from '@nestjs/common';
import type { z } from 'zod';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import { randomToken, tokenHash } from '../auth/random-token.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { EditionsService } from './editions.service.ts';
import { type EditionRow, EditionsRepository } from './editions.repository.ts';
import { GuestLinksRepository } from './guest-links.repository.ts';

const DAY_MS = 24 * 3600_000;
/** The last use of a link is told to the minute: not every request of a page writes. */
const TOUCH_MS = 60_000;
type Row = NonNullable<Awaited<ReturnType<GuestLinksRepository['find']>>>;

/** Links by which someone without an account reads one edition, until they expire or are revoked. */
@Injectable()
export class GuestLinksService {
  constructor(
    private readonly links: GuestLinksRepository,
    private readonly repository: EditionsRepository,
    private readonly editions: EditionsService,
    private readonly ledger: LedgerService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async list(user: SignedInUser, editionId: string, query: ListQuery): Promise<List<GuestLink>> {
    await this.editions.row(user, editionId, 'lead');
    return pageOf((await this.links.list(editionId)).map(toGuestLink), query);
  }

  async create(
    user: SignedInUser,
    editionId: string,
    { label, expiresInDays }: CreateGuestLinkRequest,
  ): Promise<z.output<typeof createdGuestLink>> {
    const edition = await this.editions.row(user, editionId, 'lead');
    const token = randomToken();
    const expiresAt = new Date(Date.now() + expiresInDays * DAY_MS);
    const id = await this.links.transaction(async (tx) => {
      const id = await this.links.insert(
        { editionId, label, tokenHash: tokenHash(token), createdBy: user.id, expiresAt },
        tx,
      );
      await this.ledger.append(
        {
          surveyId: edition.surveyId,
          actor: user,
          action: 'made a guest link',
          subject: `edition ${edition.number}, for ${label}`,
          detail: { editionId, linkId: id, expiresAt: expiresAt.toISOString() },
        },
        tx,
      );
      return id;
    });
    const link = toGuestLink((await this.links.find(id))!);
    return { ...link, token, url: `${this.env.publicUrl ?? ''}/shared/${token}` };
  }

  async revoke(user: SignedInUser, linkId: string): Promise<void> {
    const link = await this.links.find(linkId);
    if (!link) throw new AppError('NOT_FOUND', 'There is no such link.');
    const edition = await this.editions.row(user, link.editionId, 'lead');
    await this.links.transaction(async (tx) => {
      if (!(await this.links.revoke(linkId, tx))) return;
      await this.ledger.append(
        {
          surveyId: edition.surveyId,
          actor: user,
          action: 'revoked a guest link',
          subject: `edition ${edition.number}, for ${link.label}`,
          detail: { editionId: edition.id, linkId },
        },
        tx,
      );
    });
  }

  /**
   * The edition a link opens.
   *
   * @throws {AppError} NOT_FOUND for a link that never was; LINK_EXPIRED for one that is over
   */
  async open(token: string): Promise<{ edition: EditionRow; expiresAt: string }> {
    const link = await this.links.byHash(tokenHash(token));
    if (!link) throw new AppError('NOT_FOUND', 'There is no such link; ask for it again.');
    if (link.revokedAt) throw new AppError('LINK_EXPIRED', 'The link was revoked; ask whoever gave it to you.');
    if (link.expiresAt.getTime() <= Date.now())
      throw new AppError('LINK_EXPIRED', 'The link has expired; ask whoever gave it to you for a new one.');
    if (!link.lastUsedAt || Date.now() - link.lastUsedAt.getTime() > TOUCH_MS) await this.links.touch(link.id);
    const edition = await this.repository.find(link.editionId);
    return { edition: edition!, expiresAt: link.expiresAt.toISOString() };
  }
}

function toGuestLink({ editionId: _, createdAt, expiresAt, revokedAt, lastUsedAt, ...row }: Row): GuestLink {
  return {
    ...row,
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    revokedAt: revokedAt?.toISOString() ?? null,
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
  };
}
