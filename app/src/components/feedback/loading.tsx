import './feedback.css';

/** Something is on its way; read out politely. */
export function Loading({ what = 'Loading' }: { what?: string }) {
  return (
    <div className="loading" role="status">
      <span className="loading__bar" />
      {what}…
    </div>
  );
}
