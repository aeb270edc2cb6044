import type { StarlightVerdict } from '@eremite/shared/contracts/words';
import type { JSX } from 'react';

const ring = (props: { dash?: string; r?: number } = {}) => (
  <circle cx="8" cy="8" r={props.r ?? 5.2} className="mark__ring" strokeDasharray={props.dash} />
);

const SHAPES: Record<StarlightVerdict, JSX.Element> = {
  dark: ring(),
  'nearly dark': (
    <>
      {ring()}
      <circle cx="8" cy="8" r="1.7" className="mark__dot" />
    </>
  ),
  starlit: <circle cx="8" cy="8" r="5.8" className="mark__disc" />,
  contested: (
    <>
      <circle cx="5.6" cy="8" r="4" className="mark__outline" />
      <circle cx="10.4" cy="8" r="4" className="mark__outline" />
    </>
  ),
  confused: (
    <>
      <circle cx="5.4" cy="8" r="4.2" className="mark__disc mark__disc--half" />
      <circle cx="10.6" cy="8" r="4.2" className="mark__disc mark__disc--half" />
    </>
  ),
  'cannot tell': <circle cx="8" cy="8" r="5.2" className="mark__unsure" strokeDasharray="2.2 2.4" />,
};

/** The ring of a starlight verdict. Decoration: the word always stands beside it. */
export function StarlightMark({ verdict, size = 16 }: { verdict: StarlightVerdict; size?: number }) {
  return (
    <svg className="mark" width={size} height={size} viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      {SHAPES[verdict]}
    </svg>
  );
}
