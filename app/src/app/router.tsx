import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, redirect } from 'react-router-dom';
import { paths } from '#config/paths.ts';
import { lazyRoute, type RouteModule } from './lazy-route.ts';
import { NotFound } from './shell/not-found.tsx';
import { RouteProblem } from './shell/route-problem.tsx';
import { Shell, shellLoader } from './shell/shell.tsx';
import { SurveyFrame, surveyLoader } from './shell/survey-frame.tsx';
import { Loading } from '#components/feedback/loading.tsx';

export function createRouter(client: QueryClient) {
  const page = (load: () => Promise<RouteModule>) => ({ lazy: lazyRoute(client, load), ErrorBoundary: RouteProblem });
  return createBrowserRouter([
    {
      ErrorBoundary: RouteProblem,
      HydrateFallback: Loading,
      children: [
        { path: '/sign-in', ...page(() => import('./routes/sign-in.tsx')) },
        { path: '/shared/:linkToken', ...page(() => import('./routes/shared.tsx')) },
        { path: '/accept-invitation', ...page(() => import('./routes/accept-invitation.tsx')) },
        {
          path: '/',
          Component: Shell,
          loader: shellLoader(client),
          children: [
            { index: true, loader: () => redirect(paths.surveys()) },
            { path: 'surveys', ...page(() => import('./routes/surveys.tsx')) },
            { path: 'methods', ...page(() => import('./routes/methods.tsx')) },
            { path: 'account', ...page(() => import('./routes/account.tsx')) },
            { path: 'administration', ...page(() => import('./routes/administration.tsx')) },
            {
              path: 'surveys/:surveyId',
              Component: SurveyFrame,
              loader: surveyLoader(client),
              ErrorBoundary: RouteProblem,
              children: [
                { index: true, ...page(() => import('./routes/overview.tsx')) },
                { path: 'detections', ...page(() => import('./routes/detections.tsx')) },
                { path: 'detections/:detectionId', ...page(() => import('./routes/detection.tsx')) },
                { path: 'plots', ...page(() => import('./routes/plots.tsx')) },
                { path: 'docket', ...page(() => import('./routes/docket.tsx')) },
                { path: 'docket/:detectionId', ...page(() => import('./routes/detection.tsx')) },
                { path: 'shortlist', ...page(() => import('./routes/shortlist.tsx')) },
                { path: 'editions', ...page(() => import('./routes/editions.tsx')) },
                { path: 'editions/:editionId', ...page(() => import('./routes/edition.tsx')) },
                { path: 'catalogues', ...page(() => import('./routes/catalogues.tsx')) },
                { path: 'catalogues/:catalogueId', ...page(() => import('./routes/catalogue.tsx')) },
                { path: 'intake', ...page(() => import('./routes/intakes.tsx')) },
                { path: 'intake/:intakeId', ...page(() => import('./routes/intake.tsx')) },
                { path: 'criteria', ...page(() => import('./routes/criteria.tsx')) },
                { path: 'criteria/new', ...page(() => import('./routes/new-criteria.tsx')) },
                { path: 'criteria/:criteriaId', ...page(() => import('./routes/criteria-number.tsx')) },
                { path: 'runs', ...page(() => import('./routes/runs.tsx')) },
                { path: 'runs/:runId', ...page(() => import('./routes/run.tsx')) },
                { path: 'runs/:runId/difference', ...page(() => import('./routes/run-difference.tsx')) },
                { path: 'ledger', ...page(() => import('./routes/ledger.tsx')) },
                { path: 'people', ...page(() => import('./routes/people.tsx')) },
                { path: 'settings', ...page(() => import('./routes/survey-settings.tsx')) },
              ],
            },
            { path: '*', Component: NotFound },
          ],
        },
      ],
    },
  ]);
}
