import { useQuery } from '@tanstack/react-query';
import type { Said } from '../components/history.tsx';
import { doubtWordsQuery, overridesQuery, remarksQuery, reviewsQuery, settlementQuery } from '../api/decisions.ts';

/** All that people said of a detection, as far as one may see it. */
export function useSaid(detectionId: string): Said {
  const { data: reviews } = useQuery(reviewsQuery(detectionId));
  const { data: overrides } = useQuery(overridesQuery(detectionId));
  const { data: doubtWords } = useQuery(doubtWordsQuery(detectionId));
  const { data: remarks } = useQuery(remarksQuery(detectionId));
  const { data: settled } = useQuery(settlementQuery(detectionId));
  return {
    reviews: reviews?.items ?? [],
    overrides: overrides?.items ?? [],
    doubtWords: doubtWords?.items ?? [],
    remarks: remarks?.items ?? [],
    settlement: settled?.settlement ?? null,
  };
}
