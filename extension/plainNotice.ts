import { visible } from '../core/figures/visible';

/**
 * A sentence for a message of the workbench, which takes `[text](command:…)` for a link that runs a command: names from
 * documents and files must not become one.
 */
export function plainNotice(text: string): string {
  return visible(text).replaceAll('](', '] (');
}
