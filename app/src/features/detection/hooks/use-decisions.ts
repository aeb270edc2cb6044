import type { Override } from '@eremite/shared/contracts/review';
import type { Candidate, VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { useState } from 'react';
import { rowKey } from '@eremite/shared/drawing/sky-mark';
import { mayLead, mayReview } from '#lib/role.ts';
import { complain, say } from '#lib/toaster.ts';
import { useOverride, useReview, useSettle, useWithdraw } from '../api/decisions.ts';

/** Which question is open, if any. */
export type Asking =
  | { what: 'review' | 'settle' | 'note' | 'distance' }
  | { what: 'accept' | 'reject'; candidate: Candidate }
  | { what: 'withdraw'; override: Override }
  | null;

/** The decisions on one detection: what may be asked, what is being asked, and what doing it does. */
export function useDecisions(detail: VerdictDetail, role: TeamRole, onDone: () => void) {
  const id = detail.verdict.detectionId;
  const [asking, setAsking] = useState<Asking>(null);
  const review = useReview(id);
  const settle = useSettle(id);
  const override = useOverride(id);
  const withdraw = useWithdraw(id);
  const close = () => {
    setAsking(null);
    [review, settle, override, withdraw].forEach((mutation) => mutation.reset());
  };
  const done = (words: string) => {
    close();
    void say(words);
  };
  const computed = {
    runId: detail.runId,
    starlight: detail.verdict.starlight,
    surroundings: detail.verdict.surroundings,
  };
  return {
    asking,
    ask: setAsking,
    close,
    mayDecide: mayReview(role),
    maySettle: mayLead(role),
    isPending: review.isPending || settle.isPending || override.isPending || withdraw.isPending,
    error: review.error ?? settle.error ?? override.error ?? withdraw.error,
    agree: (note = '') =>
      review.mutate(
        { ...computed, note },
        {
          onSuccess: () => {
            done(`You agreed: ${computed.starlight}, ${computed.surroundings}.`);
            onDone();
          },
          onError: (error) => void complain(error),
        },
      ),
    review: (decision: Pick<typeof computed, 'starlight' | 'surroundings'> & { note: string }) =>
      review.mutate({ ...decision, runId: detail.runId }, { onSuccess: () => done('Your verdict is kept.') }),
    settle: (decision: Pick<typeof computed, 'starlight' | 'surroundings'> & { note: string }) =>
      settle.mutate({ ...decision, runId: detail.runId }, { onSuccess: () => done('Settled.') }),
    override: (action: 'accept' | 'reject', { catalogueId, rowId, name }: Candidate, note: string) =>
      override.mutate(
        { catalogueId, rowId, action, note },
        { onSuccess: () => done(`${name} is ${action}ed from the next run on.`) },
      ),
    withdraw: ({ id: overrideId }: Override, note: string) =>
      withdraw.mutate({ overrideId, note }, { onSuccess: () => done('The override is withdrawn.') }),
  };
}

export type Decisions = ReturnType<typeof useDecisions>;

/** The candidate that is chosen on the panel or in the table. */
export const chosenCandidate = (detail: VerdictDetail, selected: string | null): Candidate | undefined =>
  detail.candidates.find((candidate) => rowKey(candidate) === selected);
