import { Button } from '@blueprintjs/core';
import { binding, type Binding } from '@eremite/shared/contracts/binding';
import { listOf } from '@eremite/shared/contracts/list';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { act, call } from '#lib/api-client.ts';
import { count } from '#lib/format/number.ts';
import { complain, say } from '#lib/toaster.ts';

const bindingsQuery = (surveyId: string) =>
  queryOptions({
    queryKey: ['survey', surveyId, 'bindings'],
    queryFn: ({ signal }) => call(listOf(binding), `/surveys/${surveyId}/bindings?limit=200`, { signal }),
  });

/** Questions a new version of a table raised: which of its rows is the source that people's words were given on. */
export function BindingQuestions({ surveyId, mayAnswer }: { surveyId: string; mayAnswer: boolean }) {
  const { data } = useQuery(bindingsQuery(surveyId));
  const client = useQueryClient();
  const answer = useMutation({
    mutationFn: ({ id, row }: { id: string; row: number | null }) =>
      act(`/bindings/${id}/answer`, { method: 'POST', json: { row } }),
    onSuccess: () => void say('Bound; the next run goes by it.'),
    onError: (error) => void complain(error),
    onSettled: () => client.invalidateQueries({ queryKey: ['survey', surveyId] }),
  });
  if (!data || data.items.length === 0) return null;
  return (
    <section className="panel bindings" aria-labelledby="bindings">
      <div className="panel__head">
        <h2 id="bindings">
          {data.total === 1 ? 'One decision does' : `${count(data.total)} decisions do`} not know its source in a new
          version of a table
        </h2>
      </div>
      <div className="panel__body">
        <ul>
          {data.items.map((item) => (
            <li key={item.id}>
              <span>
                <b className="mono">{item.name}</b> {item.words.join(', ')} is in {item.catalogueName}:
              </span>
              {item.candidates.map((candidate) => (
                <Button
                  key={candidate.row}
                  size="small"
                  disabled={!mayAnswer || answer.isPending}
                  text={candidateWords(candidate)}
                  onClick={() => answer.mutate({ id: item.id, row: candidate.row })}
                />
              ))}
              <Button
                size="small"
                variant="minimal"
                disabled={!mayAnswer || answer.isPending}
                text="none of them"
                onClick={() => answer.mutate({ id: item.id, row: null })}
              />
            </li>
          ))}
        </ul>
      </div>
    </section>
  );
}

const candidateWords = ({ name, row, separationArcsec }: Binding['candidates'][number]): string =>
  `${name || 'no name'}, row ${row}, ${separationArcsec.toFixed(1)}″ off`;
