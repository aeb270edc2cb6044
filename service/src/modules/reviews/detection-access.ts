import { Injectable } from '@nestjs/common';
import { AccessService, type Need } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { ReviewsRepository } from './reviews.repository.ts';

/** Whether an account may do something with a detection, and may see what others said of it. */
@Injectable()
export class DetectionAccess {
  constructor(
    private readonly reviews: ReviewsRepository,
    private readonly verdicts: VerdictsService,
    private readonly access: AccessService,
  ) {}

  /** The detection, if the account may do what it needs with its survey. */
  async detection(user: SignedInUser, id: string, need: Need) {
    const detection = await this.reviews.detection(id);
    if (!detection) throw new AppError('NOT_FOUND', 'There is no such detection.');
    const { role, survey } = await this.access.survey(user, detection.surveyId, need);
    return { detection, role, survey };
  }

  /** The verdict as a run computed it. */
  async computed(surveyId: string, runId: string, detectionId: string) {
    const computed = await this.verdicts.computed(runId, detectionId, surveyId);
    if (!computed) throw new AppError('NOT_FOUND', 'That run has no verdict on this detection.');
    return computed;
  }

  /**
   * Since when others' words on a detection may be seen. Leads and observers see all; a reviewer who has spoken on the
   * latest run too; another sees only what that run had already taken up, for its verdict shows it anyway.
   */
  async seesBefore(
    user: SignedInUser,
    role: string,
    detection: { id: string; surveyId: string },
  ): Promise<Date | null> {
    if (role !== 'reviewer') return null;
    const run = await this.verdicts.latestRun(detection.surveyId);
    if (!run) return null;
    const rows = await this.reviews.list([detection.id]);
    return rows.some((row) => row.runId === run.id && row.reviewerId === user.id) ? null : new Date(run.createdAt);
  }
}

/** Of rows with an author and a time, those that may be seen. */
export function seen<T extends { createdById: string; createdAt: Date }>(
  rows: readonly T[],
  user: SignedInUser,
  before: Date | null,
): T[] {
  return rows.filter((row) => before === null || row.createdById === user.id || row.createdAt < before);
}
