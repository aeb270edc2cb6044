import { SCREEN } from '@eremite/shared/drawing/drawing-theme';
import type { DrawnDetail } from '@eremite/shared/drawing/drawn-evidence';
import { limitsChartSvg } from '@eremite/shared/drawing/limits-chart';
import { useMemo } from 'react';
import { Drawing } from '#components/drawing/drawing.tsx';
import { SaveMenu } from '#components/save-menu/save-menu.tsx';
import { fileNameOf } from '#lib/save-picture.ts';
import './limits-chart.css';

/** Per band the counterpart to be expected against the depth here: the power of the silence, seen. */
export function LimitsChart({ detail }: { detail: DrawnDetail }) {
  const svg = useMemo(() => limitsChartSvg({ detail }, { theme: SCREEN, width: 430 }), [detail]);
  return (
    <figure className="limits-chart">
      <Drawing svg={svg} />
      <figcaption>
        <span>
          <i className="limits-chart__expected" aria-hidden="true" /> ordinary counterpart, 1 and 2 σ
        </span>
        <span>
          <i className="limits-chart__depth" aria-hidden="true" /> 5-σ depth for a point
        </span>
        <span>
          <i className="limits-chart__size" aria-hidden="true" />
          <span>
            for galaxies of that r<sub>e</sub>
          </span>
        </span>
        <SaveMenu
          label="Save the limits chart"
          fileName={fileNameOf(`${detail.verdict.name}-limits`)}
          draw={() => limitsChartSvg({ detail })}
        />
      </figcaption>
    </figure>
  );
}
