import { Checkbox } from '@blueprintjs/core';
import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { meQuery } from '#lib/queries/me.ts';
import { membersQuery } from '#lib/queries/members.ts';
import { DecisionDialog, type DecisionDialogProps } from './decision-dialog.tsx';

type RemarkDialogProps = Pick<DecisionDialogProps, 'surveyId' | 'detectionId' | 'decisions' | 'draft'> & {
  name: string;
  teamId: string;
};

/** Something said without deciding; whom one asks is written to. */
export function RemarkDialog({ name, teamId, ...common }: RemarkDialogProps) {
  const { data: me } = useSuspenseQuery(meQuery());
  const { data: members } = useQuery(membersQuery(teamId));
  const [asked, setAsked] = useState<readonly string[]>([]);
  const others = members?.items.filter(({ userId }) => userId !== me.id) ?? [];
  const toggle = (userId: string) =>
    setAsked((old) => (old.includes(userId) ? old.filter((id) => id !== userId) : [...old, userId]));
  return (
    <DecisionDialog
      {...common}
      title={`A remark on ${name}`}
      doIt={asked.length > 0 ? 'Ask' : 'Keep the remark'}
      label={asked.length > 0 ? 'Question' : 'Remark'}
      onConfirm={(text, attachmentIds) =>
        common.decisions.decide({
          path: 'remarks',
          json: { text, mentions: asked, attachmentIds },
          what: `Your remark on ${name}`,
          done: asked.length > 0 ? 'Asked; they are written to.' : 'Your remark is kept.',
          draft: common.draft,
        })
      }
    >
      <fieldset className="remark-dialog__asked">
        <legend>Ask by e-mail</legend>
        {others.map(({ userId, name: who, role }) => (
          <Checkbox
            key={userId}
            inline
            label={`${who} (${role})`}
            checked={asked.includes(userId)}
            onChange={() => toggle(userId)}
          />
        ))}
      </fieldset>
    </DecisionDialog>
  );
}
