import { describe, expect, it } from 'vitest';
import { ApiError, unreachable } from '../api-error.ts';
import { Outbox, type Send, type Waiting } from './outbox.ts';

const entry = (key: string, userId = 'me'): Waiting => ({
  key,
  userId,
  path: '/detections/1/reviews',
  json: { note: `of ${key}` },
  what: `Agree with ${key}`,
  at: '2026-12-01T00:00:00Z',
});
const refusal = (status: number, detail: string) =>
  new ApiError(status, 'CHANGED_MEANWHILE', { type: 'x', title: 'x', status, detail });

/** An outbox over a browser that forgets nothing and a network that can be cut. */
function setUp(kept: Waiting[] = []) {
  const state = { kept, online: true, refuse: undefined as ApiError | undefined, sent: [] as string[] };
  const store = { read: () => state.kept, write: (waiting: readonly Waiting[]) => (state.kept = [...waiting]) };
  const send: Send = ({ key }) => {
    if (!state.online) return Promise.reject(unreachable());
    if (state.refuse) return Promise.reject(state.refuse);
    state.sent.push(key);
    return Promise.resolve({ id: key });
  };
  return { state, outbox: new Outbox(store, send) };
}

describe('a decision', () => {
  it('goes out at once where the service is there', async () => {
    const { state, outbox } = setUp();
    expect(await outbox.submit(entry('a'))).toEqual({ state: 'sent', answer: { id: 'a' } });
    expect(state.kept).toEqual([]);
  });

  it('is kept where it is not, and sent in order when it is back', async () => {
    const { state, outbox } = setUp();
    state.online = false;
    expect(await outbox.submit(entry('a'))).toEqual({ state: 'kept' });
    expect(await outbox.submit(entry('b'))).toEqual({ state: 'kept' });
    expect(state.kept.map(({ key }) => key)).toEqual(['a', 'b']);
    const told: string[] = [];
    outbox.onSent(({ key }) => told.push(key));
    await outbox.flush('me');
    expect(state.kept).toHaveLength(2);
    state.online = true;
    await outbox.flush('me');
    expect([state.sent, told, state.kept]).toEqual([['a', 'b'], ['a', 'b'], []]);
  });

  it('survives the page being closed', async () => {
    const first = setUp();
    first.state.online = false;
    await first.outbox.submit(entry('a'));
    const second = setUp(first.state.kept);
    await second.outbox.flush('me');
    expect(second.state.sent).toEqual(['a']);
  });

  it('does not overtake one that waits', async () => {
    const { state, outbox } = setUp([entry('a')]);
    await outbox.submit(entry('b'));
    await outbox.flush('me');
    expect(state.sent).toEqual(['a', 'b']);
  });

  it('that is refused at once is its author’s to mend, and is not kept', async () => {
    const { state, outbox } = setUp();
    state.refuse = refusal(412, 'changed');
    await expect(outbox.submit(entry('a'))).rejects.toBe(state.refuse);
    expect(state.kept).toEqual([]);
  });

  it('that is refused later keeps its words with the reason, and does not hold up the others', async () => {
    const { state, outbox } = setUp([entry('a')]);
    state.refuse = refusal(412, 'someone else settled it');
    await outbox.flush('me');
    expect(state.kept).toMatchObject([{ key: 'a', refused: 'someone else settled it', json: { note: 'of a' } }]);
    state.refuse = undefined;
    expect(await outbox.submit(entry('b'))).toMatchObject({ state: 'sent' });
    outbox.discard('a');
    expect(state.kept).toEqual([]);
  });

  it('waits on while its author is signed out, and is never sent in another’s name', async () => {
    const { state, outbox } = setUp([entry('a')]);
    state.refuse = refusal(401, 'sign in');
    await outbox.flush('me');
    expect(state.kept[0]!.refused).toBeUndefined();
    state.refuse = undefined;
    await outbox.flush('someone else');
    expect(state.sent).toEqual([]);
  });
});
