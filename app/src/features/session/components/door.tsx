import type { ReactNode } from 'react';
import './door.css';

/** The quiet page before one is in: the mark, the name, one form. */
export function Door({ title, lede, children }: { title: string; lede: string; children: ReactNode }) {
  return (
    <main className="door">
      <section className="door__sheet" aria-labelledby="door-title">
        <div className="door__mark" aria-hidden="true">
          <svg width="190" height="190" viewBox="0 0 190 190">
            <circle cx="88" cy="95" r="74" className="door__contour" strokeDasharray="1.5 7" />
            <circle cx="88" cy="95" r="55" className="door__contour" strokeDasharray="5 6" />
            <circle cx="88" cy="95" r="36" className="door__contour door__contour--near" />
            <circle cx="88" cy="95" r="17" className="door__ring" />
            <path d="M166 164l14-40" className="door__stroke" />
          </svg>
        </div>
        <div>
          <p className="door__name">eremite</p>
          <h1 id="door-title">{title}</h1>
          <p className="muted">{lede}</p>
          {children}
        </div>
      </section>
    </main>
  );
}
