import type { SurveyEvent } from '@eremite/shared/contracts/survey-event';
import type { Response } from 'express';
import { z } from 'zod';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { LedgerFeed } from './ledger-feed.ts';
import type { LedgerRepository, LedgerRow } from './ledger.repository.ts';
import { MASKED_ACTION, REVIEW_ACTIONS } from './ledger.service.ts';

/** Keeps proxies from closing a stream in which nothing happens. */
const BREATH_MS = 20_000;
const AT_ONCE = 500;

export interface EventStream {
  readonly surveyId: string;
  /** Number of the last line the reader has seen; undefined begins with what comes next. */
  readonly after: number | undefined;
  /** Whether what others' reviews came to is kept back. */
  readonly isBlind: boolean;
  /** Whether the reader may still see the survey. */
  readonly isOpen: () => Promise<boolean>;
}

/** What is done in a survey as server-sent events, each with the ledger's number as its id, until the reader leaves. */
export async function streamEvents(
  { lines, feed }: { lines: LedgerRepository; feed: LedgerFeed },
  { surveyId, after, isBlind, isOpen }: EventStream,
  user: SignedInUser,
  response: Response,
): Promise<void> {
  let seen = after ?? (await lines.last(surveyId))?.number ?? 0;
  response.writeHead(200, {
    'Content-Type': 'text/event-stream; charset=utf-8',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.write(`retry: 3000\nevent: ready\nid: ${seen}\ndata: ${seen}\n\n`);
  let open = true;
  let wake: () => void = () => undefined;
  let grown = true;
  const stop = feed.listen(surveyId, () => {
    grown = true;
    wake();
  });
  response.on('close', () => {
    open = false;
    wake();
  });
  try {
    while (open && !feed.isStopped) {
      if (grown) {
        grown = false;
        if (!(await isOpen())) break;
        const rows = await lines.after(surveyId, seen, AT_ONCE);
        for (const row of rows) {
          seen = row.number;
          response.write(`event: done\nid: ${seen}\ndata: ${JSON.stringify(toEvent(row, user, isBlind))}\n\n`);
        }
        if (rows.length === AT_ONCE) grown = true;
      } else {
        const woken = await new Promise<boolean>((resolve) => {
          const timer = setTimeout(() => resolve(false), BREATH_MS);
          wake = () => {
            clearTimeout(timer);
            resolve(true);
          };
        });
        if (!woken) response.write(':\n\n');
      }
    }
  } catch {
    // The service is stopping: the reader asks again with the last number it has.
  } finally {
    stop();
    response.end();
  }
}

function toEvent(row: LedgerRow, user: SignedInUser, isBlind: boolean): SurveyEvent {
  const { detectionId } = row.detail as { detectionId?: unknown };
  const id = z.uuid().safeParse(detectionId);
  const mine = row.actorId === user.id;
  const hidden = isBlind && !mine && REVIEW_ACTIONS.has(row.action);
  return {
    number: row.number,
    at: row.at.toISOString(),
    actor: row.actor,
    mine,
    action: hidden ? MASKED_ACTION : row.action,
    subject: hidden ? row.subject.split(':')[0]! : row.subject,
    detectionId: id.success ? id.data : null,
  };
}
