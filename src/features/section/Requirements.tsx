import { type ReactNode, useState } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { Button } from '@/components/ui/Button';
import { type Bound, cleared, USUAL_BOUNDS, withRequired } from './address';
import { axesOf, FIELD_WORDS, symbolOf } from './display';
import { NumberBound } from './NumberBound';
import { MEASURES, SECTION_MEASURES, type SectionMeasure } from './query';
import { focusOnLine, type RequirementsProps } from './RequiredLines';

const WORDS = { w_pl: 'Plastic modulus', i_major: 'Second moment', width: 'Width' } as const;
const ENDS = { min: 'least', max: 'greatest' } as const;

/** What else is asked: the three that are asked most, and any other property by its name. */
export function Requirements({
  state,
  system,
  onBound,
  onState,
  children,
}: RequirementsProps & { readonly children: ReactNode }) {
  const axes = axesOf(system);
  return (
    <div className="min-w-0 border-rule px-18 pt-14 pb-12 max-lg:border-t lg:border-l max-md:px-12 md:max-lg:nth-2:border-t-0 md:max-lg:nth-[even]:border-l">
      <h2 className="caps mb-8">Also require</h2>
      <div className="grid grid-cols-[minmax(0,1fr)_72px_40px] items-center gap-x-8 gap-y-5 text-schedule">
        {USUAL_BOUNDS.map(([measure, end]) => {
          const field = SECTION_MEASURES[measure];
          const name: Bound = `${measure}_${end}`;
          // With a line of its own it is asked there, at both ends.
          if (state.required.includes(measure)) return null;
          return (
            <div key={measure} className="contents">
              <span aria-hidden="true">
                {WORDS[measure]}{' '}
                <i className="whitespace-nowrap">
                  <RichHtml text={symbolOf(field, axes)} />
                </i>
                , {ENDS[end]}
              </span>
              <NumberBound
                label={`${FIELD_WORDS[field].name}, ${ENDS[end]}`}
                value={state.bounds[name]}
                {...{ name, field, system }}
                withUnit
                onChange={(bound, value) => onBound([[bound, value]])}
              />
            </div>
          );
        })}
      </div>
      <Another
        required={state.required}
        onAdd={(measure) => {
          onState((before) => withRequired(before, measure));
          focusOnLine(measure);
        }}
      />
      <div className="mt-4 flex flex-wrap gap-x-14 text-schedule">
        <Button tone="text" onClick={() => onState(cleared)}>
          Clear all
        </Button>
        {children}
      </div>
    </div>
  );
}

/** Depth and mass have their histograms. */
const OFFERED = MEASURES.filter((measure) => measure !== 'depth' && measure !== 'mass');

interface AnotherProps {
  readonly required: readonly SectionMeasure[];
  readonly onAdd: (measure: SectionMeasure) => void;
}

function Another({ required, onAdd }: AnotherProps) {
  const [chosen, setChosen] = useState('');
  const left = OFFERED.filter((measure) => !required.includes(measure));
  const measure = left.find((one) => one === chosen);
  if (left.length === 0) return null;
  return (
    <div className="mt-5 flex items-center gap-8 text-schedule">
      <select
        aria-label="Property to add"
        className="input min-w-0 flex-1 text-schedule!"
        value={measure ?? ''}
        onChange={(event) => setChosen(event.target.value)}
      >
        <option value="">Add a property</option>
        {left.map((one) => (
          <option key={one} value={one}>
            {FIELD_WORDS[SECTION_MEASURES[one]].name}
          </option>
        ))}
      </select>
      {measure && (
        <Button
          tone="text"
          onClick={() => {
            setChosen('');
            onAdd(measure);
          }}
        >
          Add
        </Button>
      )}
    </div>
  );
}
