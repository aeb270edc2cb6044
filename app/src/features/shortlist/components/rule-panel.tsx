import { Button, Checkbox, FormGroup, HTMLSelect, InputGroup } from '@blueprintjs/core';
import type { PutShortlistRequest, ShortlistProposal, ShortlistRule } from '@eremite/shared/contracts/shortlist';
import {
  STARLIGHT_VERDICTS,
  SURROUNDINGS_VERDICTS,
  type StarlightVerdict,
  type SurroundingsVerdict,
} from '@eremite/shared/contracts/words';
import { useState, type FormEvent } from 'react';
import { Link } from 'react-router-dom';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { probability } from '#lib/format/number.ts';
import { usePropose } from '../api/proposals.ts';

const SHARES = [
  { key: 'minPNone', label: 'Least P(none)' },
  { key: 'minPAlone', label: 'Least P(no neighbour)' },
  { key: 'minStability', label: 'Least stability' },
] as const;

interface RulePanelProps {
  surveyId: string;
  runId: string;
  to: (detectionId: string) => string;
  isPending: boolean;
  onTake: (entries: PutShortlistRequest['entries'], how: 'replace' | 'add') => void;
}

/** Picks settled detections by a rule, best first; what is not settled is named with why. */
export function RulePanel({ surveyId, runId, to, isPending, onTake }: RulePanelProps) {
  const propose = usePropose(surveyId);
  const [starlight, setStarlight] = useState<StarlightVerdict[]>(['dark', 'nearly dark']);
  const [surroundings, setSurroundings] = useState<SurroundingsVerdict[]>(['alone']);
  const [shares, setShares] = useState({ minPNone: '0', minPAlone: '0', minStability: '0' });
  const [worstDoubt, setWorstDoubt] = useState<ShortlistRule['worstDoubt']>('watch');
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const { minPNone, minPAlone, minStability } = shares;
    propose.mutate({
      runId,
      starlight,
      surroundings,
      worstDoubt,
      minPNone: Number(minPNone),
      minPAlone: Number(minPAlone),
      minStability: Number(minStability),
    });
  };
  return (
    <div className="stack">
      <form onSubmit={submit} className="stack">
        <div className="columns">
          <Words legend="Settled starlight" all={STARLIGHT_VERDICTS} chosen={starlight} onChange={setStarlight} />
          <Words
            legend="Settled surroundings"
            all={SURROUNDINGS_VERDICTS}
            chosen={surroundings}
            onChange={setSurroundings}
          />
        </div>
        <div className="shortlist__shares">
          {SHARES.map(({ key, label }) => (
            <FormGroup key={key} label={label} labelFor={key} style={{ margin: 0 }}>
              <InputGroup
                id={key}
                type="number"
                required
                min={0}
                max={1}
                step="any"
                value={shares[key]}
                onValueChange={(value) => setShares({ ...shares, [key]: value })}
              />
            </FormGroup>
          ))}
          <FormGroup label="Gravest doubt" labelFor="worst-doubt" style={{ margin: 0 }}>
            <HTMLSelect
              id="worst-doubt"
              fill
              value={worstDoubt}
              options={['clear', 'watch', 'serious']}
              onChange={(event) => setWorstDoubt(event.target.value as ShortlistRule['worstDoubt'])}
            />
          </FormGroup>
        </div>
        <div className="row">
          <Button
            type="submit"
            text="Show what fits"
            loading={propose.isPending}
            disabled={starlight.length === 0 || surroundings.length === 0}
          />
        </div>
      </form>
      <ProblemCallout error={propose.error} />
      {propose.data && <Proposal proposal={propose.data} to={to} isPending={isPending} onTake={onTake} />}
    </div>
  );
}

function Words<W extends string>(props: {
  legend: string;
  all: readonly W[];
  chosen: readonly W[];
  onChange: (words: W[]) => void;
}) {
  const { legend, all, chosen, onChange } = props;
  return (
    <fieldset style={{ border: 0, padding: 0, margin: 0 }}>
      <legend className="muted">{legend}</legend>
      <div className="row">
        {all.map((word) => (
          <Checkbox
            key={word}
            inline
            label={word}
            checked={chosen.includes(word)}
            onChange={() =>
              onChange(chosen.includes(word) ? chosen.filter((other) => other !== word) : [...chosen, word])
            }
          />
        ))}
      </div>
    </fieldset>
  );
}

function Proposal({
  proposal: { entries, refused },
  to,
  isPending,
  onTake,
}: Pick<RulePanelProps, 'to' | 'isPending' | 'onTake'> & { proposal: ShortlistProposal }) {
  const taken = entries.map(({ detectionId, reason }) => ({ detectionId, reason, nullResult: '' }));
  const fresh = entries.filter(({ isOn }) => !isOn).length;
  return (
    <div className="stack" role="status">
      <p>
        {entries.length === 0
          ? 'Nothing settled fits.'
          : `${entries.length} settled ${entries.length === 1 ? 'detection fits' : 'detections fit'}, best first; ${fresh} not on the list yet.`}
      </p>
      {entries.length > 0 && (
        <>
          <ol className="shortlist__refused">
            {entries.map(({ detectionId, name, reason, priority, isOn }) => (
              <li key={detectionId}>
                <Link to={to(detectionId)}>{name}</Link> <span className="num">{probability(priority.value)}</span>{' '}
                <span className="muted small">
                  {reason}
                  {isOn ? ' On the list.' : ''}
                </span>
              </li>
            ))}
          </ol>
          <div className="row">
            <Button text="Add to the list" disabled={isPending || fresh === 0} onClick={() => onTake(taken, 'add')} />
            <Button text="Make it the list" disabled={isPending} onClick={() => onTake(taken, 'replace')} />
          </div>
        </>
      )}
      {refused.length > 0 && (
        <details>
          <summary>{refused.length} would fit by the computed verdict but are not settled</summary>
          <ul className="shortlist__refused">
            {refused.map(({ detectionId, name, why }) => (
              <li key={detectionId}>
                <Link to={to(detectionId)}>{name}</Link> <span className="muted">{why}</span>
              </li>
            ))}
          </ul>
        </details>
      )}
    </div>
  );
}
