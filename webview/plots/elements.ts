/** An element with a class and a text; the text is set as text, never parsed. */
export function make<Name extends keyof HTMLElementTagNameMap>(
  name: Name,
  className = '',
  text = '',
): HTMLElementTagNameMap[Name] {
  const element = document.createElement(name);
  if (className !== '') element.className = className;
  if (text !== '') element.textContent = text;
  return element;
}

/** An SVG element with its attributes. */
export function makeSvg<Name extends keyof SVGElementTagNameMap>(
  name: Name,
  attributes: Record<string, string | number>,
): SVGElementTagNameMap[Name] {
  const element = document.createElementNS('http://www.w3.org/2000/svg', name);
  for (const [key, value] of Object.entries(attributes)) element.setAttribute(key, String(value));
  return element;
}
