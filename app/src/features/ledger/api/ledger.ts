import { ledgerEntry, ledgerFacets, ledgerVerification } from '@eremite/shared/contracts/ledger';
import { listOf } from '@eremite/shared/contracts/list';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '#lib/api-client.ts';

export const ledgerQuery = (surveyId: string, search: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'ledger', search],
    queryFn: ({ signal }) => call(listOf(ledgerEntry), `/surveys/${surveyId}/ledger${search}`, { signal }),
    placeholderData: keepPreviousData,
  });

/** Recomputes the chain of hashes. */
export const verificationQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'ledger', 'verification'],
    queryFn: ({ signal }) => call(ledgerVerification, `/surveys/${surveyId}/ledger/verification`, { signal }),
  });

/** Who and what there is to filter by. */
export const ledgerFacetsQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'ledger', 'facets'],
    queryFn: ({ signal }) => call(ledgerFacets, `/surveys/${surveyId}/ledger/facets`, { signal }),
  });
