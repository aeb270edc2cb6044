import { beforeEach, onTestFailed } from 'vitest';

/** For a journey told in several tests: once a step has failed, those after it are skipped, not failed in their turn. */
export function stopAtFailure(): void {
  let hasFailed = false;
  beforeEach((context) => {
    if (hasFailed) context.skip('a step before it failed');
    onTestFailed(() => {
      hasFailed = true;
    });
  });
}
