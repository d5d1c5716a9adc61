import {
  type Checkbox,
  type Dropdown,
  provideVSCodeDesignSystem,
  vsCodeButton,
  vsCodeCheckbox,
  vsCodeDropdown,
  vsCodeOption,
} from '@vscode/webview-ui-toolkit';
import { el, setAttribute } from './elements';

/**
 * The only file that knows the component toolkit. Text fields are native inputs: its own hide what describes them (help,
 * faults) from screen readers, since those stand outside its shadow root; numbers it has none for.
 */

/** Defines the elements. Styles that the toolkit adds as elements get the nonce of the page. */
export function defineControls(): void {
  const nonce = document.querySelector<HTMLMetaElement>('meta[property="csp-nonce"]')?.content ?? '';
  const append = document.head.appendChild.bind(document.head);
  document.head.appendChild = <T extends Node>(node: T): T => {
    if (node instanceof HTMLStyleElement) node.nonce = nonce;
    return append(node);
  };
  provideVSCodeDesignSystem().register(vsCodeButton(), vsCodeCheckbox(), vsCodeDropdown(), vsCodeOption());
}

export interface Button {
  element: HTMLElement;
  setDisabled(disabled: boolean): void;
}

/** A button; `primary` is for the one that matters most. */
export function newButton(
  label: string,
  onClick: () => void,
  { primary = false, describedBy }: { primary?: boolean; describedBy?: string } = {},
): Button {
  const element = el('vscode-button' as 'button', { appearance: primary ? 'primary' : 'secondary' }, label);
  if (describedBy !== undefined) element.setAttribute('aria-describedby', describedBy);
  element.addEventListener('click', () => {
    if (!element.hasAttribute('disabled')) onClick();
  });
  return {
    element,
    setDisabled: (disabled) => setAttribute(element, 'disabled', disabled ? '' : null),
  };
}

export interface CheckControl {
  element: HTMLElement;
  set(checked: boolean): void;
  setDisabled(disabled: boolean): void;
}

export function newCheckbox(label: string, onChange: (checked: boolean) => void): CheckControl {
  const element = el('vscode-checkbox' as 'div', { 'aria-label': label }, label) as unknown as Checkbox;
  let shown = false;
  element.addEventListener('change', () => {
    if (element.checked === shown) return;
    shown = element.checked;
    onChange(shown);
  });
  return {
    element,
    set(checked) {
      shown = checked;
      element.checked = checked;
    },
    setDisabled: (disabled) => setAttribute(element, 'disabled', disabled ? '' : null),
  };
}

export interface Choice {
  value: string;
  label: string;
}

export interface DropdownControl {
  element: HTMLElement;
  setChoices(choices: readonly Choice[]): void;
  set(value: string): void;
  setDisabled(disabled: boolean): void;
}

/** A drop-down list; `onChange` is called for the user's choices alone. */
export function newDropdown(label: string, onChange: (value: string) => void): DropdownControl {
  const element = el('vscode-dropdown' as 'div', { 'aria-label': label }) as unknown as Dropdown;
  let shown = '';
  let listed = '';
  const show = () => {
    if (element.value !== shown) element.value = shown;
  };
  const take = () => {
    if (element.open || element.value === shown) return;
    shown = element.value;
    onChange(shown);
  };
  element.addEventListener('change', take);
  // Arrow keys that lead a closed list back to what it had when it was last open come without a change.
  element.addEventListener('keyup', take);
  return {
    element,
    setChoices(choices) {
      const next = JSON.stringify(choices);
      if (next === listed) return;
      listed = next;
      element.replaceChildren(
        ...choices.map(({ value, label: text }) => el('vscode-option' as 'option', { value }, text)),
      );
      // The element looks at its options in a task of its own, and forgets a value that it did not know before.
      requestAnimationFrame(() => requestAnimationFrame(show));
    },
    set(value) {
      shown = value;
      show();
      requestAnimationFrame(() => requestAnimationFrame(show));
    },
    setDisabled: (disabled) => setAttribute(element, 'disabled', disabled ? '' : null),
  };
}
