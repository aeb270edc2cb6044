import { HTMLSelect } from '@blueprintjs/core';
import type { Run } from '@eremite/shared/contracts/run';
import { day } from '#lib/format/time.ts';

interface RunPickerProps {
  runs: readonly Run[];
  value: string;
  label?: string;
  onChange: (runId: string) => void;
}

/** Chooses among the finished runs. */
export function RunPicker({ runs, value, label = 'Run', onChange }: RunPickerProps) {
  const finished = runs.filter(({ state }) => state === 'done');
  return (
    <HTMLSelect
      aria-label={label}
      value={value}
      onChange={(event) => onChange(event.target.value)}
      options={finished.map(({ id, number, criteriaNumber, finishedAt }) => ({
        value: id,
        label: `Run ${number} · criteria ${criteriaNumber} · ${day(finishedAt)}`,
      }))}
    />
  );
}
