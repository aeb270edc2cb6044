import { probability } from '#lib/format/number.ts';
import './probability-bar.css';

interface ProbabilityBarProps {
  pNone: number;
  pMissed: number;
  pSpurious: number;
}

/** The four ways it can be, adding to one: none, missed, objects, spurious. The numbers stand under the bar. */
export function ProbabilityBar({ pNone, pMissed, pSpurious }: ProbabilityBarProps) {
  const pObjects = Math.max(0, 1 - pNone - pMissed - pSpurious);
  const parts = [
    { key: 'none', word: 'none', value: pNone },
    { key: 'missed', word: 'missed', value: pMissed },
    { key: 'objects', word: 'objects', value: pObjects },
    { key: 'spurious', word: 'spurious', value: pSpurious },
  ];
  const sentence = parts.map(({ word, value }) => `${word} ${probability(value)}`).join(', ');
  return (
    <figure className="probability-bar" aria-label={`Probabilities: ${sentence}`}>
      <div className="probability-bar__track" aria-hidden="true">
        {parts.map(({ key, value }) => (
          <span
            key={key}
            className={`probability-bar__part probability-bar__part--${key}`}
            style={{ flexGrow: value }}
          />
        ))}
      </div>
      <figcaption>
        {parts.map(({ key, word, value }) => (
          <span key={key}>
            <i className={`probability-bar__part--${key}`} aria-hidden="true" />
            {word} <b className="num">{probability(value)}</b>
          </span>
        ))}
      </figcaption>
    </figure>
  );
}
