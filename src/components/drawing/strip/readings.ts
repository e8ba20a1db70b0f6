import { type DrawingFormat, figure } from '../format';
import { valuesAt } from '../geometry/curve';
import { type Quantity, toScreen } from '../signs';
import { type DiagramLayout, PURPOSE, TITLE } from './diagram-layout';

export type Reading = { text: string; note: string; y: number[] };

const ENVELOPE_WORDS: Record<Quantity, [upper: string, lower: string]> = {
  shear: ['most', 'least'],
  moment: ['most sagging', 'most hogging'],
  slope: ['least', 'most'],
  deflection: ['up', 'down'],
};

type Curves = Pick<DiagramLayout, 'quantity' | 'curves' | 'toY'>;

/** What a strip says at a station: one reading, both sides of a jump, or the two of an envelope. */
export function readingsAt({ quantity, curves, toY }: Curves, x: number, format: DrawingFormat): Reading[] {
  const purpose = PURPOSE[quantity];
  const unit = format.unit(purpose);
  const readings = curves.map((curve, i): Reading => {
    const sides = valuesAt(curve, x);
    const [left, right] = sides.map((value) => format.value(purpose, toScreen(quantity, value)));
    const jumps = left !== right;
    const words =
      curves.length > 1 ? [ENVELOPE_WORDS[quantity][i === 0 ? 0 : 1]] : jumps ? ['left / right'] : [];
    return {
      text: jumps ? `${left} / ${right}` : `${right}`,
      note: [...words, unit].join(', '),
      y: (jumps ? sides : [sides[1]]).map(toY),
    };
  });
  // Screen signs turn an envelope of deflections over: what is most comes first.
  return quantity === 'slope' || quantity === 'deflection' ? readings.reverse() : readings;
}

const spokenSide = (text: string): string =>
  text.replace(' / ', ' on the left and ').replace(/\u2212/g, 'minus ');

/** "At 3.350 m: shear 30.5 kN, moment 56.4 kNm." */
export function spokenReadings(layouts: readonly Curves[], x: number, format: DrawingFormat): string {
  const parts = layouts.map((layout) => {
    const readings = readingsAt(layout, x, format).map(({ text, note }) => {
      const unit = format.unit(PURPOSE[layout.quantity]);
      const words =
        note.startsWith('most') || note.startsWith('least') || /^(up|down)/.test(note)
          ? `${note.split(',')[0]} `
          : '';
      const right = text.includes(' / ') ? ' on the right' : '';
      return `${words}${spokenSide(text)} ${unit}${right}`;
    });
    return `${TITLE[layout.quantity].toLowerCase()} ${readings.join(' and ')}`;
  });
  return `At ${figure(format, 'length', x)}: ${parts.join(', ')}.`;
}
