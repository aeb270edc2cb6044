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
  /** Those on the page. */
  detectionIds: string[];
  /** What finds them, and how many it finds over all pages. */
  filter: Record<string, string>;
  total: number;
}

/** Gives what is listed, or all that the filter finds, to a reviewer. */
export function AssignBar({ surveyId, teamId, detectionIds, filter, total }: AssignBarProps) {
  const { data: members } = useQuery(membersQuery(teamId));
  const [chosen, setChosen] = useState('');
  const assign = useAssign(surveyId);
  const able = members?.items.filter(({ role }) => role !== 'observer') ?? [];
  const userId = chosen || able[0]?.userId || '';
  const name = able.find((member) => member.userId === userId)?.name;
  const give = (what: Parameters<typeof assign.mutate>[0]['what']) =>
    assign.mutate(
      { what, userId },
      {
        onSuccess: (given) => void say(`${count(given)} detections are now ${name}’s.`),
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
        text={`Assign ${total > detectionIds.length ? 'these' : 'all'} ${count(detectionIds.length)}`}
        disabled={!userId}
        loading={assign.isPending}
        onClick={() => give({ detectionIds })}
      />
      {total > detectionIds.length && (
        <Button
          text={`Assign all ${count(total)}`}
          disabled={!userId}
          loading={assign.isPending}
          onClick={() => give({ filter })}
        />
      )}
    </div>
  );
}
