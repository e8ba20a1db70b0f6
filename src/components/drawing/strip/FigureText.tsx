import type { KeyboardEvent } from 'react';
import { textWidth } from '../geometry/text-width';
import { plain, Rich } from '../marks/Rich';
import type { Figure } from './figures';

export function FigureText({ figure: { x, y, text, anchor } }: { figure: Figure }) {
  return (
    <text x={x} y={y} textAnchor={anchor} className="figure">
      <Rich text={text} />
    </text>
  );
}

type EditableProps = { figure: Figure & { edits: string }; onEdit: (symbol: string) => void };

/** A figure that opens its input: underlined in dotted ochre, and a button to the keyboard. */
export function EditableFigure({ figure, onEdit }: EditableProps) {
  const { x, y, text, anchor, edits } = figure;
  const width = textWidth(text, 13.5);
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2;
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key !== 'Enter' && event.key !== ' ') return;
    event.preventDefault();
    onEdit(edits);
  };
  return (
    // biome-ignore lint/a11y/useSemanticElements: a button element cannot stand inside an SVG
    <g
      className="editable"
      role="button"
      tabIndex={0}
      aria-label={`Change ${plain(text)}`}
      onClick={() => onEdit(edits)}
      onKeyDown={onKeyDown}
    >
      <rect x={left - 8} y={y - 19} width={width + 16} height={28} className="grip" />
      <FigureText figure={figure} />
    </g>
  );
}
