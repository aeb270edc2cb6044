import type { QueryClient } from '@tanstack/react-query';
import type { ComponentType } from 'react';
import type { LoaderFunctionArgs } from 'react-router-dom';

/** What a route module exports: its component and, where it fetches before showing, a loader that is given the cache. */
export interface RouteModule {
  Component: ComponentType;
  loader?: (client: QueryClient) => (args: LoaderFunctionArgs) => unknown;
}

/** Turns a route module into what the router loads when its address is first visited. */
export const lazyRoute = (client: QueryClient, load: () => Promise<RouteModule>) => async () => {
  const { Component, loader } = await load();
  return loader ? { Component, loader: loader(client) } : { Component };
};
