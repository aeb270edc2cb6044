import type { NotePhrases } from '@eremite/shared/contracts/note';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { RemarksRepository } from './remarks.repository.ts';

/** Offered until a team has phrases of its own. */
const FIRST_PHRASES = [
  'The light is a star spike or its halo.',
  'The object is in the background: its redshift disagrees.',
  'The image is shallower here than stated.',
  'Part of the tidal tail of the neighbour.',
  'A faint smudge in the image that no catalogue has.',
  'The line looks like interference.',
];

/** Phrases a team keeps at hand for its notes. */
@Injectable()
export class PhrasesService {
  constructor(
    private readonly remarks: RemarksRepository,
    private readonly access: AccessService,
  ) {}

  async get(user: SignedInUser, surveyId: string): Promise<NotePhrases> {
    const { survey } = await this.access.survey(user, surveyId, 'read');
    return { phrases: (await this.remarks.phrases(survey.teamId)) ?? FIRST_PHRASES };
  }

  async set(user: SignedInUser, surveyId: string, { phrases }: NotePhrases): Promise<NotePhrases> {
    const { survey } = await this.access.survey(user, surveyId, 'review');
    await this.remarks.setPhrases(survey.teamId, [...new Set(phrases)]);
    return this.get(user, surveyId);
  }
}
