import type { StarlightVerdict, SurroundingsVerdict } from '@eremite/shared/contracts/words';
import { StarlightMark } from './starlight-mark.tsx';
import { SurroundingsMark } from './surroundings-mark.tsx';
import './verdict-mark.css';

/** A starlight verdict: its ring and its word. */
export function StarlightWord({ verdict, size }: { verdict: StarlightVerdict; size?: number }) {
  return (
    <span className="verdict-word">
      <StarlightMark verdict={verdict} {...(size ? { size } : {})} />
      {verdict}
    </span>
  );
}

/** A surroundings verdict: its strokes and its word. */
export function SurroundingsWord({ verdict, size }: { verdict: SurroundingsVerdict; size?: number }) {
  return (
    <span className="verdict-word">
      <SurroundingsMark verdict={verdict} {...(size ? { size } : {})} />
      {verdict}
    </span>
  );
}
