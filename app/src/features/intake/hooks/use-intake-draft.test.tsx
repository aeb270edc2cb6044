import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, renderHook } from '@testing-library/react';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { ReactNode } from 'react';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { useIntakeDraft } from './use-intake-draft.ts';

const intake = { id: 'a', settings: { kind: 'hi' } } as Intake;
const sent: unknown[] = [];

beforeEach(() => {
  sent.length = 0;
  vi.useFakeTimers();
  vi.stubGlobal('fetch', (_: string, { body }: { body: string }) => {
    sent.push(JSON.parse(body).settings);
    return new Promise(() => undefined);
  });
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

const draftOf = () => {
  const client = new QueryClient();
  const wrapper = ({ children }: { children: ReactNode }) => (
    <QueryClientProvider client={client}>{children}</QueryClientProvider>
  );
  return renderHook(() => useIntakeDraft(intake), { wrapper });
};

it('is checking from the moment of a change, and sends several changes as one', async () => {
  const { result } = draftOf();
  expect(result.current.isChecking).toBe(false);
  act(() => result.current.change({ name: 'x' }));
  expect(result.current.isChecking).toBe(true);
  act(() => result.current.change({ kind: 'optical', name: undefined }));
  expect(sent).toEqual([]);
  await act(() => vi.advanceTimersByTimeAsync(600));
  expect(sent).toEqual([{ kind: 'optical' }]);
  expect(result.current.isChecking).toBe(true);
});

it('does not lose a change when the page is left at once', async () => {
  const { result, unmount } = draftOf();
  act(() => result.current.change({ name: 'x' }));
  unmount();
  await vi.advanceTimersByTimeAsync(0);
  expect(sent).toEqual([{ kind: 'hi', name: 'x' }]);
});
