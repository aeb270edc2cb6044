import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Suspense } from 'react';
import { Outlet, redirect, useNavigation, type LoaderFunctionArgs } from 'react-router-dom';
import { Loading } from '#components/feedback/loading.tsx';
import { paths } from '#config/paths.ts';
import { isSignedOut } from '#lib/api-error.ts';
import { meQuery } from '#lib/queries/me.ts';
import { TopBar } from './top-bar.tsx';
import './shell.css';

/** Lets nobody in without a session; remembers where they were going. */
export const shellLoader =
  (client: QueryClient) =>
  async ({ request }: LoaderFunctionArgs) => {
    try {
      return await client.ensureQueryData(meQuery());
    } catch (error) {
      if (!isSignedOut(error)) throw error;
      const { pathname, search } = new URL(request.url);
      throw redirect(paths.signIn(pathname + search));
    }
  };

export function Shell() {
  const { data: me } = useSuspenseQuery(meQuery());
  const isMoving = useNavigation().state !== 'idle';
  return (
    <div className="shell">
      <a className="skip-link" href="#content">
        Skip to the content
      </a>
      <TopBar me={me} />
      {isMoving && <div className="shell__moving" role="status" aria-label="Loading the page" />}
      <div className="shell__body">
        <Suspense fallback={<Loading />}>
          <Outlet />
        </Suspense>
      </div>
    </div>
  );
}
