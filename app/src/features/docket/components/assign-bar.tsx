import { Button, HTMLSelect } from '@blueprintjs/core';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { count } from '#lib/format/number.ts';
import { membersQuery } from '#lib/queries/members.ts';
import { complain, say } from '#lib/toaster.ts';
import { useAssign } from '../api/assign.ts';

interface AssignBarProps {
  surveyId: string;
  teamId: string;
  detectionIds: string[];
}

/** Gives what is listed to a reviewer. */
export function AssignBar({ surveyId, teamId, detectionIds }: AssignBarProps) {
  const { data: members } = useQuery(membersQuery(teamId));
  const [chosen, setChosen] = useState('');
  const assign = useAssign(surveyId);
  const able = members?.items.filter(({ role }) => role !== 'observer') ?? [];
  const userId = chosen || able[0]?.userId || '';
  const name = able.find((member) => member.userId === userId)?.name;
  const give = () =>
    assign.mutate(
      { detectionIds, userId },
      {
        onSuccess: () => void say(`${count(detectionIds.length)} detections are now ${name}’s.`),
        onError: (error) => void complain(error),
      },
    );
  return (
    <div className="row">
      <HTMLSelect
        aria-label="Reviewer"
        value={userId}
        onChange={(event) => setChosen(event.target.value)}
        options={able.map((member) => ({ value: member.userId, label: member.name }))}
      />
      <Button
        text={`Assign these ${count(detectionIds.length)}`}
        disabled={!userId}
        loading={assign.isPending}
        onClick={give}
      />
    </div>
  );
}
