type Child = Node | string | null | undefined | false;

export interface Attributes {
  class?: string;
  id?: string;
  [name: string]: string | undefined;
}

/** An element with attributes and children; texts become text nodes, never markup. */
export function el<K extends keyof HTMLElementTagNameMap>(
  tag: K,
  attributes: Attributes = {},
  ...children: Child[]
): HTMLElementTagNameMap[K] {
  const element = document.createElement(tag);
  for (const [name, value] of Object.entries(attributes)) {
    if (value !== undefined) element.setAttribute(name, value);
  }
  element.append(...children.filter((child): child is Node | string => Boolean(child)));
  return element;
}

/** Sets a text only where it differs, so that nothing is read aloud twice. */
export function setText(element: HTMLElement, text: string): void {
  if (element.textContent !== text) element.textContent = text;
}

/** Sets or removes an attribute. */
export function setAttribute(element: HTMLElement, name: string, value: string | null): void {
  if (value === null) element.removeAttribute(name);
  else if (element.getAttribute(name) !== value) element.setAttribute(name, value);
}

let last = 0;

/** An id that no other element has. */
export function newId(name: string): string {
  return `${name}-${++last}`;
}

/** Calls `apply` with a value whenever it is another one than before. */
export function whenChanged<T>(apply: (value: T) => void): (value: T) => void {
  let before: { value: T } | null = null;
  return (value) => {
    if (before !== null && Object.is(before.value, value)) return;
    before = { value };
    apply(value);
  };
}
