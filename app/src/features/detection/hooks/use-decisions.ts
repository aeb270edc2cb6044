import { review, settlement, override, doubtWord, type Override } from '@eremite/shared/contracts/review';
import type { Candidate, Doubt, VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { useMutation, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useCallback, useState } from 'react';
import { rowKey } from '@eremite/shared/drawing/sky-mark';
import { ApiError } from '#lib/api-error.ts';
import { dropDraft } from '#lib/drafts.ts';
import type { Waiting } from '#lib/outbox/outbox.ts';
import { outbox } from '#lib/outbox/use-outbox.ts';
import { meQuery } from '#lib/queries/me.ts';
import { mayLead, mayReview } from '#lib/role.ts';
import { complain, say } from '#lib/toaster.ts';
import { askAnew, markDecided, useTakeBack } from '../api/decisions.ts';
import { isUnderWay, recall, remember, whileUnderWay } from './last-decision.ts';

/** Which question is open, if any. */
export type Asking =
  | { what: 'review' | 'noGalaxy' | 'askSpectrum' | 'settle' | 'note' | 'distance' | 'ask' }
  | { what: 'accept' | 'reject'; candidate: Candidate }
  | { what: 'doubt'; doubt: Doubt }
  | { what: 'takeBack'; path: string; of: string }
  | null;

/** A decision as it is sent. */
export interface Decision {
  path: 'reviews' | 'settlements' | 'overrides' | 'doubt-words' | 'remarks';
  json: Record<string, unknown>;
  /** In words, for the list of what waits. */
  what: string;
  /** Said when it is done. */
  done: string;
  /** Whether one goes on to the next detection. */
  advances?: boolean;
  draft?: string;
}

/** Someone else's word that was in the way, as the refusal brought it. */
export interface Collision {
  id: string;
  by: string;
  words: string;
  note: string;
}

/** The decisions on one detection: what may be asked, what is being asked, and what doing it does. */
export function useDecisions(detail: VerdictDetail, role: TeamRole, onDone: () => void) {
  const id = detail.verdict.detectionId;
  const { data: me } = useSuspenseQuery(meQuery());
  const client = useQueryClient();
  const [asking, setAsking] = useState<Asking>(null);
  const takeBack = useTakeBack(id);
  const send = useMutation({
    networkMode: 'always',
    mutationFn: ({ decision, ifMatch }: { decision: Decision; ifMatch?: string }) =>
      outbox.submit(waitingOf(me.id, id, decision, ifMatch)),
    // Shown even where the word was refused: someone else's is there then.
    onError: () => void askAnew(client, id),
    onSuccess: (_, { decision }) => {
      if (decision.path === 'reviews') markDecided(client, id, true);
      void askAnew(client, id, decision.advances);
    },
  });
  /** What a review that went out came to, for undoing it. */
  const keepLast = (answer: unknown) => {
    const made = review.safeParse(answer);
    if (made.success) remember({ userId: me.id, reviewId: made.data.id, detectionId: id, name: detail.verdict.name });
  };
  /** Goes on at once and sends meanwhile: agreeing has no words that could be lost, and a refusal is told. */
  const decideAndGo = (decision: Decision) => {
    markDecided(client, id, true);
    onDone();
    void whileUnderWay(outbox.submit(waitingOf(me.id, id, decision))).then(
      (result) => {
        if (result.state === 'sent') keepLast(result.answer);
        void say(result.state === 'sent' ? decision.done : keptWords(decision));
        void askAnew(client, id);
      },
      (error: unknown) => {
        markDecided(client, id, false);
        void complain(new Error(`${decision.what}: ${error instanceof Error ? error.message : 'it was refused.'}`));
      },
    );
  };
  const close = useCallback(() => {
    setAsking(null);
    send.reset();
    takeBack.reset();
  }, [send, takeBack]);
  const decide = (decision: Decision, ifMatch?: string) =>
    send.mutate(
      { decision, ...(ifMatch && { ifMatch }) },
      {
        onSuccess: (result) => {
          if (decision.draft) dropDraft(decision.draft);
          close();
          if (result.state === 'sent' && decision.path === 'reviews') keepLast(result.answer);
          void say(result.state === 'sent' ? decision.done : keptWords(decision));
          if (decision.advances) onDone();
        },
        onError: (error) => {
          if (!asking) void complain(error);
        },
      },
    );
  return {
    asking,
    ask: setAsking,
    close,
    mayDecide: mayReview(role),
    maySettle: mayLead(role),
    isPending: send.isPending || takeBack.isPending,
    error: send.error ?? takeBack.error,
    collision: collisionOf(send.error),
    decide,
    decideAndGo,
    takeBack: (path: string, note: string) =>
      takeBack.mutate({ path, note }, { onSuccess: () => (close(), void say('Taken back.')) }),
    /** Takes the last review of this sitting back, wherever it was given, and answers on which detection it was. */
    undo: (onUndone: (detectionId: string) => void) => {
      if (isUnderWay()) return void say('Your last decision is still being sent; undo it in a moment.');
      const last = recall(me.id);
      if (!last) return void say('There is nothing to undo.');
      takeBack.mutate(
        { path: `/reviews/${last.reviewId}` },
        {
          onSuccess: () => {
            remember(null);
            markDecided(client, last.detectionId, false);
            void askAnew(client, last.detectionId);
            void say(`Your decision on ${last.name} is taken back.`);
            onUndone(last.detectionId);
          },
          onError: (error) => void complain(error),
        },
      );
    },
  };
}

const keptWords = ({ what }: Decision): string => `${what}: kept, it is sent when the service is back.`;

function waitingOf(userId: string, detectionId: string, { path, json, what }: Decision, ifMatch?: string): Waiting {
  return {
    key: crypto.randomUUID(),
    userId,
    path: `/detections/${detectionId}/${path}`,
    json,
    what,
    at: new Date().toISOString(),
    ...(ifMatch && { ifMatch }),
  };
}

export type Decisions = ReturnType<typeof useDecisions>;

/** Whose word stood in the way, where a decision was refused for that. */
function collisionOf(error: unknown): Collision | null {
  if (!(error instanceof ApiError) || error.status !== 412) return null;
  const { current } = error.problem;
  const settled = settlement.safeParse(current);
  if (settled.success) {
    const { id, by, note, starlight, surroundings, outcome } = settled.data;
    return { id, by, note, words: outcome === 'verdict' ? `${starlight}, ${surroundings}` : outcome };
  }
  const overridden = override.safeParse(current);
  if (overridden.success) {
    const { id, by, note, action, objectName } = overridden.data;
    return { id, by, note, words: `${objectName} ${action}ed as counterpart` };
  }
  const doubted = doubtWord.safeParse(current);
  if (!doubted.success) return null;
  const { id, by, note, word, doubt } = doubted.data;
  return { id, by, note, words: `${doubt} ${word}` };
}

/** Where what is typed for a question is kept until it is sent. */
export const draftOf = (detectionId: string, what: string): string => `${detectionId}.${what}`;

/** What an override takes back: its path. */
export const overridePath = ({ id }: Override): string => `/overrides/${id}`;

/** The candidate that is chosen on the panel or in the table. */
export const chosenCandidate = (detail: VerdictDetail, selected: string | null): Candidate | undefined =>
  detail.candidates.find((candidate) => rowKey(candidate) === selected);
