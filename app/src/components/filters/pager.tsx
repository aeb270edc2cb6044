import { Button } from '@blueprintjs/core';
import { useNavigate } from 'react-router-dom';
import { count } from '#lib/format/number.ts';
import { useSearchFilters } from './use-search-filters.ts';

interface PagerProps {
  shown: number;
  total: number;
  nextCursor: string | null;
}

/** Where in a long list one is. The place is in the address, so back goes to the page before. */
export function Pager({ shown, total, nextCursor }: PagerProps) {
  const { search, set } = useSearchFilters();
  const navigate = useNavigate();
  const from = Number(search.get('from') ?? 0);
  const next = () => set({ cursor: nextCursor, from: String(from + shown) }, { keepPlace: true });
  return (
    <div className="row pager">
      <span className="num small" role="status">
        {total === 0 ? 'none' : `${count(from + 1)}–${count(from + shown)} of ${count(total)}`}
      </span>
      <span className="grow" />
      {from > 0 && <Button size="small" variant="minimal" text="First" onClick={() => set({})} />}
      <Button size="small" text="Previous" disabled={from === 0} onClick={() => void navigate(-1)} />
      <Button size="small" text="Next" disabled={!nextCursor} onClick={next} />
    </div>
  );
}
