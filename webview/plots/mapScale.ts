import { t } from '../words';
import { make, makeSvg } from './elements';
import { shadeColour } from './mapDraw';
import type { Range } from './range';
import { withUnit } from './shown';
import type { Palette } from './theme';

/** The scale of a map's shades: five of them between the values that they stand for. */
export function mapScale(range: Range, label: string, unit: string, palette: Palette): HTMLElement {
  const item = make('li');
  const svg = makeSvg('svg', { width: 80, height: 12, viewBox: '0 0 80 12', 'aria-hidden': 'true' });
  for (let i = 0; i < 5; i++) {
    svg.append(
      makeSvg('rect', { x: 16 * i, y: 0, width: 16, height: 12, fill: shadeColour(palette, 1 - i / 4) }),
    );
  }
  item.append(
    make('span', '', `${label}:`),
    make('span', 'plotNumber', withUnit(range.min, unit)),
    svg,
    make('span', 'plotNumber', t('{0} or more', withUnit(range.max, unit))),
  );
  return item;
}
