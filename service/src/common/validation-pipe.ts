import { StandardSchemaValidationPipe } from '@nestjs/common';
import { AppError, type FaultyInput } from './app-error.ts';

const MOST_FAULTS = 50;

interface Issue {
  readonly message: string;
  readonly path?: readonly (PropertyKey | { readonly key: PropertyKey })[] | undefined;
}

/** Where in the input an issue lies, as a JSON pointer (RFC 6901). */
function pointerOf({ path = [] }: Issue): string {
  const keys = path.map((part) => String(typeof part === 'object' ? part.key : part));
  return keys.map((key) => `/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/** An input that does not fit its schema, with a pointer for each fault. */
export function validationError(issues: readonly Issue[]): AppError {
  const faults: FaultyInput[] = issues
    .slice(0, MOST_FAULTS)
    .map((issue) => ({ pointer: pointerOf(issue), detail: issue.message }));
  const first = faults[0];
  const more = issues.length > 1 ? ` (and ${issues.length - 1} more)` : '';
  const detail = first && `${first.pointer ? `${first.pointer}: ` : ''}${first.detail}${more}`;
  return new AppError('VALIDATION_FAILED', detail, faults);
}

/** Every body, parameter and query goes through its zod schema before a controller sees it. */
export const validationPipe = (): StandardSchemaValidationPipe =>
  new StandardSchemaValidationPipe({
    exceptionFactory: (issues) => {
      throw validationError(issues as readonly Issue[]);
    },
  });
