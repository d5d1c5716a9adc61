import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { PageFrame } from './pageFrame';
import { project } from './places';

interface Violation {
  id: string;
  impact: string;
  help: string;
  nodes: { html: string; failureSummary: string }[];
}

/** What axe-core holds to be serious or critical in the page in front, a line each. */
export async function seriousViolations(page: PageFrame): Promise<string[]> {
  const frame = await page.handle();
  await frame.evaluate(readFileSync(join(project, 'node_modules', 'axe-core', 'axe.min.js'), 'utf8'));
  // The frame is transparent; axe-core would take white for what lies behind it.
  await frame.evaluate("document.documentElement.style.backgroundColor = 'var(--vscode-editor-background)'");
  const script =
    "axe.run(document, { resultTypes: ['violations'] }).then((r) => JSON.stringify(r.violations))";
  const violations = JSON.parse((await frame.evaluate(script)) as string) as Violation[];
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, help, nodes }) =>
      nodes.map(({ html, failureSummary }) =>
        `${id}: ${help}: ${html} ${failureSummary}`.replace(/\s+/g, ' '),
      ),
    );
}
