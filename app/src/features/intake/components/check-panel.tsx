import { Checkbox, Tag } from '@blueprintjs/core';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { count } from '#lib/format/number.ts';
import type { Change } from '../hooks/use-intake-draft.ts';
import { goToSetting } from './go-to-setting.ts';
import { partOf } from './part-of.ts';

const LEVELS = { ask: 'Say', assumed: 'Assumed', warning: 'Note' } as const;
const INTENTS = { ask: 'danger', assumed: 'warning', warning: 'none' } as const;

/** What would become of the rows as things stand, and what is still open. Counted over the whole table. */
interface CheckPanelProps {
  intake: Intake;
  draft: IntakeSettings;
  change: Change;
  isChecking: boolean;
}

export function CheckPanel({ intake, draft, change, isChecking }: CheckPanelProps) {
  const { check } = intake;
  const order = ['ask', 'warning', 'assumed'];
  const questions = [...check.questions].sort((a, b) => order.indexOf(a.level) - order.indexOf(b.level));
  return (
    <section className="panel" aria-labelledby="check-title">
      <div className="panel__head">
        <h2 id="check-title">As it stands</h2>
        <span className="muted small" role="status">
          {isChecking ? 'checking all rows…' : check.ready ? 'ready' : 'not ready'}
        </span>
      </div>
      <div className="panel__body stack" style={{ cursor: isChecking ? 'progress' : undefined }}>
        <dl className="check-figures">
          <Figure term="usable" value={check.usable} />
          <Figure term="sidelined" value={check.sidelined} />
          <Figure term="left out" value={check.leftOut} />
        </dl>
        {check.reasons.map(({ reason, count: rows, first }) => (
          <details key={reason}>
            <summary>
              {reason} <span className="num muted">{count(rows)}</span>
            </summary>
            <ul className="check-rows">
              {first.map((row) => (
                <li key={`${row.row}:${row.column}`}>
                  <span className="num">
                    {row.line === null ? `row ${row.row}` : `line ${row.line}`}
                    {intake.parts.length > 1 && ` of ${partOf(intake.parts, row.row)}`}
                  </span>
                  {row.column && <span className="mono"> {row.column}</span>}
                  {row.value !== null && <span className="mono"> “{row.value}”</span>}
                </li>
              ))}
            </ul>
          </details>
        ))}
        {questions.length > 0 && (
          <ul className="check-questions">
            {questions.map(({ level, text, pointer }) => (
              <li key={pointer + text}>
                <Tag intent={INTENTS[level]}>{LEVELS[level]}</Tag> {text}{' '}
                {pointer === '/acceptTruncated' ? (
                  <Checkbox
                    className="check-questions__answer"
                    checked={draft.acceptTruncated === true}
                    label="Take the rows before the break"
                    onChange={({ currentTarget }) => change({ acceptTruncated: currentTarget.checked || undefined })}
                  />
                ) : (
                  level !== 'warning' && (
                    <button type="button" className="link-button" onClick={() => goToSetting(pointer)}>
                      go there
                    </button>
                  )
                )}
              </li>
            ))}
          </ul>
        )}
      </div>
    </section>
  );
}

const Figure = ({ term, value }: { term: string; value: number }) => (
  <div>
    <dt>{term}</dt>
    <dd className="num">{count(value)}</dd>
  </div>
);
