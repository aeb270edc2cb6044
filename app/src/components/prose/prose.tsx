import { Fragment } from 'react';

/** A sentence of the service with its subscripts set: `M_HI` becomes M with a low HI. */
export function Prose({ text }: { text: string }) {
  const pieces = text.split(/(\b[A-Za-z]{1,3}_(?:[A-Za-z0-9]+|\*))/);
  return (
    <>
      {pieces.map((piece, i) => {
        if (i % 2 === 0) return <Fragment key={i}>{piece}</Fragment>;
        const [base, low] = piece.split('_');
        return (
          <span key={i}>
            {base}
            <sub>{low}</sub>
          </span>
        );
      })}
    </>
  );
}
