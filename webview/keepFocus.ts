/**
 * Builds a part of the page anew without taking the focus away from who works with the keyboard: what had it gives it to
 * its successor of the same name, with the selection as it was.
 * @param otherwise where to go when there is no successor
 */
export function keepFocus(within: HTMLElement, rebuild: () => void, otherwise?: () => void): void {
  const before = document.activeElement;
  if (!(before instanceof HTMLElement) || !within.contains(before)) {
    rebuild();
    return;
  }
  const name = nameOf(before);
  const selection =
    before instanceof HTMLInputElement && before.type === 'text'
      ? ([before.selectionStart, before.selectionEnd] as const)
      : null;
  rebuild();
  const all = within.querySelectorAll<HTMLElement>(
    'input, button, vscode-button, vscode-dropdown, [tabindex="0"]',
  );
  const next = [...all].find((one) => one.tagName === before.tagName && nameOf(one) === name);
  if (next === undefined) {
    otherwise?.();
    return;
  }
  next.focus({ preventScroll: true });
  if (selection !== null && next instanceof HTMLInputElement) next.setSelectionRange(...selection);
}

/** As a screen reader would say it. */
function nameOf(element: HTMLElement): string {
  const label = element instanceof HTMLInputElement ? element.labels?.[0]?.textContent : null;
  return element.getAttribute('aria-label') ?? label ?? element.textContent ?? '';
}
