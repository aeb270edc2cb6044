import type { ReactNode } from 'react';

/** A titled sheet of a page. */
export const Panel = ({ title, aside, children }: { title: string; aside?: ReactNode; children: ReactNode }) => (
  <section className="panel" aria-label={title}>
    <div className="panel__head">
      <h2>{title}</h2>
      {aside}
    </div>
    <div className="panel__body">{children}</div>
  </section>
);
