import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { WhatIfPoint } from '@eremite/shared/contracts/what-if';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { whatIfQuery } from '../api/what-if.ts';

/** Supposes another distance: the answer of the server for all of them, and the one that is looked at. */
export function useWhatIf({ runId, verdict, distance }: VerdictDetail) {
  const [isOn, setOn] = useState(false);
  const [chosen, setChosen] = useState<number | null>(null);
  const { data, error, isFetching } = useQuery({ ...whatIfQuery(runId, verdict.detectionId), enabled: isOn });
  const answer = isOn ? data : undefined;
  const nominal = distance.angularMpc;
  const at = chosen ?? nominal;
  return {
    isOn,
    toggle: () => {
      setOn(!isOn);
      setChosen(null);
    },
    answer,
    error: isOn ? error : null,
    isFetching: isOn && isFetching,
    /** The verdict at the distance that was judged nearest to the one supposed. */
    point: answer && nearestPoint(answer.points, at),
    /** The distance supposed (angular-diameter), Mpc, where one was chosen. */
    supposedMpc: answer ? (chosen ?? undefined) : undefined,
    suppose: setChosen,
  };
}

/** The point next to a distance; the middle one without a distance. */
function nearestPoint(points: readonly WhatIfPoint[], mpc: number | null): WhatIfPoint {
  if (mpc === null) return points[Math.floor(points.length / 2)]!;
  const off = ({ angularMpc }: WhatIfPoint) => Math.abs(Math.log(angularMpc / mpc));
  return points.reduce((best, point) => (off(point) < off(best) ? point : best));
}
