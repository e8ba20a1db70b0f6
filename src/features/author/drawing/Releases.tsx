import { useMemo, useState } from 'react';
import { redundantName } from '@/components/drawing/force-method-pictures';
import { MechanismSketch } from '@/components/drawing/MechanismSketch';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { Button } from '@/components/ui/Button';
import {
  type Beam,
  checkRedundants,
  type DisplacedShape,
  defaultRedundants,
  describeMotion,
  eligibleRedundants,
  placeRedundant,
  type Redundant,
  releaseMechanism,
} from '@/engine/model';
import { type EditorState, listAt, textAt } from '../edit';
import { setRedundants } from './beam-reading';
import type { Sketch } from './sketch';

interface ReleasesProps {
  readonly editor: EditorState;
  readonly sketch: Sketch;
  readonly beam: Beam;
}

interface Refused {
  readonly words: string;
  readonly motion: DisplacedShape | null;
}

const keyOf = (one: Redundant): string =>
  one.component === 'moment' ? `m${one.at}` : `${one.component}${one.support}`;

/** Every reaction, and the moment over every inner support: what a person may think of releasing. */
const thinkable = (beam: Beam): Redundant[] =>
  beam.supports.flatMap(({ at, vertical, rotation }, support): Redundant[] => [
    ...(vertical.kind === 'free' ? [] : [{ support, component: 'vertical' as const }]),
    ...(rotation.kind === 'free' ? [] : [{ support, component: 'rotation' as const }]),
    ...(rotation.kind === 'free' &&
    vertical.kind !== 'free' &&
    at > 0 &&
    at < beam.length &&
    !beam.hinges.includes(at)
      ? [{ at, component: 'moment' as const }]
      : []),
  ]);

/** The set in hand: the document's own until another is being chosen. */
function useReleases({ editor, sketch, beam }: ReleasesProps) {
  const { instance } = sketch;
  const written = useMemo(
    () => (instance.beam.redundants ?? []).map((one) => placeRedundant(beam, one)),
    [instance, beam],
  );
  const [pending, setPending] = useState<readonly Redundant[] | null>(null);
  const [refused, setRefused] = useState<Refused | null>(null);
  const [of, setOf] = useState(beam);
  if (of !== beam) {
    setOf(beam);
    setPending(null);
    setRefused(null);
  }
  const chosen = pending ?? written;
  const press = (one: Redundant) => {
    const without = chosen.filter((each) => keyOf(each) !== keyOf(one));
    setRefused(null);
    if (without.length < chosen.length) return setPending(without);
    const next = [...chosen, one].slice(-beam.degree);
    const found = refusal(beam, next, one);
    if (found) return setRefused(found);
    if (next.length < beam.degree) return setPending(next);
    editor.edit(setRedundants(sketch, beam, next));
  };
  const takeUsual = () => {
    setPending(null);
    setRefused(null);
    editor.edit(setRedundants(sketch, beam, defaultRedundants(beam)));
  };
  return { chosen, refused, press, takeUsual };
}

/** What is released first: any set that leaves the beam standing. One that does not is drawn as it would move. */
export function Releases(props: ReleasesProps) {
  const { editor, beam } = props;
  const { chosen, refused, press, takeUsual } = useReleases(props);
  const standing = useMemo(() => (refused ? null : misfit(beam, chosen)), [beam, chosen, refused]);
  const eligible = useMemo(() => new Set(eligibleRedundants(beam).map(keyOf)), [beam]);
  if (beam.degree === 0)
    return <p className="text-ink-2">Equilibrium alone finds every reaction: there is nothing to release.</p>;
  if (listAt(editor.document, '/beam/redundants').some((one) => textAt(one, '/when') !== ''))
    return <p className="text-ink-2">What is released depends on a condition. Change it in the form.</p>;
  const missing = beam.degree - chosen.length;
  const shown = refused ?? standing;
  return (
    <div>
      <fieldset className="flex flex-wrap items-center gap-6" disabled={editor.readOnly}>
        <legend className="sr-only">Released first</legend>
        {thinkable(beam).map((one) => (
          <ReleaseButton
            key={keyOf(one)}
            symbol={redundantName(beam, one).symbol}
            isIn={chosen.some((each) => keyOf(each) === keyOf(one))}
            isEligible={eligible.has(keyOf(one))}
            onPress={() => press(one)}
          />
        ))}
        <Button tone="text" onClick={takeUsual}>
          The beam’s own choice
        </Button>
      </fieldset>
      <p className="mt-6 text-note text-ink-2" role="status">
        {missing > 0
          ? `Choose ${missing} more.`
          : `Indeterminate to degree ${beam.degree}: ${beam.degree === 1 ? 'one is' : `${beam.degree} are`} released.`}
      </p>
      {shown && (
        <div className="mt-8 flex flex-wrap items-center gap-14" role="alert">
          {shown.motion && <MechanismSketch beam={beam} motion={shown.motion} label={shown.words} />}
          <p className="min-w-0 flex-1 basis-180 font-semibold text-error">{shown.words}</p>
        </div>
      )}
    </div>
  );
}

interface ReleaseButtonProps {
  readonly symbol: string;
  readonly isIn: boolean;
  readonly isEligible: boolean;
  readonly onPress: () => void;
}

function ReleaseButton({ symbol, isIn, isEligible, onPress }: ReleaseButtonProps) {
  const off = isEligible ? 'border-ink' : 'border-dashed border-ink-2 text-ink-2 hatch-off';
  return (
    <button
      type="button"
      aria-pressed={isIn}
      onClick={onPress}
      className={`min-h-28 border px-11 py-2 text-schedule font-semibold max-md:min-h-44 pointer-coarse:min-h-44 ${off} ${isIn ? 'bg-ochre-wash' : 'hover:bg-paper-3'}`}
    >
      <RichHtml text={symbol} />
      {!isEligible && <span className="sr-only">, which equilibrium determines</span>}
    </button>
  );
}

/** What is wrong with the set that is written; one that is not whole yet is only counted. */
function misfit(beam: Beam, set: readonly Redundant[]): Refused | null {
  const fault = checkRedundants(beam, set).find(({ code }) => code !== 'wrong_count');
  if (!fault) return null;
  const motion = fault.motion ?? releaseMechanism(beam, set);
  return { words: fault.message, motion };
}

/** Why these cannot all be released, and how the beam would move; null where they can, or where more are to come. */
function refusal(beam: Beam, set: readonly Redundant[], last: Redundant): Refused | null {
  const isWhole = set.length === beam.degree;
  const motion = releaseMechanism(beam, set);
  if (motion) {
    const { letter } = redundantName(beam, last);
    const words = `Released at ${letter}, the beam is a mechanism. ${describeMotion(beam, set) ?? ''}`;
    return { words: words.trim(), motion };
  }
  const [fault] = isWhole ? checkRedundants(beam, set) : [];
  return fault ? { words: fault.message, motion: fault.motion ?? null } : null;
}
