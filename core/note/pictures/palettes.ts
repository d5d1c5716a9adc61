/** Fixed colours of a picture inside the editor: an SVG in an image sees neither the theme's colours nor its variables. */
export interface Palette {
  ground: string;
  ink: string;
  faint: string;
  grid: string;
  lines: readonly string[];
}

export type ThemeKind = 'light' | 'dark' | 'hc-light' | 'hc-dark';

export const palettes: Readonly<Record<ThemeKind, Palette>> = {
  light: {
    ground: '#ffffff',
    ink: '#1f2328',
    faint: '#57606a',
    grid: '#d8dee4',
    lines: ['#0b5cad', '#b3400a', '#1a7f37', '#7a3fb5'],
  },
  dark: {
    ground: '#1e1e1e',
    ink: '#e4e4e4',
    faint: '#a8b0b8',
    grid: '#3c4248',
    lines: ['#6cb6ff', '#f0a35e', '#6bc46d', '#c99bf2'],
  },
  'hc-light': {
    ground: '#ffffff',
    ink: '#000000',
    faint: '#000000',
    grid: '#8c8c8c',
    lines: ['#003b8e', '#8a2a00', '#00501b', '#4c1a86'],
  },
  'hc-dark': {
    ground: '#000000',
    ink: '#ffffff',
    faint: '#ffffff',
    grid: '#7a7a7a',
    lines: ['#8fd0ff', '#ffc48a', '#9dff9d', '#e3c2ff'],
  },
};
