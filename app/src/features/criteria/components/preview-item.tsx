import type { Preview } from '@eremite/shared/contracts/preview';
import { Link } from 'react-router-dom';
import { StarlightWord, SurroundingsWord } from '#components/verdict-mark/verdict-word.tsx';
import { paths } from '#config/paths.ts';
import { probability } from '#lib/format/number.ts';

/** One detection: its verdicts under the criteria of the form, and what they are in the latest run where that differs. */
export function PreviewItem({ surveyId, item }: { surveyId: string; item: Preview['items'][number] }) {
  const { verdict: now, before } = item;
  const starsMoved = before !== null && before.starlight !== now.starlight;
  const placeMoved = before !== null && before.surroundings !== now.surroundings;
  return (
    <li className={starsMoved || placeMoved ? 'is-moved' : undefined}>
      <p>
        <Link to={paths.detection(surveyId, now.detectionId)} target="_blank" className="mono">
          {now.name}
        </Link>
        <span className="preview__state">
          {before === null ? 'not in a run yet' : starsMoved || placeMoved ? 'changes' : 'stays'}
        </span>
      </p>
      <p className="preview__words">
        {starsMoved && <span className="preview__was">{before.starlight}</span>}
        <StarlightWord verdict={now.starlight} />
      </p>
      <Shift name="P(none)" from={before?.pNone} to={now.pNone} />
      <p className="preview__words">
        {placeMoved && <span className="preview__was">{before.surroundings}</span>}
        <SurroundingsWord verdict={now.surroundings} />
      </p>
      <Shift name="P(alone)" from={before?.pAlone} to={now.pAlone} />
    </li>
  );
}

/** A probability, and what it was where the shown digits differ. */
function Shift({ name, from, to }: { name: string; from: number | null | undefined; to: number | null }) {
  const was = probability(from);
  const is = probability(to);
  return (
    <p className="num small preview__shift">
      {name} {from !== undefined && was !== is && <span className="muted">{was} → </span>}
      {is}
    </p>
  );
}
