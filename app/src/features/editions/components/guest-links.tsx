import { Button, Callout, FormGroup, InputGroup } from '@blueprintjs/core';
import type { GuestLink } from '@eremite/shared/contracts/edition';
import { useQuery } from '@tanstack/react-query';
import { useState, type FormEvent } from 'react';
import { NoteDialog } from '#components/dialogs/note-dialog.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { day, moment } from '#lib/format/time.ts';
import { say } from '#lib/toaster.ts';
import { guestLinksQuery, useMakeLink, useRevokeLink } from '../api/editions.ts';

function standing({ revokedAt, expiresAt }: GuestLink): { isOver: boolean; words: string } {
  if (revokedAt) return { isOver: true, words: `revoked ${day(revokedAt)}` };
  if (Date.parse(expiresAt) <= Date.now()) return { isOver: true, words: `expired ${day(expiresAt)}` };
  return { isOver: false, words: `until ${day(expiresAt)}` };
}

/** Links for a referee or a collaborator without an account: they open this edition and nothing else. */
export function GuestLinks({ editionId }: { editionId: string }) {
  const { data } = useQuery(guestLinksQuery(editionId));
  const make = useMakeLink(editionId);
  const revoke = useRevokeLink(editionId);
  const [label, setLabel] = useState('');
  const [days, setDays] = useState('30');
  const [revoking, setRevoking] = useState<GuestLink | null>(null);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    make.mutate({ label, expiresInDays: Number(days) }, { onSuccess: () => setLabel('') });
  };
  return (
    <div className="stack">
      <form onSubmit={submit} className="row" style={{ alignItems: 'flex-end' }}>
        <FormGroup label="For" labelFor="link-label" style={{ margin: 0, flex: 1, minWidth: 160 }}>
          <InputGroup
            id="link-label"
            required
            maxLength={200}
            placeholder="who will read it"
            value={label}
            onValueChange={setLabel}
          />
        </FormGroup>
        <FormGroup label="Days" labelFor="link-days" style={{ margin: 0, width: 80 }}>
          <InputGroup id="link-days" type="number" min={1} max={366} required value={days} onValueChange={setDays} />
        </FormGroup>
        <Button type="submit" text="Make a link" loading={make.isPending} />
      </form>
      <ProblemCallout error={make.error ?? revoke.error} />
      {make.data && (
        <Callout intent="primary" icon={null} title="Copy it now: it is not shown again">
          <code className="mono" style={{ overflowWrap: 'anywhere', userSelect: 'all' }}>
            {new URL(make.data.url, location.origin).href}
          </code>
        </Callout>
      )}
      {data?.items.length === 0 && <p className="muted">Nobody outside the team can read this edition.</p>}
      <ul className="history">
        {data?.items.map((link) => {
          const { isOver, words } = standing(link);
          return (
            <li key={link.id} className="row">
              <span className="grow">
                {link.label}{' '}
                <span className="muted small">
                  {words}, {link.lastUsedAt ? `last opened ${moment(link.lastUsedAt)}` : 'never opened'}
                </span>
              </span>
              {!isOver && (
                <Button
                  size="small"
                  variant="minimal"
                  text="Revoke"
                  aria-label={`Revoke the link for ${link.label}`}
                  onClick={() => setRevoking(link)}
                />
              )}
            </li>
          );
        })}
      </ul>
      <NoteDialog
        isOpen={revoking !== null}
        title="Revoke the link"
        doIt="Revoke"
        danger
        withoutNote
        isPending={revoke.isPending}
        error={revoke.error}
        onClose={() => setRevoking(null)}
        onConfirm={() =>
          revoke.mutate(revoking!.id, {
            onSuccess: () => {
              setRevoking(null);
              void say('The link opens nothing any more.');
            },
          })
        }
      >
        <p>
          Whoever holds the link for {revoking?.label} can no longer read the edition. It cannot be given back; make a
          new one instead.
        </p>
      </NoteDialog>
    </div>
  );
}
