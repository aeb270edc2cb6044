import { ledgerEntry } from '@eremite/shared/contracts/ledger';
import { listOf } from '@eremite/shared/contracts/list';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import { call } from '#lib/api-client.ts';

export const ledgerQuery = (surveyId: string, search: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'ledger', search],
    queryFn: ({ signal }) => call(listOf(ledgerEntry), `/surveys/${surveyId}/ledger${search}`, { signal }),
    placeholderData: keepPreviousData,
  });

const verification = z.object({ entries: z.int(), intact: z.boolean(), brokenAt: z.int().nullable() });

/** Recomputes the chain of hashes. */
export const verificationQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'ledger', 'verification'],
    queryFn: ({ signal }) => call(verification, `/surveys/${surveyId}/ledger/verification`, { signal }),
  });
