import { memo, useMemo, useState } from 'react';
import { figure } from '@/components/drawing/format';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { Checkbox, ChoiceSet } from '@/components/ui/Choice';
import type { Beam } from '@/engine/model';
import { formatNumber, readQuantity, toUnit, UNIT_SYSTEMS, type UnitSystemName } from '@/engine/quantity';
import { type FirstFrequency, totalMass } from '@/engine/vibration';
import { solveFrequency } from '@/features/beam/further';
import type { Entry } from '../raw';
import { type GivenMasses, groupsOf, isPermanent, massesFrom } from './mass-entry';
import { Part } from './Part';
import { QuantityInput } from './QuantityInput';
import { stationText } from './script';

interface FrequencyPanelProps {
  readonly beam: Beam;
  readonly system: UnitSystemName;
  readonly ownMass: number | null;
}

/** The first natural frequency with the mass that a person states. */
export const FrequencyPanel = memo(function FrequencyPanel({ beam, system, ownMass }: FrequencyPanelProps) {
  const [typed, setTyped] = useState<Entry | null>(null);
  const [chosen, setChosen] = useState<ReadonlySet<string> | null>(null);
  const groups = useMemo(() => groupsOf(beam), [beam]);
  const counted = useMemo(() => chosen ?? new Set(groups.filter(isPermanent)), [chosen, groups]);
  const entry = typed ?? ownEntry(ownMass, system);
  const own = readQuantity(entry.text, 'mass_per_length', entry);
  const mass = own.ok ? own.value : null;
  const given = useMemo(
    () => (mass === null ? null : massesFrom(beam, mass, counted)),
    [beam, mass, counted],
  );
  const found = useMemo(() => given && solveFrequency({ beam }, given.masses), [beam, given]);
  const isNegative = mass !== null && mass < 0;
  const toggle = (group: string) => {
    const next = new Set(counted);
    if (!next.delete(group)) next.add(group);
    setChosen(next);
  };
  return (
    <Part title="First natural frequency" note="with the mass that is stated here">
      <div className="grid gap-x-28 gap-y-14 lg:grid-cols-[minmax(0,420fr)_minmax(0,760fr)]">
        <div className="grid content-start gap-y-10">
          <QuantityInput
            label="Mass of the beam itself"
            dimension="mass_per_length"
            entry={entry}
            error={isNegative ? 'A mass cannot be less than zero.' : undefined}
            help={ownMass !== null && typed === null ? 'Of the section chosen.' : undefined}
            onChange={setTyped}
          />
          {groups.length > 0 && (
            <ChoiceSet legend="Loads that are weights">
              {groups.map((group) => (
                <Checkbox key={group} checked={counted.has(group)} onChange={() => toggle(group)}>
                  {group === '' ? 'Loads without a group' : `Group ${group}`}
                </Checkbox>
              ))}
            </ChoiceSet>
          )}
        </div>
        {found?.ok && given && <Found beam={beam} found={found.value} given={given} system={system} />}
        {found && !found.ok && !isNegative && <p className="text-ink-2">{found.faults[0]?.message}</p>}
      </div>
    </Part>
  );
});

/** The section's own mass, else none. */
function ownEntry(mass: number | null, system: UnitSystemName): Entry {
  const { mass_per_length: display } = UNIT_SYSTEMS[system];
  if (mass === null) return { text: '0', unit: display.unit };
  return { text: formatNumber(toUnit(mass, display.unit), display), unit: display.unit };
}

interface FoundProps {
  readonly beam: Beam;
  readonly found: FirstFrequency;
  readonly given: GivenMasses;
  readonly system: UnitSystemName;
}

function Found({ beam, found, given, system }: FoundProps) {
  const { frequency, estimate, sag } = found;
  const { distributed, lumped } = totalMass(given.masses);
  const sagText = figure(DRAWING_FORMATS[system], 'deflection', sag.deflection);
  return (
    <div>
      <p className="flex flex-wrap items-baseline gap-x-10">
        <b className="text-value font-semibold">{hertz(frequency)}</b>
        <span className="text-ink-2">exact for this mass and these supports</span>
      </p>
      <dl className="mt-8 grid grid-cols-[auto_minmax(0,1fr)] gap-x-14 gap-y-4 text-schedule">
        <dt className="text-ink-2">Mass</dt>
        <dd>{massText(distributed, lumped, system)}</dd>
        <dt className="text-ink-2">Usual estimate 18/√δ, δ in mm</dt>
        <dd>
          {`${hertz(estimate)}, from δ = ${sagText} at ${stationText(beam, sag.at, system)} under the weight of that mass. ${apart(found)}`}
        </dd>
        <dt className="text-ink-2">The first</dt>
        <dd>
          {found.count > 1
            ? `No natural frequency is lower, and ${found.count} fall together here: they are counted.`
            : 'No natural frequency is lower: they are counted.'}
        </dd>
        {given.leftOut > 0 && (
          <>
            <dt className="text-ink-2">Left out</dt>
            <dd>{`${given.leftOut} ${given.leftOut === 1 ? 'load' : 'loads'} without a mass: a couple, a curvature, or a pull upward.`}</dd>
          </>
        )}
      </dl>
    </div>
  );
}

/** The estimate is known to be off by a few per cent of one span; more than this is worth saying. */
const FAR = 0.1;

function apart({ frequency, estimate }: FirstFrequency): string {
  const part = estimate / frequency - 1;
  if (Math.abs(part) <= FAR) return '';
  const percent = formatNumber(Math.abs(part) * 100, { places: 0 });
  return `That is ${percent} % ${part > 0 ? 'more' : 'less'} than the exact figure: the rule is made for one span.`;
}

const hertz = (value: number): string => `${formatNumber(value, { significant: 3, places: 2 })} Hz`;

/** Kilograms, or pounds: "1200 kg along the beam, 300 kg at points". */
function massText(distributed: number, lumped: number, system: UnitSystemName): string {
  const text = (mass: number) =>
    system === 'us'
      ? `${formatNumber(toUnit(mass, 'lbm'), { places: 0 })} lb`
      : `${formatNumber(mass, { places: 0 })} kg`;
  return lumped > 0
    ? `${text(distributed)} along the beam, ${text(lumped)} at points`
    : `${text(distributed)} along the beam`;
}
