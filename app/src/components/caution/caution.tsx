import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import './caution.css';

/** Stands on every page that shows a verdict. */
export function Caution() {
  return (
    <p className="caution" role="note">
      {SCREENING_CAUTION}
    </p>
  );
}
