import { Button } from '@/components/ui/Button';
import { ChoiceSet, Radio } from '@/components/ui/Choice';
import type { AbsoluteMoment } from '@/engine/influence';
import type { Beam } from '@/engine/model';
import { UNIT_SYSTEMS, type UnitSystemName, unitText } from '@/engine/quantity';
import { Part } from './Part';
import { forceText, lengthText, momentText, type Script, stationText } from './script';
import { TrainRows } from './TrainRows';
import type { Way } from './train-entry';
import type { End, TrainState } from './use-train';

interface TrainPartProps {
  readonly beam: Beam;
  /** Of the line above; null while there is none. */
  readonly script: Script | null;
  readonly system: UnitSystemName;
  readonly train: TrainState;
  /** Moves the influence line to the moment at a section. */
  readonly onTakeSection: (at: number) => void;
}

const WAYS: readonly (readonly [Way, string])[] = [
  ['both', 'either way'],
  ['right', 'to the right'],
  ['left', 'to the left'],
];

/** A train of wheels: what it is made of, where it is worst for the line above, and the worst moment anywhere. */
export function TrainPart(props: TrainPartProps) {
  const { train, system } = props;
  return (
    <Part title="Train of wheels" note="static, and without the beam’s own loads">
      <div className="grid gap-x-28 gap-y-20 lg:grid-cols-[minmax(0,420fr)_minmax(0,760fr)]">
        <div className="grid content-start gap-y-14">
          <TrainRows rows={train.rows} reading={train.reading} system={system} onChange={train.setRows} />
          <ChoiceSet legend="It runs">
            <div className="flex flex-wrap gap-x-14">
              {WAYS.map(([way, words]) => (
                <Radio
                  key={way}
                  name="train-way"
                  checked={train.way === way}
                  onChange={() => train.setWay(way)}
                >
                  {words}
                </Radio>
              ))}
            </div>
          </ChoiceSet>
        </div>
        <div className="grid min-w-0 content-start gap-y-14">
          <Worst {...props} />
          <Anywhere {...props} />
        </div>
      </div>
    </Part>
  );
}

const ENDS: readonly (readonly [End, string])[] = [
  ['max', 'Largest'],
  ['min', 'Smallest'],
];

function Worst({ script, system, train }: TrainPartProps) {
  const { worst, shown } = train;
  if (!script) return <p className="text-ink-2">No line to stand on: put its section right first.</p>;
  if (!worst || !shown) return <p className="text-ink-2">No position yet: put the wheels right first.</p>;
  // The page shows deflections the other way round: what is the largest there is the smallest here.
  const turned = script.quantity === 'deflection';
  return (
    <>
      <fieldset>
        <legend className="caps mb-4">Worst positions, of which one is drawn</legend>
        <div className="grid">
          {ENDS.map(([end, name]) => {
            const key = turned ? other(end) : end;
            return (
              <Radio
                key={end}
                name="train-end"
                checked={train.end === key}
                onChange={() => train.setEnd(key)}
              >
                <span className="inline-block min-w-72 text-ink-2">{name}</span>{' '}
                <b className="font-semibold">{script.effect(worst[key].value)}</b>
                <span className="ml-10 text-ink-2">{placeText(worst[key], system)}</span>
              </Radio>
            );
          })}
        </div>
      </fieldset>
      {shown.at.length > 0 && <WheelTable script={script} system={system} train={train} />}
    </>
  );
}

const other = (end: End): End => (end === 'max' ? 'min' : 'max');

/** "front at 6.500 m, running to the right" */
function placeText(
  { at, direction }: Pick<AbsoluteMoment, 'at' | 'direction'>,
  system: UnitSystemName,
): string {
  const [front] = at;
  return front === undefined
    ? 'with the train off the beam'
    : `front at ${lengthText(front, system)}, running to the ${direction}`;
}

/** The sum that anybody can work: ordinate times force, wheel by wheel. */
function WheelTable({
  script,
  system,
  train: { shown, reading },
}: Pick<TrainPartProps, 'system' | 'train'> & { readonly script: Script }) {
  if (!shown || !reading.ok) return null;
  const unit = script.unit === '' ? null : <small>{script.unit}</small>;
  return (
    <table className="schedule">
      <thead>
        <tr>
          <th scope="col">Wheel</th>
          <th scope="col" className="figure">
            Stands at
          </th>
          <th scope="col" className="figure">
            Force<small>{unitText(UNIT_SYSTEMS[system].force.unit)}</small>
          </th>
          <th scope="col" className="figure">
            Ordinate{unit}
          </th>
          <th scope="col" className="figure">
            Effect
          </th>
        </tr>
      </thead>
      <tbody>
        {shown.wheels.map((place, i) => {
          const { force } = reading.wheels[i]!;
          const ordinate = shown.ordinates[i] ?? null;
          return (
            // biome-ignore lint/suspicious/noArrayIndexKey: a wheel is known by its place in the train
            <tr key={i}>
              <th scope="row" className="font-normal">
                {i + 1}
              </th>
              <td className="figure">{place === null ? 'off the beam' : lengthText(place, system)}</td>
              <td className="figure">{forceText(force, system)}</td>
              <td className="figure">{ordinate === null ? '' : script.ordinate(ordinate)}</td>
              <td className="figure">{ordinate === null ? '' : script.effect(force * ordinate)}</td>
            </tr>
          );
        })}
      </tbody>
      <tfoot>
        <tr>
          <th scope="row" colSpan={4}>
            In all
          </th>
          <td className="figure font-semibold">{script.effect(shown.value)}</td>
        </tr>
      </tfoot>
    </table>
  );
}

/** The moment that is worst of all sections and positions. */
function Anywhere({ beam, system, train, onTakeSection }: TrainPartProps) {
  const { absolute } = train;
  if (!absolute) return null;
  if (!absolute.ok) return <p className="text-schedule text-ink-2">{absolute.faults[0]?.message}</p>;
  const { max, min } = absolute.value;
  const found = [
    { name: 'Sagging', extreme: max },
    { name: 'Hogging', extreme: min },
  ];
  return (
    <div>
      <h4 className="caps mb-4">Absolute largest moments, at any section</h4>
      <ul className="border-t border-rule">
        {found.map(({ name, extreme }) => (
          <li key={name} className="flex min-h-34 flex-wrap items-center gap-x-10 border-b border-rule py-2">
            <span className="min-w-72 text-ink-2 max-md:min-w-0">{name}</span>
            {extreme.section === null ? (
              'none'
            ) : (
              <>
                <b className="font-semibold">{momentText(extreme.value, system)}</b>
                <span className="min-w-0 flex-1 text-ink-2 max-md:order-last max-md:basis-full">
                  {`at ${stationText(beam, extreme.section, system)}, ${placeText(extreme, system)}`}
                </span>
                <Button tone="text" onClick={() => onTakeSection(extreme.section ?? 0)}>
                  Draw this section
                </Button>
              </>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}
