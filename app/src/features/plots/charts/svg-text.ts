import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import type { Chart } from './chart.ts';
import { chartSummary } from './chart-summary.ts';

const NAMESPACE = 'http://www.w3.org/2000/svg';

/** A drawn plot as a document of its own, with what it shows, its sources and the screening caution in its metadata. */
export function svgText(picture: Element, chart: Chart, points: readonly PlotPoint[]): string {
  picture.setAttribute('xmlns', NAMESPACE);
  picture.setAttribute('role', 'img');
  const element = (name: string, text: string) => {
    const made = document.createElementNS(NAMESPACE, name);
    made.textContent = text;
    return made;
  };
  picture.prepend(
    element('title', chart.title),
    element('desc', `${chartSummary(chart, points, null)}. ${chart.caption} ${SCREENING_CAUTION}`),
  );
  return new XMLSerializer().serializeToString(picture);
}
