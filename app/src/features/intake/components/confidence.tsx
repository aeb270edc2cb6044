/** How sure a guess is, as a word and a bar. */
export function Confidence({ value }: { value: number }) {
  const word = value >= 0.9 ? 'sure' : value >= 0.6 ? 'likely' : 'a guess';
  return (
    <span className="confidence" title={`${Math.round(value * 100)} per cent`}>
      <span className="confidence__track" aria-hidden="true">
        <span style={{ width: `${value * 100}%` }} />
      </span>
      <span className="prose">{word}</span>
    </span>
  );
}
