import { useMemo } from 'react';
import { redundantName, releasedPicture } from '@/components/drawing/force-method-pictures';
import { MechanismSketch } from '@/components/drawing/MechanismSketch';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { Schematic } from '@/components/drawing/Schematic';
import { forceMethod } from '@/engine/beam';
import type { Beam, Redundant } from '@/engine/model';
import { type BarredChoice, type Release, type ReleaseChoice, releaseChoices } from './release';

interface RedundantChoiceProps {
  readonly beam: Beam;
  /** The key of the set in use. */
  readonly chosen: string;
  readonly onChoose: (releases: readonly Release[]) => void;
}

/** Every set of redundants as a card: what is taken away, and how the beam that is left sags. */
export function RedundantChoice({ beam, chosen, onChoose }: RedundantChoiceProps) {
  const { open, barred } = useMemo(() => releaseChoices(beam, chosen), [beam, chosen]);
  if (open.length === 0)
    return (
      <p className="text-ink-2">
        Equilibrium alone finds every reaction: there is nothing to release, and no compatibility to work.
      </p>
    );
  const { columns, width } = CARDS[open.length + barred.length] ?? MANY_CARDS;
  return (
    <fieldset className="@container">
      <legend className="sr-only">Redundant to release</legend>
      <div className={`grid border-t border-l border-ink max-md:grid-cols-1 ${columns}`}>
        {open.map((choice) => (
          <OpenCard
            key={choice.key}
            beam={beam}
            choice={choice}
            width={width}
            isChosen={choice.key === chosen}
            onChoose={() => onChoose(choice.releases)}
          />
        ))}
        {barred.map((choice) => (
          <BarredCard key={choice.key} beam={beam} choice={choice} width={width} />
        ))}
      </div>
    </fieldset>
  );
}

interface Cards {
  readonly columns: string;
  /** Of a card's drawing, px. */
  readonly width: number;
}

const MANY_CARDS: Cards = { columns: 'grid-cols-3', width: 206 };
/** By how many there are: as many beside each other as leave no place empty. */
const CARDS: Readonly<Record<number, Cards>> = {
  1: { columns: 'grid-cols-1', width: 318 },
  2: { columns: 'grid-cols-2', width: 318 },
  4: { columns: 'grid-cols-2 @min-[900px]:grid-cols-4', width: 232 },
};

const CARD =
  'grid min-h-44 grid-cols-[auto_minmax(0,1fr)] grid-rows-[auto_1fr] items-start gap-x-9 gap-y-2 border-r border-b border-ink px-12 pt-9 pb-10';
const DRAWING = 'col-span-2 mt-4 self-end [&_svg]:h-auto [&_svg]:max-w-full';

interface OpenProps extends Omit<RedundantChoiceProps, 'chosen' | 'onChoose'> {
  readonly choice: ReleaseChoice;
  readonly width: number;
  readonly isChosen: boolean;
  readonly onChoose: () => void;
}

function OpenCard({ beam, choice, width, isChosen, onChoose }: OpenProps) {
  const { redundants } = choice;
  const picture = useMemo(() => releasedPicture(beam, forceMethod(beam, redundants)), [beam, redundants]);
  const { caption: _, ...drawing } = picture;
  return (
    <label className={`cursor-pointer hover:bg-paper-2 ${CARD} ${isChosen ? 'bg-paper-2' : ''}`}>
      <span className="choice min-h-20!">
        <input type="radio" name="release" checked={isChosen} onChange={onChoose} />
      </span>
      <span>
        <b className="font-semibold">
          <RichHtml text={titleOf(beam, redundants)} />
        </b>
        <span className="block text-schedule text-ink-2">{saysOf(beam, redundants)}</span>
      </span>
      <span className={DRAWING}>
        <Schematic {...drawing} width={width} />
      </span>
    </label>
  );
}

interface BarredProps {
  readonly beam: Beam;
  readonly choice: BarredChoice;
  readonly width: number;
}

function BarredCard({ beam, choice, width }: BarredProps) {
  const { redundants, reason, motion } = choice;
  return (
    <div className={`hatch-off ${CARD}`}>
      <span className="choice min-h-20!">
        <input type="radio" disabled aria-label={`${plainTitle(beam, redundants)}: cannot be released`} />
      </span>
      <span className="bg-paper px-2">
        <b className="font-semibold text-ink-2">
          <RichHtml text={titleOf(beam, redundants)} />
        </b>
        <span className="block text-schedule text-ink-2">{reason}</span>
      </span>
      {motion && (
        <span className={DRAWING}>
          <MechanismSketch beam={beam} motion={motion} label="How the beam would move" width={width} />
        </span>
      )}
    </div>
  );
}

const KIND = { vertical: 'Reaction', rotation: 'Fixing moment', moment: 'Moment' } as const;

const titleOf = (beam: Beam, redundants: readonly Redundant[]): string =>
  redundants.map((one) => `${KIND[one.component]} ${redundantName(beam, one).symbol}`).join(' and ');

const plainTitle = (beam: Beam, redundants: readonly Redundant[]): string =>
  titleOf(beam, redundants).replaceAll(/[_{}]/g, '');

/** "Take the support at B away." */
function saysOf(beam: Beam, redundants: readonly Redundant[]): string {
  return redundants
    .map((one) => {
      const { letter } = redundantName(beam, one);
      if (one.component === 'vertical') return `Take the support at ${letter} away.`;
      return one.component === 'rotation'
        ? `Let the beam turn at ${letter}.`
        : `Cut the beam over ${letter}: a hinge.`;
    })
    .join(' ');
}
