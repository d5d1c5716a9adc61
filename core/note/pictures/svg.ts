import { visible } from '../../figures/visible';

/** Text for an element or an attribute in double quotes; characters that cannot be seen are spelled out. */
export function xmlText(text: string): string {
  return visible(text)
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;')
    .replace(/"/g, '&quot;');
}

/** A coordinate with at most two digits after the point, so that the bytes do not hang on the last bits. */
export function coordinate(value: number): string {
  const text = String(Number(value.toFixed(2)));
  return text === '-0' ? '0' : text;
}

/** A label that fits a legend or a heading. */
export function shortened(text: string, length = 40): string {
  const characters = Array.from(text);
  return characters.length <= length ? text : `${characters.slice(0, length - 1).join('')}…`;
}

export const width = 720;
export const ink = '#1f2328';
export const faintInk = '#57606a';

interface Picture {
  /** First line of the file. */
  mark: string;
  title: string;
  /** What the picture shows, for those who cannot see it. */
  description: string;
  height: number;
  body: readonly string[];
}

/** An SVG file on an opaque light panel, so that it reads on light and on dark pages. */
export function svgFile({ mark, title, description, height, body }: Picture): string {
  return [
    mark,
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" role="img" aria-labelledby="title description" font-family="system-ui, 'Segoe UI', Helvetica, Arial, sans-serif" font-size="12">`,
    `<title id="title">${xmlText(title)}</title>`,
    `<desc id="description">${xmlText(description)}</desc>`,
    `<rect x="0.5" y="0.5" width="${width - 1}" height="${height - 1}" rx="6" fill="#ffffff" stroke="#d0d7de"/>`,
    `<text x="16" y="24" font-size="14" font-weight="600" fill="${ink}">${xmlText(shortened(title, 90))}</text>`,
    ...body,
    '</svg>',
    '',
  ].join('\n');
}
