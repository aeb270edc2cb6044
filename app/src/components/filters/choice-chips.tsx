import type { ReactNode } from 'react';
import './filters.css';

interface ChoiceChipsProps<T extends string> {
  label: string;
  choices: readonly T[];
  chosen: readonly string[];
  counts?: Partial<Record<T, number>> | undefined;
  render: (choice: T) => ReactNode;
  onToggle: (choice: T) => void;
}

/** Several choices, any of which may be on; each says whether it is pressed. */
export function ChoiceChips<T extends string>(props: ChoiceChipsProps<T>) {
  const { label, choices, chosen, counts, render, onToggle } = props;
  return (
    <div role="group" aria-label={label} className="chips">
      {choices.map((choice) => (
        <button
          key={choice}
          type="button"
          className="chip"
          aria-pressed={chosen.includes(choice)}
          onClick={() => onToggle(choice)}
        >
          {render(choice)}
          {counts && <span className="num chip__count">{counts[choice] ?? 0}</span>}
        </button>
      ))}
    </div>
  );
}
