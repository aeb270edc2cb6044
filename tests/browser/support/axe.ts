import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Page } from 'playwright-core';

const AXE = readFileSync(fileURLToPath(import.meta.resolve('axe-core/axe.min.js')), 'utf8');
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

interface Violation {
  impact: string;
  id: string;
  nodes: { target: string[]; failureSummary: string }[];
}

/**
 * Serious and critical violations of WCAG 2.2 AA on the page as it stands, a line each.
 * @param within selectors of the parts to look at; the whole page where absent
 */
export async function violations(page: Page, within?: readonly string[]): Promise<string[]> {
  if (!(await page.evaluate(() => 'axe' in globalThis))) await page.evaluate(AXE);
  const found = await page.evaluate(
    async ({ tags, parts }) => {
      const { axe } = globalThis as unknown as {
        axe: { run(context: unknown, options: object): Promise<{ violations: Violation[] }> };
      };
      return (await axe.run(parts ?? document, { runOnly: tags, resultTypes: ['violations'] })).violations;
    },
    { tags: TAGS, parts: within?.map((part) => [part]) },
  );
  return found
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary}`),
    );
}
