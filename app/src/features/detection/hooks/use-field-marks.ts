import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { fieldMarks } from '@eremite/shared/drawing/field-marks';
import { ARCSEC_PER_RAD } from '@eremite/shared/drawing/panel-plane';
import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { fieldQuery, fieldRadius, WIDEST_FIELD } from '../api/field.ts';

/** The marks of a verdict together with all other objects as far as the panel looks. */
export function useFieldMarks(detail: VerdictDetail, known: readonly SkyMark[], windowKms: number) {
  const [reach, setReach] = useState(1);
  const { data } = useQuery({
    ...fieldQuery(detail.runId, detail.verdict.detectionId, fieldRadius(reach)),
    placeholderData: keepPreviousData,
  });
  const { angularMpc } = detail.distance;
  const marks = useMemo(() => {
    if (!data) return known;
    const scale = angularMpc === null ? null : (angularMpc * 1000) / ARCSEC_PER_RAD;
    return [...known, ...fieldMarks(data, known, windowKms, scale)];
  }, [data, known, windowKms, angularMpc]);
  const notes = [
    data?.isCut && 'the faintest objects without a velocity are left out',
    reach > WIDEST_FIELD && `beyond ${WIDEST_FIELD / 3600}° only neighbours are shown`,
  ];
  return { marks, field: data, note: notes.filter(Boolean).join('; '), onReach: setReach };
}
