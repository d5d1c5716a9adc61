import * as vscode from 'vscode';
import { type Palette, palettes } from '../../core/note/pictures/palettes';

/** The colours that suit the theme on show. */
export function presentPalette(): Palette {
  switch (vscode.window.activeColorTheme.kind) {
    case vscode.ColorThemeKind.Light:
      return palettes.light;
    case vscode.ColorThemeKind.HighContrast:
      return palettes['hc-dark'];
    case vscode.ColorThemeKind.HighContrastLight:
      return palettes['hc-light'];
    default:
      return palettes.dark;
  }
}
