import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { ReviewerProgress } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { AssignmentsRepository } from './assignments.repository.ts';

/** Who is to look at what, and how far each is. */
@Injectable()
export class AssignmentsService {
  constructor(
    private readonly assignments: AssignmentsRepository,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  /** How far each reviewer is; says nothing of what was decided. */
  async progress(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<ReviewerProgress>> {
    await this.access.survey(user, surveyId, 'lead');
    return pageOf(await this.assignments.progress(surveyId), query);
  }

  /** Puts detections on a reviewer's docket, or takes them off. */
  async assign(
    user: SignedInUser,
    surveyId: string,
    request: { detectionIds: string[]; userId: string },
    on: boolean,
  ): Promise<void> {
    const { survey } = await this.access.survey(user, surveyId, 'lead');
    const member = await this.assignments.member(survey.teamId, request.userId);
    if (!member || member.role === 'observer') {
      throw new AppError('VALIDATION_FAILED', 'Only a lead or a reviewer of the team can be given detections.', [
        { pointer: '/userId', detail: 'not a reviewer of this team' },
      ]);
    }
    const known = await this.assignments.detectionsOf(surveyId, request.detectionIds);
    if (known.length !== new Set(request.detectionIds).size)
      throw new AppError('NOT_FOUND', 'Some of these detections are not of this survey.');
    await this.assignments.transaction(async (tx) => {
      await this.assignments[on ? 'assign' : 'unassign'](request.detectionIds, request.userId, tx);
      const action = on ? 'assigned detections' : 'took detections back';
      await this.ledger.append(
        { surveyId, actor: user, action, subject: `${known.length} for ${member.name}`, detail: { ...request } },
        tx,
      );
    });
  }
}
