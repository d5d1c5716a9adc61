import { fade } from './colours';

/** Colours and letters of the present theme, as a canvas needs them. */
export interface Palette {
  background: string;
  foreground: string;
  muted: string;
  grid: string;
  frame: string;
  focus: string;
  accent: string;
  fontFamily: string;
  fontSize: number;
  highContrast: boolean;
  /** The first of these CSS variables that the theme sets. */
  colour(variables: string[]): string;
}

/** Reads the theme's CSS variables as they stand now. */
export function readPalette(): Palette {
  const style = getComputedStyle(document.documentElement);
  const first = (names: string[], otherwise: string) => {
    for (const name of names) {
      const value = style.getPropertyValue(name).trim();
      if (value !== '') return value;
    }
    return otherwise;
  };
  const highContrast = /vscode-high-contrast/.test(document.body.className);
  const foreground = first(['--vscode-foreground', '--vscode-editor-foreground'], '#808080');
  const border = first(['--vscode-editorWidget-border', '--vscode-contrastBorder'], fade(foreground, 0.4));
  return {
    background: first(['--vscode-editor-background'], '#ffffff'),
    foreground,
    muted: highContrast ? foreground : first(['--vscode-descriptionForeground'], foreground),
    // From the letters' colour: the border's own can be the background's, and then the grid is gone.
    grid: fade(foreground, highContrast ? 0.3 : 0.14),
    frame: highContrast ? first(['--vscode-contrastBorder'], border) : border,
    focus: first(['--vscode-focusBorder'], foreground),
    accent: first(['--vscode-charts-blue', '--vscode-textLink-foreground'], foreground),
    fontFamily: first(['--vscode-font-family'], 'sans-serif'),
    fontSize: Math.max(10, (Number.parseFloat(first(['--vscode-font-size'], '13')) || 13) - 2),
    highContrast,
    colour: (variables) => first(variables, foreground),
  };
}

/** Calls back once after each change of theme, until what it returns is called. */
export function watchTheme(changed: () => void): () => void {
  let waiting = 0;
  const observer = new MutationObserver(() => {
    cancelAnimationFrame(waiting);
    waiting = requestAnimationFrame(changed);
  });
  observer.observe(document.body, { attributes: true, attributeFilter: ['class', 'data-vscode-theme-kind'] });
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['style', 'class'] });
  return () => {
    cancelAnimationFrame(waiting);
    observer.disconnect();
  };
}

/** The `var()` chain of a stroke's colour, for elements that follow the theme by themselves. */
export function cssColour(variables: string[]): string {
  return variables.reduceRight((rest, name) => `var(${name}, ${rest})`, 'currentcolor');
}
