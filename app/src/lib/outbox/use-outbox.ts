import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useEffect, useSyncExternalStore } from 'react';
import { request } from '../api-client.ts';
import { meQuery } from '../queries/me.ts';
import { Outbox, type OutboxStore, type Waiting } from './outbox.ts';

const KEY = 'eremite.outbox';
/** How often a service that was out of reach is tried again. */
const AGAIN_MS = 4000;

const store: OutboxStore = {
  read: () => {
    try {
      const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? '[]');
      return Array.isArray(kept) ? (kept as Waiting[]) : [];
    } catch {
      return [];
    }
  },
  write: (waiting) => {
    try {
      localStorage.setItem(KEY, JSON.stringify(waiting));
    } catch {
      // It waits as long as the page is open.
    }
  },
};

/** The one outbox of the page. */
export const outbox = new Outbox(store, async ({ key, path, json, ifMatch }) => {
  const headers = { 'idempotency-key': key, ...(ifMatch && { 'if-match': `"${ifMatch}"` }) };
  const answer = await request(path, { method: 'POST', json, headers });
  return answer.status === 204 ? undefined : ((await answer.json()) as unknown);
});

/** What waits to be sent, of the person signed in. */
export function useWaiting(): readonly Waiting[] {
  const { data: me } = useSuspenseQuery(meQuery());
  return useSyncExternalStore(outbox.subscribe, () => outbox.waiting).filter(({ userId }) => userId === me.id);
}

/** Sends what waits whenever the network may be back; asks everything anew once something has gone out. */
export function useOutboxSender(): void {
  const client = useQueryClient();
  const { data: me } = useSuspenseQuery(meQuery());
  const waits = useWaiting().some(({ refused }) => !refused);
  useEffect(() => {
    const send = () => void outbox.flush(me.id);
    send();
    window.addEventListener('online', send);
    const timer = waits ? setInterval(send, AGAIN_MS) : undefined;
    return () => {
      window.removeEventListener('online', send);
      clearInterval(timer);
    };
  }, [me.id, waits]);
  useEffect(() => outbox.onSent(() => void client.invalidateQueries()), [client]);
}
