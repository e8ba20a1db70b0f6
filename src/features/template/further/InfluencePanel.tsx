import { memo, useMemo, useRef, useState } from 'react';
import { origin } from '@/components/drawing/names';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { Radio } from '@/components/ui/Choice';
import { ChoiceField } from '@/components/ui/Field';
import type { InfluenceLine } from '@/engine/influence';
import { type Beam, spansOf } from '@/engine/model';
import { readQuantity, type UnitSystemName } from '@/engine/quantity';
import { solveInfluence } from '@/features/beam/further';
import type { Entry } from '../raw';
import { askedFor, choicesFor, hasSection, hasSides } from './choices';
import { InfluenceFigure } from './InfluenceFigure';
import type { StandingTrain } from './influence-layout';
import { Part } from './Part';
import { placeEntry } from './place-entry';
import { QuantityInput } from './QuantityInput';
import { lengthText, ordinateText, type Script, scriptFor, stationText, titleOf, unitLoad } from './script';
import { TrainPart } from './TrainPart';
import { useTrain } from './use-train';

interface InfluencePanelProps {
  readonly beam: Beam;
  readonly system: UnitSystemName;
}

/** The influence line of what is chosen, and a train of wheels on it. */
export const InfluencePanel = memo(function InfluencePanel({ beam, system }: InfluencePanelProps) {
  const [choice, setChoice] = useState('moment');
  const [typed, setTyped] = useState<Entry | null>(null);
  const [side, setSide] = useState<'left' | 'right'>('left');
  const entry = typed ?? placeEntry(beam, middleOf(beam), system);
  const section = readQuantity(entry.text, 'length', entry);
  const at = section.ok ? section.value : null;
  const solved = useMemo(() => {
    if (at === null && hasSection(choice)) return null;
    return solveInfluence({ beam }, askedFor(choice, at ?? 0, side));
  }, [beam, choice, at, side]);
  const fault = solved?.ok === false ? solved.faults[0] : undefined;
  const isOfSection = fault?.path.at(-1) === 'at';
  const influence = solved?.ok ? solved.value : null;
  const script = useMemo(() => influence && scriptFor(influence.quantity, system), [influence, system]);
  const train = useTrain(beam, influence, system);
  const host = useRef<HTMLDivElement>(null);
  const takeSection = (x: number) => {
    setChoice('moment');
    host.current?.scrollIntoView({ block: 'nearest' });
    setTyped(placeEntry(beam, x, system));
  };
  return (
    <>
      <div ref={host}>
        <Part title="Influence line" note="of a downward force of 1">
          <div className="flex flex-wrap items-start gap-14">
            <div className="w-240 max-md:w-full">
              <ChoiceField
                label="Line of"
                choices={choicesFor(beam)}
                value={choice}
                error={fault && !isOfSection ? fault.message : undefined}
                onChange={(event) => setChoice(event.target.value)}
              />
            </div>
            {hasSection(choice) && (
              <div className="w-200 max-md:w-full">
                <QuantityInput
                  label="Section, from the left end"
                  dimension="length"
                  entry={entry}
                  error={isOfSection ? offBeam(beam, system) : undefined}
                  onChange={setTyped}
                />
              </div>
            )}
            {at !== null && hasSides(beam, choice, at) && (
              <Sides side={side} station={stationText(beam, at, system)} onChange={setSide} />
            )}
          </div>
          {influence && script && (
            <Line beam={beam} influence={influence} script={script} system={system} train={train.standing} />
          )}
        </Part>
      </div>
      <TrainPart beam={beam} script={script} system={system} train={train} onTakeSection={takeSection} />
    </>
  );
});

/** The engine says it in metres. */
const offBeam = ({ length }: Beam, system: UnitSystemName): string =>
  `The section is off the beam. Give a position from 0 to ${lengthText(length, system)}.`;

/** The middle of the longest span: where a person looks first. */
function middleOf(beam: Beam): number {
  const spans = spansOf(beam);
  const longest = spans.reduce((a, b) => (b.to - b.from > (a.to - a.from) * (1 + 1e-9) ? b : a));
  return (longest.from + longest.to) / 2;
}

interface SidesProps {
  readonly side: 'left' | 'right';
  readonly station: string;
  readonly onChange: (side: 'left' | 'right') => void;
}

function Sides({ side, station, onChange }: SidesProps) {
  return (
    <fieldset>
      <legend className="caps mb-2">Side of {station}</legend>
      <div className="flex min-h-34 items-center gap-14">
        {(['left', 'right'] as const).map((one) => (
          <Radio key={one} name="influence-side" checked={side === one} onChange={() => onChange(one)}>
            {one}
          </Radio>
        ))}
      </div>
    </fieldset>
  );
}

interface LineProps {
  readonly beam: Beam;
  readonly influence: InfluenceLine;
  readonly script: Script;
  readonly system: UnitSystemName;
  readonly train: StandingTrain | null;
}

function Line({ beam, influence, script, system, train }: LineProps) {
  const title = titleOf(beam, influence.quantity, system);
  const { max, min } = influence.extremes;
  const said = [max, min].map(
    ({ value, at }) => `${ordinateText(script, value)} at ${stationText(beam, at[0]!, system)}`,
  );
  const label = `Influence line: ${title}. Greatest ordinates ${said.join(' and ')}.`;
  return (
    <>
      <p className="mt-10 text-schedule">
        <b className="font-semibold">{title}</b>
        <span className="ml-10 text-ink-2">
          {script.sign}
          {script.unit === '' ? '' : `, ordinates in ${script.unit}`}
          {`, stations in ${DRAWING_FORMATS[system].station.unit} from ${origin(beam)}`}
        </span>
      </p>
      <InfluenceFigure
        beam={beam}
        influence={influence}
        script={script}
        train={train}
        system={system}
        label={label}
      />
      <Areas beam={beam} influence={influence} script={script} system={system} />
    </>
  );
}

/** What a uniform load makes on the parts of each span that add to the quantity, and on those that take from it. */
function Areas({ beam, influence, script, system }: Omit<LineProps, 'train'>) {
  const load = unitLoad(system);
  const turned = script.quantity === 'deflection';
  return (
    <table className="schedule mt-10">
      <caption>
        {`Area under the line times ${load.text}: what that load makes on each stretch, where it acts only on the positive or only on the negative part.`}
      </caption>
      <thead>
        <tr>
          <th scope="col">Stretch</th>
          <th scope="col" className="figure">
            Positive part
          </th>
          <th scope="col" className="figure">
            Negative part
          </th>
        </tr>
      </thead>
      <tbody>
        {influence.areas.map(({ from, to, positive, negative }) => {
          const [plus, minus] = turned ? [negative, positive] : [positive, negative];
          return (
            <tr key={from}>
              <th scope="row" className="font-normal">
                {`${stationText(beam, from, system)} to ${stationText(beam, to, system)}`}
              </th>
              <td className="figure">{script.effect(plus * load.size)}</td>
              <td className="figure">{script.effect(minus * load.size)}</td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
