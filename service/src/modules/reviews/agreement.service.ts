import type { Agreement } from '@eremite/shared/contracts/agreement';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { cohenKappa } from '@eremite/shared/science/robustness/cohen-kappa';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { ReviewsRepository } from './reviews.repository.ts';

type Pair = Awaited<ReturnType<ReviewsRepository['blindPairs']>>[number];

/** How far reviewers agree: Cohen's kappa of each pair, over what both judged blind. */
@Injectable()
export class AgreementService {
  constructor(
    private readonly reviews: ReviewsRepository,
    private readonly access: AccessService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Agreement>> {
    await this.access.survey(user, surveyId, 'read');
    const pairs = new Map<string, Pair[]>();
    for (const row of await this.reviews.blindPairs(surveyId)) {
      const key = `${row.firstId}/${row.secondId}`;
      pairs.set(key, [...(pairs.get(key) ?? []), row]);
    }
    return pageOf([...pairs.values()].map(agreementOf), query);
  }
}

/** An answer other than a verdict ("not real") is a word of its own in both tables. */
function agreementOf(rows: readonly Pair[]): Agreement {
  const words = (of: 'starlight' | 'surroundings') =>
    rows.map((row): [string, string] => [
      row.outcomeA === 'verdict' ? row[`${of}A`] : row.outcomeA,
      row.outcomeB === 'verdict' ? row[`${of}B`] : row.outcomeB,
    ]);
  const toContract = (of: 'starlight' | 'surroundings') => {
    const { kappa, standardError, observed, expected } = cohenKappa(words(of));
    const known = (value: number) => (Number.isNaN(value) ? null : value);
    return { kappa: known(kappa), standardError: known(standardError), observed, expected };
  };
  return {
    reviewers: [rows[0]!.first, rows[0]!.second],
    detections: rows.length,
    starlight: toContract('starlight'),
    surroundings: toContract('surroundings'),
  };
}
