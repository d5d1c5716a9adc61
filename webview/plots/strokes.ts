import type { Kind, Role } from './data';

/** How a line is drawn, so that it is told apart without its colour. */
export interface Stroke {
  width: number;
  /** Lengths of strokes and gaps in pixels; empty: solid. */
  dash: number[];
  /** Share of the colour under a filled curve; 0: not filled. */
  fill: number;
  /** CSS variables of the colour; the first that the theme sets counts. */
  variables: string[];
}

const foreground = ['--vscode-foreground', '--vscode-editor-foreground'];
const chart = (colour: string) => [`--vscode-charts-${colour}`, ...foreground];

const strokes: Record<Role, Stroke[]> = {
  input: [
    { width: 1.5, dash: [2, 2], fill: 0, variables: chart('blue') },
    { width: 1.5, dash: [2, 4], fill: 0, variables: chart('purple') },
    { width: 1.5, dash: [4, 3], fill: 0, variables: chart('yellow') },
    { width: 1.5, dash: [2, 2, 2, 5], fill: 0, variables: chart('green') },
  ],
  desired: [{ width: 1, dash: [], fill: 0, variables: foreground }],
  output: [{ width: 2.5, dash: [], fill: 0, variables: chart('green') }],
  error: [{ width: 1, dash: [], fill: 0.3, variables: chart('orange') }],
  figure: [
    { width: 2, dash: [], fill: 0, variables: chart('blue') },
    { width: 2, dash: [12, 3], fill: 0, variables: chart('purple') },
    { width: 1.25, dash: [], fill: 0, variables: chart('green') },
    { width: 1.25, dash: [12, 3], fill: 0, variables: chart('yellow') },
  ],
  figure2: [
    { width: 1.5, dash: [6, 4], fill: 0, variables: chart('orange') },
    { width: 1.5, dash: [3, 3], fill: 0, variables: chart('red') },
  ],
  bound: [{ width: 1, dash: [8, 3, 2, 3], fill: 0, variables: foreground }],
};

/** The stroke of the `nth` curve of a role (from 0); a plot with more than there are strokes starts over. */
export function strokeOf(role: Role, nth = 0): Stroke {
  return strokes[role][nth % strokes[role].length];
}

/** The stroke of each curve of a plot, several of one role apart from each other. */
export function strokesOf(curves: { role: Role }[]): Stroke[] {
  const seen = new Map<Role, number>();
  return curves.map(({ role }) => {
    const nth = seen.get(role) ?? 0;
    seen.set(role, nth + 1);
    return strokeOf(role, nth);
  });
}

/** Thin lines are thicker in high contrast, and thinner than thick ones still. */
export function strokeWidth({ width }: Stroke, highContrast: boolean): number {
  return highContrast ? width * 1.4 : width;
}

/** How the bars of intervals are drawn: solid, dashed, dotted. */
export const barStrokes: Record<Kind, Stroke> = {
  fit: { width: 4, dash: [], fill: 0.06, variables: chart('blue') },
  heldOut: { width: 4, dash: [9, 5], fill: 0, variables: chart('green') },
  disturbanceOnly: { width: 4, dash: [3, 4], fill: 0, variables: chart('purple') },
};
