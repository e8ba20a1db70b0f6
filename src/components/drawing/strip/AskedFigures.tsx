import { type KeyboardEvent, memo, useRef } from 'react';
import type { Beam } from '@/engine/model/index';
import type { AskedFigure } from '../asked';
import { textWidth } from '../geometry/text-width';
import { plain } from '../marks/Rich';
import { namedSupports } from '../names';
import type { ReactionMark } from './elevation-layout';
import type { Frame } from './frame';
import { reactionPlaces } from './Reactions';
import type { StripLayout } from './strip-layout';

type Props = {
  beam: Beam;
  frame: Frame;
  layout: StripLayout;
  marks: readonly ReactionMark[];
  onAsk: (figure: AskedFigure, pressed: Element) => void;
};

type Place = {
  x: number;
  y: number;
  anchor: 'start' | 'middle' | 'end';
  text: string;
  size: number;
  figure: AskedFigure;
};

function placesOf({ beam, frame, layout, marks }: Omit<Props, 'onAsk'>): Place[] {
  const supports = new Map(namedSupports(beam).map(({ letter, index }) => [letter, index]));
  const reactions = reactionPlaces({ beam, frame, layout: layout.elevation, marks }).map(
    ({ mark, x, y, anchor }): Place => ({
      x,
      y,
      anchor,
      text: mark.text,
      size: 13.5,
      figure: { kind: 'reaction', support: supports.get(mark.letter) ?? 0, component: mark.kind },
    }),
  );
  const peaks = layout.diagrams.flatMap(({ quantity, labels }) =>
    labels.map(({ x, y, anchor, text, peak }): Place => {
      const figure = { quantity, x: peak.x, value: peak.value, isZero: peak.kind === 'zero' };
      return { x, y, anchor, text, size: 13, figure: { kind: 'peak', ...figure } };
    }),
  );
  return [...reactions, ...peaks];
}

/**
 * Over every reaction and labelled peak a button that asks where the number comes from. One stop for the Tab key: arrows
 * go from one to the next.
 */
export const AskedFigures = memo(function AskedFigures({ onAsk, ...drawn }: Props) {
  const host = useRef<SVGGElement>(null);
  const go = (event: KeyboardEvent, from: number) => {
    const all = [...(host.current?.querySelectorAll<SVGGElement>('[role=button]') ?? [])];
    const to = { ArrowRight: from + 1, ArrowDown: from + 1, ArrowLeft: from - 1, ArrowUp: from - 1 }[
      event.key
    ];
    const next = to === undefined ? undefined : all[(to + all.length) % all.length];
    if (!next) return;
    event.preventDefault();
    for (const one of all) one.tabIndex = one === next ? 0 : -1;
    next.focus();
  };
  return (
    <g ref={host}>
      {placesOf(drawn).map(({ x, y, anchor, text, size, figure }, i) => {
        const width = textWidth(text, size, 600);
        const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2;
        return (
          // biome-ignore lint/a11y/useSemanticElements: a button element cannot stand inside an SVG
          <g
            key={`${text} ${x} ${y}`}
            className="asked"
            role="button"
            tabIndex={i === 0 ? 0 : -1}
            aria-label={`${plain(text)}: where this number comes from`}
            onClick={(event) => onAsk(figure, event.currentTarget)}
            onKeyDown={(event) => {
              if (event.key !== 'Enter' && event.key !== ' ') return go(event, i);
              event.preventDefault();
              onAsk(figure, event.currentTarget);
            }}
          >
            <rect x={left - 4} y={y - 17} width={width + 8} height={24} className="grip" />
            <path d={`M${left} ${y + 3.5}h${width}`} />
          </g>
        );
      })}
    </g>
  );
});
