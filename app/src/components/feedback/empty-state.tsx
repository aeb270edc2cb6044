import type { ReactNode } from 'react';
import './feedback.css';

interface EmptyStateProps {
  title: string;
  /** What to do next. */
  children: ReactNode;
  action?: ReactNode;
}

/** Says that a list is empty and what to do about it. */
export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="empty-state">
      <svg width="44" height="44" viewBox="0 0 44 44" aria-hidden="true">
        <circle cx="20" cy="22" r="13" className="empty-state__ring" />
        <path d="M37 37l4-11" className="empty-state__stroke" />
      </svg>
      <h2>{title}</h2>
      <p>{children}</p>
      {action && <div className="row">{action}</div>}
    </div>
  );
}
