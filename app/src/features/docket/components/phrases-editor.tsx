import { Button, FormGroup, TextArea } from '@blueprintjs/core';
import { notePhrases } from '@eremite/shared/contracts/note';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { call } from '#lib/api-client.ts';
import { say } from '#lib/toaster.ts';

const phrasesQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'note-phrases'],
    queryFn: ({ signal }) => call(notePhrases, `/surveys/${surveyId}/note-phrases`, { signal }),
    staleTime: 300_000,
  });

/** The team's own phrases for its notes, one a line. */
export function PhrasesEditor({ surveyId }: { surveyId: string }) {
  const { data } = useQuery(phrasesQuery(surveyId));
  const client = useQueryClient();
  const [text, setText] = useState<string | null>(null);
  const save = useMutation({
    mutationFn: (phrases: string[]) =>
      call(notePhrases, `/surveys/${surveyId}/note-phrases`, { method: 'PUT', json: { phrases } }),
    onSuccess: (saved) => {
      client.setQueryData(phrasesQuery(surveyId).queryKey, saved);
      setText(null);
      void say('The phrases are the team’s now.');
    },
  });
  if (!data) return null;
  const lines = (text ?? '')
    .split('\n')
    .map((line) => line.trim())
    .filter(Boolean);
  return (
    <details>
      <summary>Phrases for notes</summary>
      <FormGroup label="One phrase a line" labelFor="note-phrases" helperText="Offered under every note of the team.">
        <TextArea
          id="note-phrases"
          fill
          rows={7}
          value={text ?? data.phrases.join('\n')}
          onChange={(event) => setText(event.target.value)}
        />
      </FormGroup>
      <Button
        text="Save the phrases"
        disabled={text === null}
        loading={save.isPending}
        onClick={() => save.mutate(lines)}
      />
      <ProblemCallout error={save.error} />
    </details>
  );
}
