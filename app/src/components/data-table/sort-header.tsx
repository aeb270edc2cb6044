import { Tooltip } from '@blueprintjs/core';
import type { ReactNode } from 'react';

interface SortHeaderProps {
  column: { header: ReactNode; unit?: string; hint?: string; sort?: string; align?: 'left' | 'right' };
  sort: string | undefined;
  onSort: ((sort: string) => void) | undefined;
}

const DIRECTIONS = { up: 'ascending', down: 'descending' } as const;

/** A column's head: name, unit, hint, and a button that sorts by it, twice for the other way round. */
export function SortHeader({ column, sort, onSort }: SortHeaderProps) {
  const { header, unit, hint, sort: key, align } = column;
  const direction = key && sort === key ? 'up' : key && sort === `-${key}` ? 'down' : undefined;
  const words = (
    <span className="data-table__name">
      {header}
      {unit && <span className="data-table__unit">{unit}</span>}
    </span>
  );
  const content =
    key && onSort ? (
      <button type="button" className="data-table__sort" onClick={() => onSort(direction === 'up' ? `-${key}` : key)}>
        {words}
        <span className="data-table__arrow" aria-hidden="true">
          {direction === 'up' ? '▲' : direction === 'down' ? '▼' : ''}
        </span>
      </button>
    ) : (
      words
    );
  return (
    <th
      scope="col"
      className={align === 'left' ? 'is-left' : undefined}
      aria-sort={direction ? DIRECTIONS[direction] : undefined}
    >
      {hint ? (
        <Tooltip content={hint} placement="top" hoverOpenDelay={350} openOnTargetFocus={false}>
          {content}
        </Tooltip>
      ) : (
        content
      )}
    </th>
  );
}
